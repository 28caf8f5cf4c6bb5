import { responseAtSpeeds } from '../excitation/at-speeds.ts'
import { steadyPart } from '../network/laws.ts'
import { groupByOrder } from '../excitation/order-loads.ts'
import type { Observed } from '../excitation/observed.ts'
import { InputError } from '../errors.ts'
import { install } from '../mounts/installation.ts'
import type { Vec3 } from '../project/fields.ts'
import type { Project } from '../project/project.ts'
import type { AbsorberResult, Problem, RunUpPass } from '../results.ts'
import { prepare, type Prepared } from '../runup/prepared.ts'
import { runUpOf, steadyValues, type RunUpScope } from '../runup/run-up.ts'
import { mountDamping, modalRatio, withDampingTimes, type MountDamping } from './damping-scale.ts'
import { isDamped, withDampingToScale } from './mount-trial.ts'
import { referenceMode } from './reference-mode.ts'

/** What must stay within what, and when. */
export interface Clearance {
  readonly place: 'mounts' | 'point'
  /** id of the point, with place `point` */
  readonly point: string | null
  readonly direction: 'resultant' | 'x' | 'y' | 'z'
  /** steady: the largest steady value from rest to the highest operating speed */
  readonly during: 'both' | 'up' | 'down' | 'steady'
  /** zero to peak [m] */
  readonly limit: number
}

/** A mounting with one amount of damping in its mounts. */
export interface DampedMounting {
  /** times the damping that the mounts have now; of a loss factor of 1 where they have none */
  readonly factor: number
  /** that the mounts give the reference mode (the machine's vertical motion, without absorbers) */
  readonly dampingRatio: number
  readonly types: readonly {
    readonly id: string
    readonly lossFactor: number
    /** local axes [N s/m] */
    readonly viscous: Vec3
    /** viscous coefficient that dissipates as much at the reference mode, local axes [N s/m] */
    readonly equivalentViscous: Vec3
  }[]
  /** largest displacement of what is watched [m]; null where a resonance without damping leaves it no bound */
  readonly peak: number | null
  /** at the running speed: resultant into the support over the exciting force, and itself [N]; null where not known */
  readonly forceRatio: number | null
  readonly isolationEfficiency: number | null
  readonly supportForce: number | null
}

export interface DampingNeed {
  /** found: the least damping; none: the clearance holds without any; outOfReach: not even critical damping does it */
  readonly outcome: 'found' | 'none' | 'outOfReach'
  /** by vertical motion [Hz] */
  readonly referenceFrequency: number
  /** as the mounts are */
  readonly present: DampedMounting
  /** with the least damping (critical where that is not enough) */
  readonly needed: DampedMounting
  readonly converged: boolean
  readonly iterations: number
  /** peak over clearance less 1 */
  readonly residual: number
}

/** Damping is searched upwards from this share of critical in steps of this factor, then halved between. */
const LEAST_RATIO = 5e-4
const STEP = 1.5
const MOST_ROUNDS = 60
/** To how near the clearance the peak is brought. */
const NEAR_ENOUGH = 1e-4
/** Peaks are searched a little closer than that. */
const PEAK_TOLERANCE = 5e-5

/**
 * The least damping with which a passage through the resonances (or the steady motion over the same
 * speeds) keeps a clearance, all mounts' damping scaled alike, and what it costs in isolation.
 * @param absorbers as designed, from `evaluate`; they stay as they are
 * @throws InputError when the clearance is not above zero or the point is not of this project
 */
export function dampingNeed(
  project: Project,
  clearance: Clearance,
  absorbers: readonly AbsorberResult[],
): { readonly need: DampingNeed | null; readonly problems: readonly Problem[] } {
  if (!(clearance.limit > 0) || !Number.isFinite(clearance.limit)) {
    throw new InputError('clearance.limit', clearance.limit, 'must be greater than 0 m')
  }
  if (clearance.place === 'point' && !project.machine.points.some(({ id }) => id === clearance.point)) {
    throw new InputError('clearance.point', clearance.point, 'must be the id of a point of this project')
  }
  const trial = withDampingToScale(project)
  const found = prepare(trial, absorbers)
  if ('problems' in found) return { need: null, problems: found.problems }
  const { prepared } = found
  const search = searchOf(trial, prepared, clearance)
  const atPresent = search.peak(isDamped(project) ? 1 : 0)
  if (atPresent === null) return { need: null, problems: search.problems() }
  return { need: leastDamping(project, trial, prepared, search, clearance.limit), problems: [] }
}

interface DampingSearch {
  readonly damping: MountDamping
  /** largest displacement with the mounts' damping times a factor; null where it is not known, Infinity where it has no bound */
  readonly peak: (factor: number) => number | null
  readonly problems: () => readonly Problem[]
}

const DIRECTIONS = ['x', 'y', 'z', 'resultant'] as const

function searchOf(project: Project, { observed, loads }: Prepared, clearance: Clearance): DampingSearch {
  const damping = mountDamping(observed)
  const steady = clearance.during === 'steady'
  const scope: RunUpScope = {
    envelope: false,
    force: false,
    strokes: false,
    travel: clearance.place === 'mounts',
    points: new Set(clearance.place === 'point' && clearance.point !== null ? [clearance.point] : []),
    up: clearance.during !== 'down',
    down: clearance.during !== 'up',
    tolerance: PEAK_TOLERANCE,
    worstOnly: true,
    directions: DIRECTIONS.map((direction) => direction === clearance.direction),
  }
  let problems: readonly Problem[] = []
  const passing = (factor: number): readonly number[] => {
    const { result, problems: said } = runUpOf(project, withDampingTimes(damping, factor), loads, scope)
    problems = said
    return [result.up, result.down].flatMap((pass) => (pass === null ? [] : watchedPeaks(pass, clearance)))
  }
  const range = steady ? speedsPassed(project) : null
  const standing = (factor: number): readonly number[] => {
    if (range === null) return []
    const values = steadyValues(project, withDampingTimes(damping, factor), loads, scope, range)
    if (values === null) return []
    const q = DIRECTIONS.indexOf(clearance.direction)
    const all =
      clearance.place === 'mounts'
        ? values.mounts.map(({ travel }) => travel)
        : values.points.map((one) => one.values)
    return all.map((one) => one[q] ?? 0)
  }
  return {
    damping,
    peak: (factor) => {
      const peaks = steady ? standing(factor) : passing(factor)
      return peaks.length === 0 ? null : Math.max(...peaks)
    },
    problems: () =>
      problems.length > 0
        ? problems
        : [{ field: 'runUp', message: 'Say how the shaft comes to speed or to rest.', kind: 'missing' }],
  }
}

/** From rest to the highest speed that the machine runs at; null where it names none. */
function speedsPassed({ machine: { duty } }: Project): readonly [number, number] | null {
  const highest = Math.max(duty.runningSpeed ?? 0, duty.highestSpeed ?? 0, duty.lowestSpeed ?? 0)
  return highest > 0 ? [0, highest] : null
}

function watchedPeaks(pass: RunUpPass, { place, direction }: Clearance): readonly number[] {
  const peaks =
    place === 'mounts' ? pass.mounts.map(({ travel }) => travel) : pass.points.map((one) => one.peaks)
  return peaks.map((one) => one[direction].value)
}

function leastDamping(
  project: Project,
  trial: Project,
  prepared: Prepared,
  search: DampingSearch,
  limit: number,
): DampingNeed {
  const mode = referenceOf(trial, prepared)
  const unit = largestRatio(search.damping)
  const peakAt = (factor: number) => search.peak(factor) ?? Infinity
  const describe = (factor: number) => dampedMounting(trial, prepared, search, mode, factor, peakAt(factor))
  const present = describe(isDamped(project) ? 1 : 0)
  const base = { referenceFrequency: mode.frequency, present }
  const whole = peakAt(0)
  if (whole <= limit) {
    const needed = describe(0)
    return { ...base, outcome: 'none', needed, converged: true, iterations: 0, residual: whole / limit - 1 }
  }
  let iterations = 0
  let low = 0
  let high = LEAST_RATIO / unit
  const critical = 1 / unit
  while (peakAt(high) > limit && iterations < MOST_ROUNDS) {
    iterations++
    if (high >= critical) {
      const needed = describe(critical)
      const residual = peakAt(critical) / limit - 1
      return { ...base, outcome: 'outOfReach', needed, converged: true, iterations, residual }
    }
    low = high
    high = Math.min(critical, high * STEP)
  }
  let peak = peakAt(high)
  while (limit - peak > NEAR_ENOUGH * limit && iterations < MOST_ROUNDS) {
    iterations++
    const middle = low === 0 ? high / 2 : Math.sqrt(low * high)
    const there = peakAt(middle)
    if (there > limit) low = middle
    else {
      high = middle
      peak = there
    }
  }
  const residual = peak / limit - 1
  return {
    ...base,
    outcome: 'found',
    needed: describe(high),
    converged: Math.abs(residual) <= NEAR_ENOUGH,
    iterations,
    residual,
  }
}

/** What the mounts' damping as it is gives the mode on which it works most; absorbers left out. */
function largestRatio(damping: MountDamping): number {
  const [full, none] = [withDampingTimes(damping, 1), withDampingTimes(damping, 0)]
  const ratios = Array.from(
    { length: full.solver.freedoms },
    (_, r) => modalRatio(full, r) - modalRatio(none, r),
  )
  return Math.max(...ratios)
}

interface Reference {
  /** [Hz] */
  readonly frequency: number
  /** with the damping that is scaled, times 1 */
  readonly ratio: number
}

function referenceOf(trial: Project, { summary, installation }: Prepared): Reference {
  const { observed } = install(trial, summary, [], [])
  const alone = observed ?? installation.observed
  if (alone === null) throw new Error('a prepared project stands')
  const { index, frequency } = referenceMode(alone)
  return { frequency, ratio: modalRatio(alone, index) }
}

function dampedMounting(
  trial: Project,
  { loads }: Prepared,
  { damping }: DampingSearch,
  mode: Reference,
  factor: number,
  peak: number,
): DampedMounting {
  const observed = withDampingTimes(damping, factor)
  const running = trial.machine.duty.runningSpeed
  const at = running === null ? undefined : responseAtSpeeds(observed, groupByOrder(loads), [running])[0]
  return {
    factor,
    dampingRatio: factor * mode.ratio,
    types: typesInUse(observed, trial, mode.frequency),
    peak: finite(peak),
    forceRatio: finite(at?.forceRatio),
    isolationEfficiency: finite(at?.isolationEfficiency),
    supportForce: finite(at?.supportForce),
  }
}

function finite(value: number | null | undefined): number | null {
  return value === null || value === undefined || !Number.isFinite(value) ? null : value
}

/** Each type in use, by the first mount of it: dynamic stiffness as it stands there. */
function typesInUse(observed: Observed, { mounting }: Project, frequency: number): DampedMounting['types'] {
  const omega = 2 * Math.PI * frequency
  return mounting.types.flatMap(({ id }) => {
    const placed = mounting.placed.find(({ type }) => type === id)
    const element = observed.supports.find((support) => support.element.id === placed?.id)
    if (!element) return []
    const parts = element.branches.map(({ law }) => ({
      ...steadyPart(law),
      lossFactor: law.kind === 'springDamper' ? law.lossFactor : 0,
    }))
    const along = (of: (part: (typeof parts)[number]) => number): Vec3 => {
      const [x, y, z] = parts
      return [x ? of(x) : 0, y ? of(y) : 0, z ? of(z) : 0]
    }
    return [
      {
        id,
        lossFactor: parts[0]?.lossFactor ?? 0,
        viscous: along((part) => part.viscous),
        equivalentViscous: along((part) => part.viscous + part.hysteretic / omega),
      },
    ]
  })
}
