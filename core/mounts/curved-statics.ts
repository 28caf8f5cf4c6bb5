import type { System } from '../network/assemble.ts'
import { settle, type RestoringSpring, type Settled } from '../network/settle.ts'
import { addScaled } from '../network/statics.ts'
import { placeRow } from '../network/kinematics.ts'
import { add, norm, scale, subtract } from '../numerics/vector3.ts'
import type { Vec3, Vec6 } from '../project/fields.ts'
import type { MassSummary } from '../results.ts'
import type { StaticLoad } from '../network/statics.ts'
import type { FittedMount } from './machine-network.ts'
import { sixOf } from './statics.ts'

type Law = RestoringSpring['law']
/** How a mount resists along one of its local axes. */
interface Resistance {
  readonly axis: Readonly<Vec3>
  readonly law: Law
  readonly usual: number
}

/** A mount along its three local axes, as force against travel along each. */
export function resistances(mount: FittedMount): readonly Resistance[] {
  const sideways =
    (stiffness: number): Law =>
    (travel) => ({ force: stiffness * travel, tangent: stiffness })
  const [x, y, z] = mount.staticStiffness
  return [
    { axis: mount.axes[0], law: sideways(x), usual: x },
    { axis: mount.axes[1], law: sideways(y), usual: y },
    {
      axis: mount.axes[2],
      law: (travel) => {
        // travel along the axis is upwards, compression downwards
        const { force, tangent } = mount.law.at(-travel)
        return { force: -force, tangent }
      },
      usual: z,
    },
  ]
}

/** The machine's mounts as springs on its six freedoms, their feet raised by packing. */
export function mountSprings(
  system: System,
  mounts: readonly FittedMount[],
  shims: readonly number[],
): RestoringSpring[] {
  return mounts.flatMap((mount, index) => {
    const branches = system.elements[index]?.branches ?? []
    return resistances(mount).flatMap(({ axis, law, usual }, direction) => {
      const branch = branches[direction]
      return branch ? [{ row: branch.row, offset: -(shims[index] ?? 0) * axis[2], law, usual }] : []
    })
  })
}

/** Forces that count as large in the six freedoms: the weight, and the weight at the mounts' reach. */
export function forceScale(
  weight: number,
  mounts: readonly FittedMount[],
  summary: MassSummary,
): Float64Array {
  const reach = Math.max(
    1e-3,
    ...mounts.map(({ placed }) => norm(subtract(placed.position, summary.centreOfGravity))),
  )
  return Float64Array.of(weight, weight, weight, weight * reach, weight * reach, weight * reach)
}

/** Static loads as a load on all freedoms of a system. */
export function loadVector(system: System, loads: readonly StaticLoad[]): Float64Array {
  const vector = new Float64Array(system.freedoms.count)
  for (const { at, force } of loads) {
    for (const axis of [0, 1, 2] as const) {
      const unit: Vec3 = [axis === 0 ? 1 : 0, axis === 1 ? 1 : 0, axis === 2 ? 1 : 0]
      addScaled(vector, placeRow(system.freedoms, at, unit), force[axis])
    }
  }
  return vector
}

/**
 * Force of each mount on the machine [N], from what its springs bear: the very forces that were brought
 * to balance.
 * @param borne by each spring, three to a mount, in the order of the mounts
 */
export function mountForces(mounts: readonly FittedMount[], borne: readonly number[]): Vec3[] {
  return mounts.map(({ axes }, index) =>
    axes.reduce<Vec3>(
      (sum, axis, direction) => add(sum, scale(axis, -(borne[3 * index + direction] ?? 0))),
      [0, 0, 0],
    ),
  )
}

export interface CurvedRest {
  readonly settled: Settled
  readonly displacement: Vec6
}

/** Rest position on curved mounts and packing, for loads that do not change. */
export function restOnPacking(
  system: System,
  mounts: readonly FittedMount[],
  shims: readonly number[],
  loads: readonly StaticLoad[],
  weight: number,
  summary: MassSummary,
): CurvedRest {
  const settled = settle({
    springs: mountSprings(system, mounts, shims),
    load: loadVector(system, loads),
    scale: forceScale(weight, mounts, summary),
  })
  return { settled, displacement: sixOf(settled.displacement) }
}
