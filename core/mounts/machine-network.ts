import { turnedAxes, unit, MACHINE_AXES, type Matrix3 } from '../numerics/vector3.ts'
import { lineSpringDamper, springDamper } from '../network/elements.ts'
import { GROUND, type Network, type NetworkElement } from '../network/network.ts'
import type { Vec3 } from '../project/fields.ts'
import type { MountType, PlacedMount } from '../project/mounts.ts'
import type { Project } from '../project/project.ts'
import type { MassSummary, Problem } from '../results.ts'
import type { AxialLaw } from './axial-law.ts'
import { effectiveMountType } from './mount-type.ts'

export const MACHINE = 'machine'
const absorberNode = (id: string) => `absorber ${id}`

/** An absorber with its values, at its place on the machine. */
export interface PlacedAbsorber {
  readonly id: string
  /** [kg] */
  readonly mass: number
  /** [N/m] */
  readonly stiffness: number
  /** [N s/m] */
  readonly damping: number
  /** where it is fixed, from the datum [m] */
  readonly position: Readonly<Vec3>
  /** line of travel, any length but zero */
  readonly direction: Readonly<Vec3>
}

/** A placed mount with its type and local axes (one row each, in machine axes). */
export interface FittedMount {
  readonly placed: PlacedMount
  /** with what its design or curve amounts to in the places of stiffness and limits */
  readonly type: MountType
  readonly axes: Matrix3
  /** static law along local z */
  readonly law: AxialLaw
  /** along the local axes, axially at the working point once that is known [N/m] */
  readonly staticStiffness: Readonly<Vec3>
  readonly dynamicStiffness: Readonly<Vec3>
}

/** Every placed mount with its type. A mount whose type is unknown is refused on reading. */
export function fittedMounts(project: Project): readonly FittedMount[] {
  return fitMounts(project).mounts
}

/** The mounts, what there is to say about their types, and whether each of them can carry a machine. */
export function fitMounts(project: Project): {
  readonly mounts: readonly FittedMount[]
  readonly problems: readonly Problem[]
  readonly usable: boolean
} {
  const { gravity, temperature } = project.analysis
  const inUse = new Set(project.mounting.placed.map(({ type }) => type))
  const types = project.mounting.types.flatMap((type, index) =>
    inUse.has(type.id) ? [{ index, effective: effectiveMountType(type, { gravity, temperature }) }] : [],
  )
  const byId = new Map(types.map(({ effective }) => [effective.type.id, effective]))
  const mounts = project.mounting.placed.flatMap((placed) => {
    const effective = byId.get(placed.type)
    if (!effective) return []
    const { type, law, dynamicStiffness } = effective
    const axes = placed.tilt === null ? MACHINE_AXES : turnedAxes(placed.tilt.axis, placed.tilt.angle)
    return [{ placed, type, axes, law, staticStiffness: type.stiffness, dynamicStiffness }]
  })
  return {
    mounts,
    problems: types.flatMap(({ index, effective }) =>
      effective.problems.map((problem) => ({
        ...problem,
        field: `mounting.types[${index}].${problem.field}`,
      })),
    ),
    usable: types.every(({ effective }) => effective.usable),
  }
}

/** The mount with the stiffness that it has at a compression along its axis [m]. */
export function atWorkingPoint(mount: FittedMount, compression: number): FittedMount {
  if (mount.law.linear) return mount
  const { tangent, dynamic } = mount.law.at(compression)
  const { staticStiffness: rest, dynamicStiffness: moving } = mount
  return {
    ...mount,
    staticStiffness: [rest[0], rest[1], tangent],
    dynamicStiffness: [moving[0], moving[1], dynamic],
  }
}

/**
 * The machine on its mounts as a network, with any absorbers on it. The mounts come first among the
 * elements, in the order of `mounting.placed`; the absorbers' springs follow.
 * @param state static: the mounts' static stiffness, no damping; dynamic: their stiffness of vibration,
 *   loss factor and viscous damping
 */
export function machineNetwork(
  mounts: readonly FittedMount[],
  summary: MassSummary,
  state: 'static' | 'dynamic',
  absorbers: readonly PlacedAbsorber[] = [],
): Network {
  return {
    nodes: [
      GROUND,
      {
        kind: 'body',
        id: MACHINE,
        mass: summary.mass,
        centre: summary.centreOfGravity,
        inertia: summary.inertia,
      },
      ...absorbers.map(({ id, mass, direction }) => ({
        kind: 'line' as const,
        id: absorberNode(id),
        mass,
        direction: unit(direction),
      })),
    ],
    elements: [
      ...mounts.map((mount) => mountElement(mount, state)),
      ...absorbers.map((absorber) => absorberElement(absorber)),
    ],
  }
}

function mountElement(mount: FittedMount, state: 'static' | 'dynamic'): NetworkElement {
  const { placed, type, axes } = mount
  const ends = {
    id: placed.id,
    from: { node: GROUND.id, position: placed.position },
    to: { node: MACHINE, position: placed.position },
  }
  if (state === 'static') {
    return springDamper(ends, { stiffness: mount.staticStiffness, viscous: [0, 0, 0], lossFactor: 0 }, axes)
  }
  return springDamper(
    ends,
    {
      stiffness: mount.dynamicStiffness,
      viscous: type.viscous,
      lossFactor: type.lossFactor,
    },
    axes,
  )
}

function absorberElement({ id, stiffness, damping, position, direction }: PlacedAbsorber): NetworkElement {
  return lineSpringDamper(
    {
      id: absorberNode(id),
      from: { node: MACHINE, position },
      to: { node: absorberNode(id), position },
    },
    unit(direction),
    { stiffness, viscous: damping, lossFactor: 0 },
  )
}

/** Name of a mount as marked on the plan. */
export function mountName(placed: PlacedMount): string {
  return placed.name || placed.id
}
