import type { System } from '../network/assemble.ts'
import { solvePositiveDefinite } from '../numerics/cholesky.ts'
import { add, cross, dot, subtract } from '../numerics/vector3.ts'
import { endLoads, staticEquilibrium, type StaticLoad } from '../network/statics.ts'
import type { Vec3 } from '../project/fields.ts'
import type { MassSummary, MountStatics, Statics, Vec6 } from '../results.ts'
import { MACHINE, type FittedMount, type PlacedAbsorber } from './machine-network.ts'

/** Statics with the forces that act on the machine's body, for its geometric stiffness. */
export interface MachineStatics {
  readonly statics: Statics
  readonly loads: readonly StaticLoad[]
}

/**
 * How the machine stands: linear mounts, small displacements, its weight along -z through the centre
 * of gravity and the weight of each absorber at its attachment.
 * @param system the machine alone on the static stiffness of its mounts
 * @returns null when the mounts leave it free to move
 */
export function machineStatics(
  system: System,
  mounts: readonly FittedMount[],
  summary: MassSummary,
  gravity: number,
  absorbers: readonly PlacedAbsorber[] = [],
): MachineStatics | null {
  const ownWeight: StaticLoad = {
    at: { node: MACHINE, position: summary.centreOfGravity },
    force: [0, 0, -summary.mass * gravity],
  }
  const hung = absorbers.map<StaticLoad>(({ mass, position }) => ({
    at: { node: MACHINE, position },
    force: [0, 0, -mass * gravity],
  }))
  const state = staticEquilibrium(system, [ownWeight, ...hung])
  if (state === null) return null
  const displacement = sixOf(state.displacement)
  const absorberWeight = absorbers.reduce((sum, { mass }) => sum + mass * gravity, 0)
  const weight = summary.mass * gravity + absorberWeight
  const results = mounts.map((mount, index) =>
    mountStatics(mount, state.forces[index] ?? [0, 0, 0], displacement, summary.centreOfGravity),
  )
  const loadSum = results.reduce((sum, { load }) => sum + load, 0)
  return {
    statics: {
      weight,
      absorberWeight,
      bodyDisplacement: displacement,
      tilt: [displacement[3], displacement[4]],
      mounts: results,
      loadSum,
      loadSumError: Math.abs(loadSum - weight) / weight,
      elasticCentre: elasticCentre(system.stiffness, system.freedoms.count, summary.centreOfGravity),
    },
    loads: [...endLoads(system, state.forces), ...hung],
  }
}

function mountStatics(
  { placed, type, axes }: FittedMount,
  force: Vec3,
  displacement: Vec6,
  centre: Readonly<Vec3>,
): MountStatics {
  const shift: Vec3 = [displacement[0], displacement[1], displacement[2]]
  const turn: Vec3 = [displacement[3], displacement[4], displacement[5]]
  const moved = add(shift, cross(turn, subtract(placed.position, centre)))
  const deflection = -dot(axes[2], moved)
  return {
    id: placed.id,
    load: force[2],
    force,
    displacement: moved,
    deflection,
    ratedShare: type.ratedLoad === null ? null : force[2] / type.ratedLoad,
    limitShare: type.deflectionLimit === null ? null : Math.abs(deflection) / type.deflectionLimit,
  }
}

/**
 * The point through which a force shifts the machine without turning it. Shift alone, without
 * rotation, needs the moment M = K_rt K_tt⁻¹ F about the centre of gravity, which a vertical force
 * has at p when p x F = M. A vertical force does not tell the height; that is taken from the two
 * horizontal forces, in the mean where they differ.
 */
function elasticCentre(stiffness: Float64Array, n: number, centre: Readonly<Vec3>): Vec3 | null {
  const block = Float64Array.from({ length: 9 }, (_, at) => stiffness[Math.floor(at / 3) * n + (at % 3)] ?? 0)
  const momentOfUnit = (axis: 0 | 1 | 2): Vec3 | null => {
    const force = [0, 0, 0]
    force[axis] = 1
    const shift = solvePositiveDefinite(block, force)
    if (shift === null) return null
    const row = (i: number) =>
      [0, 1, 2].reduce((sum, j) => sum + (stiffness[(3 + i) * n + j] ?? 0) * (shift[j] ?? 0), 0)
    return [row(0), row(1), row(2)]
  }
  const [alongX, alongY, alongZ] = [momentOfUnit(0), momentOfUnit(1), momentOfUnit(2)]
  if (alongX === null || alongY === null || alongZ === null) return null
  const height = (alongX[1] - alongY[0]) / 2
  return add(centre, [-alongZ[1], alongZ[0], height])
}

function sixOf(vector: Float64Array): Vec6 {
  const at = (i: number) => vector[i] ?? 0
  return [at(0), at(1), at(2), at(3), at(4), at(5)]
}
