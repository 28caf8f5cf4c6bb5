import type { Vec3 } from '../../core/project/fields.ts'
import type { MassProperties } from '../../core/project/machine.ts'
import type { Project } from '../../core/project/project.ts'
import type { Evaluation } from '../../core/results.ts'

export type Axis = 0 | 1 | 2
export const AXIS_INDEX = { x: 0, y: 1, z: 2 } as const

export interface Solid {
  readonly id: string
  readonly name: string
  readonly centre: Vec3
  readonly size: Vec3
  /** axis of a cylinder; null for a box */
  readonly axis: Axis | null
  /** stands for the typed inertia, is no part of the machine */
  readonly equivalent: boolean
}

export interface Mark {
  readonly id: string
  readonly name: string
  readonly position: Vec3
}

export interface Push extends Mark {
  readonly kind: 'rotating' | 'force' | 'moment'
  /** unit vector: of the force, or the axis of moment or rotation */
  readonly direction: Vec3
}

export interface Bounds {
  readonly min: Vec3
  readonly max: Vec3
}

/** From where to where along an axis [m]. */
export type Span = readonly [number, number]

/** What a drawing of the machine shows, in machine axes [m]. */
export interface Scene {
  readonly solids: readonly Solid[]
  readonly centreOfGravity: Vec3 | null
  readonly elasticCentre: Vec3 | null
  readonly shaft: { readonly position: Vec3; readonly axis: Axis; readonly positive: boolean }
  readonly points: readonly Mark[]
  readonly mounts: readonly Mark[]
  readonly pushes: readonly Push[]
  readonly absorbers: readonly (Mark & { readonly direction: Vec3 })[]
  /** what the sheet leaves room for */
  readonly bounds: Bounds
  /** what is really there along each axis, to be dimensioned; null where nothing has a size yet */
  readonly spans: readonly [Span | null, Span | null, Span | null]
}

/** Nothing is drawn smaller than this, so that a single point does not fill the sheet [m]. */
const SMALLEST = 0.3

export function buildScene(project: Project, evaluation: Evaluation | null): Scene {
  const { machine } = project
  const properties = machine.massProperties
  const solids = properties.from === 'parts' ? partSolids(properties) : equivalentSolid(properties)
  const centreOfGravity =
    evaluation?.massSummary?.centreOfGravity ??
    (properties.from === 'typed' && properties.mass !== null ? properties.centreOfGravity : null)
  const shaft = {
    position: machine.shaft.position,
    axis: AXIS_INDEX[machine.shaft.axis],
    positive: machine.shaft.sense === 'positive',
  }
  const bare = {
    solids,
    centreOfGravity,
    elasticCentre: evaluation?.statics?.elasticCentre ?? null,
    shaft,
    points: machine.points,
    mounts: project.mounting.placed,
    pushes: pushesOf(project),
    absorbers: absorbersOf(project),
  }
  return { ...bare, ...boundsOf(bare) }
}

function partSolids(properties: Extract<MassProperties, { from: 'parts' }>): Solid[] {
  return properties.parts.map((part) => {
    const { id, name, centre } = part
    if (part.shape === 'box') return { id, name, centre, size: part.size, axis: null, equivalent: false }
    const axis = AXIS_INDEX[part.axis]
    const size: Vec3 = [part.diameter, part.diameter, part.diameter]
    size[axis] = part.length
    return { id, name, centre, size, axis, equivalent: false }
  })
}

/** The uniform box with the typed mass and moments: a² = 6 (Iyy + Izz - Ixx) / m and so round. */
function equivalentSolid(properties: Extract<MassProperties, { from: 'typed' }>): Solid[] {
  const { mass, centreOfGravity, inertia } = properties
  const { xx, yy, zz } = inertia
  if (mass === null || xx === null || yy === null || zz === null) return []
  const squares = [yy + zz - xx, xx + zz - yy, xx + yy - zz].map((sum) => (6 * sum) / mass)
  if (squares.some((square) => square < 0)) return []
  const [a = 0, b = 0, c = 0] = squares.map(Math.sqrt)
  return [
    {
      id: 'equivalent',
      name: 'uniform box of this inertia',
      centre: centreOfGravity,
      size: [a, b, c],
      axis: null,
      equivalent: true,
    },
  ]
}

function pushesOf(project: Project): Push[] {
  const { shaft } = project.machine
  const along: Vec3 = [0, 0, 0]
  along[AXIS_INDEX[shaft.axis]] = shaft.sense === 'positive' ? 1 : -1
  return project.sources
    .filter((source) => source.enabled)
    .map((source) => ({
      id: source.id,
      name: source.name,
      position: source.position ?? shaft.position,
      kind: source.kind === 'unbalance' ? ('rotating' as const) : source.load.kind,
      direction: source.kind === 'unbalance' ? along : unit(source.load.direction),
    }))
}

function absorbersOf(project: Project): Scene['absorbers'] {
  return project.absorbers.flatMap(({ id, name, enabled, host }) =>
    enabled && host.kind === 'mode'
      ? [{ id, name, position: host.position, direction: unit(host.direction) }]
      : [],
  )
}

function unit(vector: Readonly<Vec3>): Vec3 {
  const length = Math.hypot(...vector)
  return [vector[0] / length, vector[1] / length, vector[2] / length]
}

function boundsOf(scene: Omit<Scene, 'bounds' | 'spans'>): Pick<Scene, 'bounds' | 'spans'> {
  const corners: Vec3[] = scene.solids.flatMap(({ centre, size }) => [
    [centre[0] - size[0] / 2, centre[1] - size[1] / 2, centre[2] - size[2] / 2] as Vec3,
    [centre[0] + size[0] / 2, centre[1] + size[1] / 2, centre[2] + size[2] / 2] as Vec3,
  ])
  const places = [...scene.points, ...scene.mounts, ...scene.pushes, ...scene.absorbers]
  const all: Readonly<Vec3>[] = [...corners, ...places.map((place) => place.position), scene.shaft.position]
  if (scene.centreOfGravity) all.push(scene.centreOfGravity)
  const min: Vec3 = [Infinity, Infinity, Infinity]
  const max: Vec3 = [-Infinity, -Infinity, -Infinity]
  const spans: [Span | null, Span | null, Span | null] = [null, null, null]
  for (const axis of [0, 1, 2] as const) {
    min[axis] = Math.min(...all.map((point) => point[axis]))
    max[axis] = Math.max(...all.map((point) => point[axis]))
    if (max[axis] > min[axis]) spans[axis] = [min[axis], max[axis]]
    const lacking = SMALLEST - (max[axis] - min[axis])
    if (lacking > 0) {
      min[axis] -= lacking / 2
      max[axis] += lacking / 2
    }
  }
  return { bounds: { min, max }, spans }
}
