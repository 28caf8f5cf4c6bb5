import { groupByOrder, type SourceLoad } from '../excitation/order-loads.ts'
import type { Observed } from '../excitation/observed.ts'
import { knownLoads, ordersOf } from '../excitation/project-loads.ts'
import { sweepResponse } from '../excitation/sweep.ts'
import { InputError } from '../errors.ts'
import { install } from '../mounts/installation.ts'
import { placedAbsorbers } from '../mounts/placed-absorbers.ts'
import type { Project } from '../project/project.ts'
import type { SpeedSpan } from '../project/requirements.ts'
import type { Evaluation, MassSummary, Problem, Verdict } from '../results.ts'
import { judgedOf } from '../runup/judged.ts'
import { runUpOf } from '../runup/run-up.ts'
import { judge } from '../verdict/judge.ts'
import type { Computed } from '../verdict/verdict.ts'
import { modalRatio, mountDamping, withDampingTimes, type MountDamping } from './damping-scale.ts'
import { isDamped, withDampingToScale, withMountsTimes } from './mount-trial.ts'
import { cellBetween, takeOver } from './map-refinement.ts'
import { referenceMode } from './reference-mode.ts'
import { slimSpeeds } from './slim-speeds.ts'

export interface FeasibilityGrid {
  /** natural frequencies of the reference mode, rising [Hz] */
  readonly frequencies: readonly number[]
  /** its damping ratios, rising */
  readonly ratios: readonly number[]
}

/** Margins over the map; cell of frequency i and ratio j at j · frequencies + i. */
export interface FeasibilityCells {
  /** share of the limit, negative where it fails; 0 where not known */
  readonly margin: Float64Array
  /** 0 not known, 1 fails, 2 near, 3 passes */
  readonly status: Uint8Array
}

export interface FeasibilityLayer extends FeasibilityCells {
  /** id */
  readonly requirement: string
  readonly title: string
}

/**
 * How every requirement fares on mounts of other stiffness and damping: all mounts scaled alike so that
 * the reference mode (the machine's vertical motion, without absorbers) has the natural frequency across
 * and the damping ratio up. Absorbers stay as they are.
 */
export interface FeasibilityMap {
  readonly frequencies: Float64Array
  readonly ratios: Float64Array
  readonly layers: readonly FeasibilityLayer[]
  /** the worst requirement; not known where any is */
  readonly worst: FeasibilityCells
  /** stiffness of all mounts over that of the project, by frequency */
  readonly stiffness: Float64Array
  /** damping over that of the project (over a loss factor of 1 where it has none), by cell; 0 where not known */
  readonly damping: Float64Array
  /** 1 where the cell was computed, 0 where it lies among equals of a coarser map and was filled in */
  readonly computed: Uint8Array
  /** where the project itself stands */
  readonly present: { readonly frequency: number; readonly ratio: number }
  /** scaled: the mounts' own damping; lossFactor: they have none, and one loss factor is given to all */
  readonly dampingBy: 'scaled' | 'lossFactor'
}

const STATUS = { unknown: 0, fail: 1, near: 2, pass: 3 } as const satisfies Record<Verdict['status'], number>

/** Stiffness is found from frequency to this share. */
const FREQUENCY_ROUNDING = 1e-6
const MOST_TRIES = 12

/** What every cell shares. */
interface Ground {
  /** with a damping to scale */
  readonly project: Project
  readonly evaluation: Evaluation
  readonly summary: MassSummary
  readonly orders: readonly number[]
  readonly loads: readonly SourceLoad[] | null
  readonly spans: ReadonlySet<SpeedSpan>
  readonly present: { readonly frequency: number; readonly ratio: number }
  readonly dampingBy: FeasibilityMap['dampingBy']
}

/**
 * The feasibility map on a grid.
 * @param evaluation of the project, for its absorbers and what does not change over the map
 * @param previous a coarser map of the same project: its cells are taken over where the grids meet, and where
 *   every requirement fares alike in all the cells around, the margins between are filled in
 * @throws InputError when the grid is empty, does not rise or is not above zero
 */
export function feasibilityMap(
  project: Project,
  grid: FeasibilityGrid,
  evaluation: Evaluation,
  previous: FeasibilityMap | null = null,
): { readonly map: FeasibilityMap | null; readonly problems: readonly Problem[] } {
  requireRising('grid.frequencies', grid.frequencies)
  requireRising('grid.ratios', grid.ratios)
  const ground = groundOf(project, evaluation)
  if ('problems' in ground) return { map: null, problems: ground.problems }
  return { map: mapOn(ground, grid, previous), problems: [] }
}

function requireRising(field: string, values: readonly number[]): void {
  if (values.length === 0) throw new InputError(field, values.length, 'needs at least one value')
  values.forEach((value, i) => {
    if (value > (values[i - 1] ?? 0) && Number.isFinite(value)) return
    throw new InputError(`${field}[${i}]`, value, 'must be above 0 and rise')
  })
}

function groundOf(
  project: Project,
  evaluation: Evaluation,
): Ground | { readonly problems: readonly Problem[] } {
  const summary = evaluation.massSummary
  if (summary === null) return { problems: evaluation.problems }
  const trial = withDampingToScale(project)
  const orders = ordersOf(project)
  const { observed, problems } = install(trial, summary, [], orders)
  if (observed === null) return { problems }
  const mode = referenceMode(observed)
  const ratio = modalRatio(observed, mode.index)
  if (!(ratio > 0)) {
    const message = 'The mounts do not damp vertical motion: there is nothing to scale.'
    return { problems: [{ field: 'mounting.types', message, kind: 'invalid' }] }
  }
  const damped = isDamped(project)
  return {
    project: trial,
    evaluation,
    summary,
    orders,
    loads: knownLoads(trial, summary.centreOfGravity, []),
    spans: new Set(
      project.requirements.flatMap((requirement) =>
        requirement.enabled && 'speeds' in requirement ? [requirement.speeds] : [],
      ),
    ),
    present: { frequency: mode.frequency, ratio: damped ? ratio : 0 },
    dampingBy: damped ? 'scaled' : 'lossFactor',
  }
}

function mapOn(ground: Ground, grid: FeasibilityGrid, previous: FeasibilityMap | null): FeasibilityMap {
  const frequencies = Float64Array.from(grid.frequencies)
  const ratios = Float64Array.from(grid.ratios)
  const cells = frequencies.length * ratios.length
  const empty = (): FeasibilityCells => ({ margin: new Float64Array(cells), status: new Uint8Array(cells) })
  const judged = ground.project.requirements.filter(({ enabled }) => enabled)
  const titles = new Map(ground.evaluation.verdicts.map(({ requirement, title }) => [requirement, title]))
  const map: FeasibilityMap = {
    frequencies,
    ratios,
    layers: judged.map(({ id }) => ({ requirement: id, title: titles.get(id) ?? '', ...empty() })),
    worst: empty(),
    stiffness: new Float64Array(frequencies.length),
    damping: new Float64Array(cells),
    computed: new Uint8Array(cells),
    present: ground.present,
    dampingBy: ground.dampingBy,
  }
  frequencies.forEach((frequency, i) => {
    const column = columnAt(ground, frequency)
    map.stiffness[i] = column.stiffness
    ratios.forEach((ratio, j) => {
      const at = j * frequencies.length + i
      map.damping[at] = column.ratio > 0 ? ratio / column.ratio : 0
      const known = previous === null ? null : cellBetween(previous, frequency, ratio)
      if (known !== null && previous !== null && takeOver(map, previous, at, known)) return
      map.computed[at] = 1
      fillCell(map, ground, column, at)
    })
  })
  return map
}

/** Everything of one natural frequency; null parts where the machine cannot stand on such mounts. */
interface Column {
  readonly stiffness: number
  readonly computed: Computed
  readonly damping: MountDamping | null
  /** of the reference mode with the project's damping on these mounts */
  readonly ratio: number
}

function columnAt(ground: Ground, frequency: number): Column {
  const { project, summary, orders, evaluation } = ground
  const { stiffness, observed, problems } = mountsFor(ground, frequency)
  const scaled = withMountsTimes(project, stiffness, 1)
  const placed = placedAbsorbers(project, evaluation.absorbers)
  const bare = install(scaled, summary, [], orders)
  const full = placed.length === 0 || bare.modes === null ? null : install(scaled, summary, placed, orders)
  const standing = (full ?? bare).observed
  return {
    stiffness,
    computed: {
      ...evaluation,
      problems,
      statics: full?.statics ?? bare.statics,
      modes: bare.modes,
      modesWithAbsorbers: full?.modes ?? null,
      response: null,
      runUp: null,
    },
    damping: standing === null ? null : mountDamping(standing),
    ratio: observed === null ? 0 : modalRatio(observed, referenceMode(observed).index),
  }
}

/** Scales the mounts until the reference mode has the wanted frequency: as its square, then by secants. */
function mountsFor(
  { project, summary, orders, present }: Ground,
  frequency: number,
): { readonly stiffness: number; readonly observed: Observed | null; readonly problems: readonly Problem[] } {
  let stiffness = (frequency / present.frequency) ** 2
  // log frequency grows half as fast as log stiffness but for the weight's own stiffness
  let slope = 0.5
  let before: { readonly x: number; readonly y: number } | null = null
  let last = install(withMountsTimes(project, stiffness, 1), summary, [], orders)
  for (let round = 0; round < MOST_TRIES && last.observed !== null; round++) {
    const off = Math.log(referenceMode(last.observed).frequency / frequency)
    if (Math.abs(off) < FREQUENCY_ROUNDING) break
    const x = Math.log(stiffness)
    if (before !== null && x !== before.x) slope = Math.max(0.05, (off - before.y) / (x - before.x))
    before = { x, y: off }
    stiffness = Math.exp(x - Math.max(-2, Math.min(2, off / slope)))
    last = install(withMountsTimes(project, stiffness, 1), summary, [], orders)
  }
  return { stiffness, observed: last.observed, problems: last.problems }
}

function fillCell(map: FeasibilityMap, ground: Ground, column: Column, at: number): void {
  const damping = map.damping[at] ?? 0
  const verdicts = judge(
    withMountsTimes(ground.project, column.stiffness, damping),
    computedCell(ground, column, damping),
  )
  let worst = Infinity
  let status: number = verdicts.length === 0 ? STATUS.unknown : STATUS.pass
  map.layers.forEach((layer) => {
    const verdict = verdicts.find(({ requirement }) => requirement === layer.requirement)
    const margin = verdict?.margin ?? null
    layer.margin[at] = margin ?? 0
    layer.status[at] = verdict && margin !== null ? STATUS[verdict.status] : STATUS.unknown
    worst = Math.min(worst, margin ?? Infinity)
    status = Math.min(status, layer.status[at] ?? STATUS.unknown)
  })
  map.worst.margin[at] = Number.isFinite(worst) ? worst : 0
  map.worst.status[at] = status
}

/** What the judge needs of a cell: the column with this damping in its response. */
function computedCell(ground: Ground, { computed, damping, stiffness }: Column, factor: number): Computed {
  const { loads } = ground
  if (damping === null || loads === null || !(factor > 0)) return computed
  const observed = withDampingTimes(damping, factor)
  const modes = computed.modesWithAbsorbers ?? computed.modes ?? []
  const ratios = modes.map((_, r) => modalRatio(observed, r))
  const speeds = slimSpeeds(ground.project, modes, ratios, ground.spans)
  const response =
    speeds === null || ground.spans.size === 0
      ? null
      : {
          atSpeeds: [],
          sweep: sweepResponse(observed, groupByOrder(loads), speeds),
          sweepWithoutAbsorbers: null,
          runningWithoutAbsorbers: null,
        }
  const wanted = ground.project.runUp.enabled ? judgedOf(ground.project) : null
  const project = withMountsTimes(ground.project, stiffness, factor)
  const runUp = wanted === null ? null : runUpOf(project, observed, loads, wanted).result
  return { ...computed, response, runUp }
}

/** The project on the mounts of a cell: what the map says there is what `evaluate` says of it. */
export function projectAt(project: Project, map: FeasibilityMap, i: number, j: number): Project {
  const stiffness = map.stiffness[i] ?? 1
  const damping = map.damping[j * map.frequencies.length + i] ?? 1
  return withMountsTimes(withDampingToScale(project), stiffness, damping)
}
