import type { Project } from '../../project/project.ts'
import type { Complex, Evaluation, ResponseResult, SpeedResponse, Sweep } from '../../results.ts'
import { nameOf } from '../names.ts'
import type { Dimension } from '../../units/dimensions.ts'
import { column, figuresColumn, textColumn, writeTable, type Cell, type RawTable } from '../raw-table.ts'
import type { Block } from '../report.ts'
import { NOISE, withoutNoise, type Writer } from '../writer.ts'

const AXES = ['x', 'y', 'z'] as const
/** A report lists this many speeds; the data hold all of them. */
const MOST_SPEEDS = 24

/** Response at the running speed and each further speed, by order, and the highest values of the sweep. */
export function responseBlocks(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  const { response } = evaluation
  if (response === null) return [{ kind: 'paragraph', text: 'The response is not known.' }]
  const listed = response.atSpeeds.slice(0, MOST_SPEEDS)
  const left = response.atSpeeds.length - listed.length
  const blocks: Block[] = [
    writeTable(speedTable(listed), writer),
    ...velocityBlocks(project, listed, response, writer),
    ...strokeBlocks(project, listed, writer),
  ]
  if (left > 0) {
    blocks.push({
      kind: 'paragraph',
      text: `${left} further speeds are left out here; the data hold them all.`,
    })
  }
  const running = listed[0]
  if (running && running.orders.length > 0) blocks.push(writeTable(orderTable(running), writer))
  blocks.push(writeTable(peakTable(project, response, writer), writer))
  return blocks
}

function speedTable(speeds: readonly SpeedResponse[]): RawTable {
  return {
    caption: 'Force into the support (the first line is the running speed)',
    columns: [
      column('Speed', 'shaftSpeed'),
      column('Force ratio', 'ratio'),
      column('Isolation efficiency', 'share'),
      column('Peak force into the support', 'force'),
      column('Hardest shaken mount, peak', 'force'),
    ],
    rows: speeds.map((at): readonly Cell[] => [
      at.speed,
      at.forceRatio,
      at.isolationEfficiency,
      at.supportForce,
      at.mountForces.length === 0 ? null : Math.max(...at.mountForces),
    ]),
  }
}

function velocityBlocks(
  project: Project,
  speeds: readonly SpeedResponse[],
  response: ResponseResult,
  writer: Writer,
): readonly Block[] {
  const { points } = project.machine
  if (points.length === 0) return []
  const rows = speeds.flatMap((at) =>
    points.map((point, index): readonly Cell[] => [at.speed, nameOf(point), ...velocityCells(at, index)]),
  )
  const without = response.runningWithoutAbsorbers
  const bare = without
    ? points.map((point, index): readonly Cell[] => [
        without.speed,
        `${nameOf(point)}, without absorbers`,
        ...velocityCells(without, index),
      ])
    : []
  const table: RawTable = {
    caption: 'Overall RMS velocity of the points',
    columns: [
      column('Speed', 'shaftSpeed'),
      textColumn('Point'),
      ...AXES.map((axis) => column(axis, 'velocity')),
    ],
    rows: [...rows, ...bare],
  }
  return [writeTable(table, writer)]
}

function velocityCells(at: SpeedResponse, index: number): readonly Cell[] {
  const velocity = at.pointVelocity[index]
  return velocity ? withoutNoise(velocity) : [null, null, null]
}

function strokeBlocks(project: Project, speeds: readonly SpeedResponse[], writer: Writer): readonly Block[] {
  const inPlace = absorbersInResponse(project, speeds[0])
  if (inPlace.length === 0) return []
  const table: RawTable = {
    caption: 'Travel of the absorbers against the machine, zero to peak',
    columns: [column('Speed', 'shaftSpeed'), textColumn('Absorber'), column('Travel', 'deflection')],
    rows: speeds.flatMap((at) =>
      inPlace.map((name, index): readonly Cell[] => [at.speed, name, at.strokes[index] ?? null]),
    ),
  }
  return [writeTable(table, writer)]
}

/** Names of the absorbers that take part, in the order of the strokes. */
export function absorbersInResponse(project: Project, at: SpeedResponse | undefined): readonly string[] {
  const ids = at?.orders[0]?.absorbers.map((absorber) => absorber.id)
  const found = ids
    ? ids.flatMap((id) => project.absorbers.find((absorber) => absorber.id === id) ?? [])
    : project.absorbers.filter((absorber) => absorber.enabled && absorber.host.kind === 'mode')
  return found.slice(0, at?.strokes.length ?? 0).map(nameOf)
}

function orderTable(at: SpeedResponse): RawTable {
  return {
    caption: 'By order at the running speed (peak values)',
    columns: [
      column('Order', 'ratio'),
      column('Frequency', 'frequency'),
      column('Exciting force', 'force'),
      column('Exciting moment about the centre of gravity', 'moment'),
      column('Force into the support', 'force'),
    ],
    rows: at.orders.map((order): readonly Cell[] => [
      order.order,
      order.frequency,
      peakResultant(order.excitation.slice(0, 3)),
      peakResultant(order.excitation.slice(3)),
      peakResultant(order.support),
    ]),
  }
}

/**
 * Largest length that a vector of complex amplitudes F reaches in a cycle: the semi-major axis of
 * its ellipse, sqrt((|F|² + |F·F|) / 2) with F·F the sum of squares without conjugation.
 */
export function peakResultant(vector: readonly Complex[]): number {
  let size = 0
  let re = 0
  let im = 0
  for (const part of vector) {
    size += part.re ** 2 + part.im ** 2
    re += part.re ** 2 - part.im ** 2
    im += 2 * part.re * part.im
  }
  return Math.sqrt((size + Math.hypot(re, im)) / 2)
}

interface Watched {
  readonly label: string
  readonly dimension: Dimension
  readonly pick: (sweep: Sweep) => Float64Array | null
}

/** Highest values over the whole sweep and where they stand, with and without absorbers. */
function peakTable(project: Project, response: ResponseResult, writer: Writer): RawTable {
  const watched: readonly Watched[] = [
    { label: 'Force ratio', dimension: 'ratio', pick: (sweep) => sweep.forceRatio },
    { label: 'Force into the support, peak', dimension: 'force', pick: (sweep) => sweep.supportForce },
    ...project.machine.points.flatMap((point, index) =>
      AXES.map((axis, direction): Watched => ({
        label: `RMS velocity of ${nameOf(point)}, ${axis}`,
        dimension: 'velocity',
        pick: (sweep) => sweep.pointVelocity[index]?.[direction] ?? null,
      })),
    ),
  ]
  const bare = response.sweepWithoutAbsorbers
  const still =
    NOISE *
    Math.max(
      0,
      ...watched.map(({ dimension, pick }) =>
        dimension === 'velocity' ? (highest(response.sweep, pick(response.sweep))?.value ?? 0) : 0,
      ),
    )
  const cells = (sweep: Sweep, { dimension, pick }: Watched): readonly Cell[] => {
    const top = highest(sweep, pick(sweep))
    if (top !== null && dimension === 'velocity' && top.value < still)
      return [writer.quantity(0, dimension), '']
    return [writer.quantity(top?.value, dimension), writer.quantity(top?.speed, 'shaftSpeed')]
  }
  return {
    caption: 'Highest values over every speed of the chart',
    columns: [
      textColumn('Quantity'),
      figuresColumn('Highest'),
      figuresColumn('at'),
      ...(bare ? [figuresColumn('Without absorbers'), figuresColumn('at')] : []),
    ],
    rows: watched.map((quantity) => [
      quantity.label,
      ...cells(response.sweep, quantity),
      ...(bare ? cells(bare, quantity) : []),
    ]),
  }
}

interface Highest {
  readonly value: number
  readonly speed: number
}

function highest(sweep: Sweep, curve: Float64Array | null): Highest | null {
  let best: Highest | null = null
  for (const [index, value] of curve?.entries() ?? []) {
    const speed = sweep.speed[index]
    if (speed !== undefined && (best === null || value > best.value)) best = { value, speed }
  }
  return best
}
