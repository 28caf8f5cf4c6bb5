import type { System } from '../network/assemble.ts'
import { settle, type RestoringSpring, type Settled } from '../network/settle.ts'
import { addScaled } from '../network/statics.ts'
import { placeRow } from '../network/kinematics.ts'
import { add, norm, scale, subtract } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import type { MassSummary } from '../results.ts'
import type { StaticLoad } from '../network/statics.ts'
import type { FittedMount } from './machine-network.ts'
import { compressionOf, movedBy, sixOf } from './statics.ts'
import type { Vec6 } from '../results.ts'

/** Laws of a mount along its three local axes, as force against travel along the axis. */
export function restoringLaws(mount: FittedMount): readonly [Law, Law, Law] {
  const sideways =
    (stiffness: number): Law =>
    (travel) => ({ force: stiffness * travel, tangent: stiffness })
  const [x, y] = mount.staticStiffness
  return [
    sideways(x),
    sideways(y),
    (travel) => {
      // travel along the axis is upwards, compression downwards
      const { force, tangent } = mount.law.at(-travel)
      return { force: -force, tangent }
    },
  ]
}
type Law = RestoringSpring['law']

/** The machine's mounts as springs on its six freedoms, their feet raised by packing. */
export function mountSprings(
  system: System,
  mounts: readonly FittedMount[],
  shims: readonly number[],
): RestoringSpring[] {
  return mounts.flatMap((mount, index) => {
    const laws = restoringLaws(mount)
    const branches = system.elements[index]?.branches ?? []
    return branches.map(({ row, branch }, direction) => ({
      row,
      offset: -(shims[index] ?? 0) * branch.axis[2],
      law: laws[direction] ?? laws[0],
    }))
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

/** Force of each mount on the machine when it stands displaced [N]. */
export function mountForces(
  mounts: readonly FittedMount[],
  displacement: Vec6,
  shims: readonly number[],
  summary: MassSummary,
): Vec3[] {
  return mounts.map((mount, index) => {
    const shim = shims[index] ?? 0
    const moved = movedBy(displacement, mount.placed.position, summary.centreOfGravity)
    const relative: Vec3 = [moved[0], moved[1], moved[2] - shim]
    const [x, y] = mount.staticStiffness
    const along = (axis: Readonly<Vec3>) =>
      axis[0] * relative[0] + axis[1] * relative[1] + axis[2] * relative[2]
    const pressed = mount.law.at(compressionOf(mount, moved, shim)).force
    return add(
      add(scale(mount.axes[0], -x * along(mount.axes[0])), scale(mount.axes[1], -y * along(mount.axes[1]))),
      scale(mount.axes[2], pressed),
    )
  })
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
