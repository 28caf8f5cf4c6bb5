import { turnedAxes, unit, MACHINE_AXES, scale, type Matrix3 } from '../numerics/vector3.ts'
import { lineSpringDamper, springDamper } from '../network/elements.ts'
import { GROUND, type Network, type NetworkElement } from '../network/network.ts'
import type { Vec3 } from '../project/fields.ts'
import type { MountType, PlacedMount } from '../project/mounts.ts'
import type { Project } from '../project/project.ts'
import type { MassSummary } from '../results.ts'

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
  readonly type: MountType
  readonly axes: Matrix3
}

/** Every placed mount with its type. A mount whose type is unknown is refused on reading. */
export function fittedMounts(project: Project): readonly FittedMount[] {
  const types = new Map(project.mounting.types.map((type) => [type.id, type]))
  return project.mounting.placed.flatMap((placed) => {
    const type = types.get(placed.type)
    if (!type) return []
    const axes = placed.tilt === null ? MACHINE_AXES : turnedAxes(placed.tilt.axis, placed.tilt.angle)
    return [{ placed, type, axes }]
  })
}

/**
 * The machine on its mounts as a network, with any absorbers on it. The mounts come first among the
 * elements, in the order of `mounting.placed`; the absorbers' springs follow.
 * @param state static: the mounts' static stiffness, no damping; dynamic: stiffness times the
 *   dynamic-to-static ratio, loss factor and viscous damping
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

function mountElement({ placed, type, axes }: FittedMount, state: 'static' | 'dynamic'): NetworkElement {
  const ends = {
    id: placed.id,
    from: { node: GROUND.id, position: placed.position },
    to: { node: MACHINE, position: placed.position },
  }
  if (state === 'static') {
    return springDamper(ends, { stiffness: type.stiffness, viscous: [0, 0, 0], lossFactor: 0 }, axes)
  }
  return springDamper(
    ends,
    {
      stiffness: scale(type.stiffness, type.dynamicRatio),
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
