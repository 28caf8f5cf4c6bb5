import type { System } from '../network/assemble.ts'
import { solvePositiveDefinite } from '../numerics/cholesky.ts'
import { add, cross, dot, subtract } from '../numerics/vector3.ts'
import { endLoads, staticEquilibrium, type StaticLoad } from '../network/statics.ts'
import type { Vec3, Vec6 } from '../project/fields.ts'
import type { MassSummary } from '../results.ts'
import type { LateralStatics, MountStatics, Statics } from '../statics-results.ts'
import { MACHINE, type FittedMount, type PlacedAbsorber } from './machine-network.ts'

/** Statics with the forces that act on the machine's body, for its geometric stiffness. */
export interface MachineStatics {
  readonly statics: Statics
  readonly loads: readonly StaticLoad[]
}

/** The weights that press the machine on its mounts. */
export interface Weights {
  /** of the machine itself, through its centre of gravity */
  readonly own: StaticLoad
  /** of each absorber, at its attachment */
  readonly hung: readonly StaticLoad[]
  /** of the absorbers together, and in all [N] */
  readonly absorbers: number
  readonly total: number
}

export function weightsOf(
  summary: MassSummary,
  gravity: number,
  absorbers: readonly PlacedAbsorber[],
): Weights {
  const absorberWeight = absorbers.reduce((sum, { mass }) => sum + mass * gravity, 0)
  return {
    own: {
      at: { node: MACHINE, position: summary.centreOfGravity },
      force: [0, 0, -summary.mass * gravity],
    },
    hung: absorbers.map<StaticLoad>(({ mass, position }) => ({
      at: { node: MACHINE, position },
      force: [0, 0, -mass * gravity],
    })),
    absorbers: absorberWeight,
    total: summary.mass * gravity + absorberWeight,
  }
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
  const weights = weightsOf(summary, gravity, absorbers)
  const state = staticEquilibrium(system, [weights.own, ...weights.hung])
  if (state === null) return null
  return describeStatics(system, mounts, summary, gravity, weights, {
    displacement: sixOf(state.displacement),
    forces: state.forces,
    shims: null,
    wished: null,
    setting: 'asBuilt',
    iterations: 0,
  })
}

/** A rest position however it was found. */
export interface RestPosition {
  readonly displacement: Vec6
  /** of each mount on the machine [N] */
  readonly forces: readonly Vec3[]
  /** packing under each mount [m]; null: none */
  readonly shims: readonly number[] | null
  /** load at which levelling aims, by mount [N] */
  readonly wished: readonly number[] | null
  readonly setting: Statics['setting']
  readonly iterations: number
}

/**
 * A rest position as results.
 * @param system the machine alone on the stiffness of its mounts where they stand
 */
export function describeStatics(
  system: System,
  mounts: readonly FittedMount[],
  summary: MassSummary,
  gravity: number,
  weights: Weights,
  rest: RestPosition,
): MachineStatics {
  const results = mounts.map((mount, index) => mountStatics(mount, index, rest, summary, gravity))
  const loadSum = results.reduce((sum, { load }) => sum + load, 0)
  return {
    statics: {
      weight: weights.total,
      absorberWeight: weights.absorbers,
      bodyDisplacement: rest.displacement,
      tilt: [rest.displacement[3], rest.displacement[4]],
      mounts: results,
      loadSum,
      loadSumError: Math.abs(loadSum - weights.total) / weights.total,
      elasticCentre: elasticCentre(system.stiffness, system.freedoms.count, summary.centreOfGravity),
      setting: rest.setting,
      iterations: rest.iterations,
      lateral: null,
    },
    loads: [...endLoads(system, rest.forces), ...weights.hung],
  }
}

/** The same statics with what a lateral load does. */
export function withLateral(state: MachineStatics, lateral: LateralStatics): MachineStatics {
  return { ...state, statics: { ...state.statics, lateral } }
}

function mountStatics(
  mount: FittedMount,
  index: number,
  rest: RestPosition,
  summary: MassSummary,
  gravity: number,
): MountStatics {
  const { placed, type, axes } = mount
  const force = rest.forces[index] ?? [0, 0, 0]
  const shim = rest.shims?.[index] ?? 0
  const moved = movedBy(rest.displacement, placed.position, summary.centreOfGravity)
  const deflection = compressionOf(mount, moved, shim)
  const dynamic = mount.dynamicStiffness
  const frequency = (square: number) =>
    square > 0 && Number.isFinite(square) ? Math.sqrt(square) / (2 * Math.PI) : null
  const axialLoad = dot(axes[2], force)
  return {
    id: placed.id,
    load: force[2],
    force,
    displacement: moved,
    deflection,
    ratedShare: type.ratedLoad === null ? null : force[2] / type.ratedLoad,
    limitShare: type.deflectionLimit === null ? null : Math.abs(deflection) / type.deflectionLimit,
    shim,
    wishedLoad: rest.wished?.[index] ?? null,
    staticStiffness: mount.staticStiffness[2],
    dynamicStiffness: [dynamic[0], dynamic[1], dynamic[2]],
    // the deflection says nothing where the load is carried at no deflection, as by a filled air spring
    frequencyByDeflection: mount.law.at(0).force === 0 ? frequency(gravity / deflection) : null,
    frequencyOnLoad: frequency((dynamic[2] * gravity) / axialLoad),
    beyondLaw: mount.law.at(deflection).outside,
  }
}

/** Displacement of a place on the machine [m]. */
export function movedBy(displacement: Vec6, position: Readonly<Vec3>, centre: Readonly<Vec3>): Vec3 {
  const shift: Vec3 = [displacement[0], displacement[1], displacement[2]]
  const turn: Vec3 = [displacement[3], displacement[4], displacement[5]]
  return add(shift, cross(turn, subtract(position, centre)))
}

/** Compression of a mount along its axis when its top moves and its foot stands on packing [m]. */
export function compressionOf({ axes }: FittedMount, moved: Readonly<Vec3>, shim: number): number {
  return -dot(axes[2], moved) + shim * axes[2][2]
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

export function sixOf(vector: Float64Array): Vec6 {
  const at = (i: number) => vector[i] ?? 0
  return [at(0), at(1), at(2), at(3), at(4), at(5)]
}
