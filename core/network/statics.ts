import { solvePositiveDefinite } from '../numerics/cholesky.ts'
import { add, dot, scale, subtract } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import { placeRow, type SparseRow } from './kinematics.ts'
import { steadyPart } from './laws.ts'
import type { System } from './assemble.ts'
import type { Attachment } from './network.ts'

/** A force that does not change, at a place [N]. */
export interface StaticLoad {
  readonly at: Attachment
  readonly force: Readonly<Vec3>
}

export interface StaticState {
  /** displacement in every freedom */
  readonly displacement: Float64Array
  /** by element: force on the carried side (`to`), fixed axes [N] */
  readonly forces: readonly Vec3[]
}

/**
 * Small-displacement equilibrium K q = f.
 * @returns null when the network can move without any element resisting
 */
export function staticEquilibrium(system: System, loads: readonly StaticLoad[]): StaticState | null {
  const right = new Float64Array(system.freedoms.count)
  for (const { at, force } of loads) {
    for (const axis of [0, 1, 2] as const) {
      const unit: Vec3 = [axis === 0 ? 1 : 0, axis === 1 ? 1 : 0, axis === 2 ? 1 : 0]
      addScaled(right, placeRow(system.freedoms, at, unit), force[axis])
    }
  }
  const displacement = solvePositiveDefinite(system.stiffness, right)
  if (displacement === null) return null
  const branchForces = system.elements.map(({ branches }) =>
    branches.map(({ law, row }) => steadyPart(law).stiffness * rowTimes(row, displacement)),
  )
  // what rounding leaves unbalanced goes back as a load: the forces then balance to their last digits
  // even where stiffnesses differ by many decades
  const rest = Float64Array.from(right)
  system.elements.forEach(({ branches }, e) => {
    branches.forEach(({ row }, b) => {
      addScaled(rest, row, -(branchForces[e]?.[b] ?? 0))
    })
  })
  const correction = solvePositiveDefinite(system.stiffness, rest) ?? rest.fill(0)
  const forces = system.elements.map(({ branches }, e) =>
    branches.reduce<Vec3>(
      (sum, { branch, law, row }, b) => {
        if (branch.motion === 'turn') return sum
        const force = (branchForces[e]?.[b] ?? 0) + steadyPart(law).stiffness * rowTimes(row, correction)
        return add(sum, scale(branch.axis, -force))
      },
      [0, 0, 0],
    ),
  )
  return { displacement: displacement.map((value, i) => value + (correction[i] ?? 0)), forces }
}

/** The forces of an element on its two ends, as loads on the nodes. */
export function endLoads(system: System, forces: readonly Readonly<Vec3>[]): StaticLoad[] {
  return system.elements.flatMap(({ element }, index) => {
    const force = forces[index] ?? [0, 0, 0]
    return [
      { at: element.to, force },
      { at: element.from, force: scale(force, -1) },
    ]
  })
}

/**
 * The stiffness that static forces themselves bring (overturning): a force F at a place r from the
 * centre of gravity does work along the second-order displacement 1/2 theta x (theta x r), so
 * K_g = (F . r) I - (F rᵀ + r Fᵀ) / 2 in the rotations, summed over all forces on a body.
 * A weight acts at the centre of gravity itself and adds nothing.
 * @param loads every static force on the bodies, those of the elements included
 * @returns the same system with K_g in its stiffness
 */
export function withGeometricStiffness(system: System, loads: readonly StaticLoad[]): System {
  const stiffness = Float64Array.from(system.stiffness)
  for (const load of loads) addGeometric(stiffness, system, load)
  return { ...system, stiffness }
}

function addGeometric(stiffness: Float64Array, system: System, { at: place, force }: StaticLoad): void {
  const entry = system.freedoms.nodes.get(place.node)
  if (entry?.node.kind !== 'body') return
  const n = system.freedoms.count
  const arm = subtract(place.position, entry.node.centre)
  const first = entry.first + 3
  const product = dot(force, arm)
  for (const i of [0, 1, 2] as const) {
    for (const j of [0, 1, 2] as const) {
      const at = (first + i) * n + first + j
      const value = (i === j ? product : 0) - (force[i] * arm[j] + arm[i] * force[j]) / 2
      stiffness[at] = (stiffness[at] ?? 0) + value
    }
  }
}

export function rowTimes({ indices, values }: SparseRow, vector: ArrayLike<number>): number {
  let sum = 0
  for (let i = 0; i < indices.length; i++) sum += (values[i] ?? 0) * (vector[indices[i] ?? 0] ?? 0)
  return sum
}

/** target += factor · row */
export function addScaled(target: Float64Array, { indices, values }: SparseRow, factor: number): void {
  for (let i = 0; i < indices.length; i++) {
    const at = indices[i] ?? 0
    target[at] = (target[at] ?? 0) + factor * (values[i] ?? 0)
  }
}
