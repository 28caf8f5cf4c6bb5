/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Observed } from '../excitation/observed.ts'
import type { SourceLoad } from '../excitation/order-loads.ts'
import type { Project } from '../project/project.ts'
import type { Problem, RunUpPass, RunUpPeak, RunUpPeaks, RunUpResult } from '../results.ts'
import { envelopeOf } from './envelope.ts'
import { marchThrough, type March } from './march.ts'
import { planPanels } from './panel-plan.ts'
import { findPeaks, PEAK_TOLERANCE, type Peaks } from './peak-search.ts'
import { firstOrder } from './prepared.ts'
import { speedCourse, speedOf, type SpeedCourse } from './speed-course.ts'
import { steadyPeaks } from './steady-peak.ts'
import { travelRows, watchForce, watchForces, watchRows, type Modal, type Watch } from './watch.ts'

/** About how many samples the chart's curve has. */
const ENVELOPE_SAMPLES = 1500

/** What of a run-up is wanted; left out: everything. */
export interface RunUpScope {
  /** false: no curve for the chart */
  readonly envelope?: boolean
  /** ids of the points wanted; left out: all */
  readonly points?: ReadonlySet<string>
  readonly force?: boolean
  readonly travel?: boolean
  readonly strokes?: boolean
  readonly up?: boolean
  readonly down?: boolean
  /** how exactly peaks are searched, as a share of them */
  readonly tolerance?: number
  /** true, for trials: of all mounts only the one with the largest peak is found, quickly, and no steady values */
  readonly worstOnly?: boolean
  /** directions wanted: x, y, z, resultant; left out: all */
  readonly directions?: readonly boolean[]
}

export interface RunUpFinding {
  readonly result: RunUpResult
  readonly problems: readonly Problem[]
}

/**
 * How far everything moves while the shaft runs up to speed and coasts down again: the network in the
 * first-order form of its modes, taken exactly through the course of speed (phase = order times shaft
 * angle, unbalance with its tangential part).
 * F. M. Lewis, Vibration during acceleration through a critical speed, Trans. ASME 54, 1932 (the problem).
 * @param observed the network with all that stands on it
 * @param loads every enabled source
 */
export function runUpOf(
  project: Project,
  observed: Observed,
  loads: readonly SourceLoad[],
  scope: RunUpScope = {},
): RunUpFinding {
  const form = firstOrder(observed, loads)
  if (form === null) {
    const message = 'The run-up cannot be computed: a mode of the machine is not stable.'
    return { result: { up: null, down: null }, problems: [{ field: 'runUp', message, kind: 'invalid' }] }
  }
  const { poles, orders } = form
  const watched = watchAll(project, observed, form.modal, scope)
  const problems: Problem[] = []
  const pass = (direction: 'up' | 'down'): RunUpPass | null => {
    const { enabled, law, hold } = project.runUp[direction]
    if (!enabled || scope[direction] === false) return null
    const found = speedCourse(law, direction, hold, project.machine.duty, `runUp.${direction}.law`)
    problems.push(...found.problems)
    if (found.course === null) return null
    const highest = Math.max(...orders.map(({ order }) => order))
    const plan = planPanels(found.course, highest, scope.worstOnly === true ? 'quick' : 'fine')
    const march = marchThrough(plan, poles, orders)
    if (march === null) {
      problems.push({
        field: `runUp.${direction}.law`,
        message:
          'At its first speed the excitation meets a resonance without damping: it has no bound there.',
        kind: 'invalid',
      })
      return null
    }
    return passOf(march, hold, watched, scope)
  }
  return { result: { up: pass('up'), down: pass('down') }, problems }
}

/** Largest steady values over a range of speeds: x, y, z, resultant; Infinity where there is no bound. */
export interface SteadyValues {
  readonly points: readonly { readonly id: string; readonly values: Float64Array }[]
  readonly mounts: readonly { readonly id: string; readonly travel: Float64Array }[]
}

/**
 * The steady motion to which a run-up is compared, by itself.
 * @param range lowest and highest speed [rad/s]
 * @returns null when a mode is not stable
 */
export function steadyValues(
  project: Project,
  observed: Observed,
  loads: readonly SourceLoad[],
  scope: RunUpScope,
  range: readonly [number, number],
): SteadyValues | null {
  const form = firstOrder(observed, loads)
  if (form === null) return null
  const watched = watchAll(project, observed, form.modal, scope)
  const peaks = steadyPeaks(form.poles, form.orders, watched.watches, range)
  return {
    points: watched.points.map(({ id, at }) => ({ id, values: peaks[at]! })),
    mounts: watched.mounts.map(({ id, travel }) => ({ id, travel: peaks[travel]! })),
  }
}

interface Watched {
  readonly watches: readonly Watch[]
  readonly points: readonly { readonly id: string; readonly at: number }[]
  readonly mounts: readonly { readonly id: string; readonly force: number; readonly travel: number }[]
  readonly support: number
  readonly absorbers: readonly { readonly id: string; readonly at: number }[]
}

function watchAll(project: Project, observed: Observed, modal: Modal, scope: RunUpScope): Watched {
  const watches: Watch[] = []
  const add = (watch: Watch) => watches.push(watch) - 1
  const points = project.machine.points.flatMap(({ id }, index) => {
    if (scope.points?.has(id) === false) return []
    return [{ id, at: add(watchRows(modal, observed.points[index]!)) }]
  })
  const none = watchRows(modal, [])
  const mounts = observed.supports.map((element) => ({
    id: element.element.id,
    force: add(scope.force === false ? none : watchForce(modal, element)),
    travel: add(scope.travel === false ? none : watchRows(modal, travelRows(observed.system, element))),
  }))
  const support = add(scope.force === false ? none : watchForces(modal, observed.supports))
  const absorbers = (scope.strokes === false ? [] : observed.absorbers).map(({ id, stroke }) => ({
    id,
    at: add(watchRows(modal, [stroke])),
  }))
  return { watches, points, mounts, support, absorbers }
}

function passOf(march: March, hold: number, watched: Watched, scope: RunUpScope): RunUpPass {
  const { plan, poles, loads } = march
  const tolerance = scope.tolerance ?? PEAK_TOLERANCE
  const { peaks, complete } = findPeaks(march, watched.watches, {
    tolerance,
    ...(scope.worstOnly === true ? { rivals: rivalsOf(watched) } : {}),
    ...(scope.directions ? { wanted: scope.directions } : {}),
  })
  const steady =
    scope.worstOnly === true ? [] : steadyPeaks(poles, loads, watched.watches, speedRange(plan.course))
  const one = (at: number, q: number) => peakOf(march, peaks[at]!, steady[at]?.[q] ?? Infinity, q)
  const all = (at: number): RunUpPeaks => ({
    x: one(at, 0),
    y: one(at, 1),
    z: one(at, 2),
    resultant: one(at, 3),
  })
  return {
    from: plan.course.pieces[0]?.from ?? 0,
    to: plan.course.pieces.at(-1)?.to ?? 0,
    duration: plan.course.duration - hold,
    hold,
    converged: complete && plan.complete,
    errorEstimate: tolerance + march.cut,
    points: watched.points.map(({ id, at }) => ({ id, peaks: all(at) })),
    mounts: watched.mounts.map(({ id, force, travel }) => ({ id, force: all(force), travel: all(travel) })),
    support: all(watched.support),
    absorbers: watched.absorbers.map(({ id, at }) => ({ id, stroke: one(at, 0) })),
    envelope: scope.envelope === false ? null : envelope(march, watched, peaks),
  }
}

/** Forces of all mounts are rivals, and so are their travels; everything else stands by itself. */
function rivalsOf({ watches, mounts }: Watched): readonly number[] {
  const groups = watches.map((_, at) => 2 + at)
  for (const { force, travel } of mounts) {
    groups[force] = 0
    groups[travel] = 1
  }
  return groups
}

function speedRange({ pieces }: SpeedCourse): readonly [number, number] {
  const speeds = pieces.flatMap(({ from, to }) => [from, to])
  return [Math.min(...speeds), Math.max(...speeds)]
}

function peakOf({ plan }: March, peaks: Peaks, largestSteady: number, q: number): RunUpPeak {
  const panel = peaks.panel[q] ?? 0
  const x = peaks.x[q] ?? -1
  const value = peaks.value[q] ?? 0
  const piece = plan.course.pieces[plan.piece[panel]!]!
  const within = plan.middle[panel]! + plan.half[panel]! * x
  const steady = Number.isFinite(largestSteady) ? largestSteady : null
  return {
    value,
    time: plan.time[panel]! + plan.half[panel]! * x,
    speed: speedOf(piece, Math.min(piece.duration, Math.max(0, within))),
    steady,
    ratio: steady === null || steady === 0 ? null : value / steady,
  }
}

function envelope(march: March, watched: Watched, peaks: readonly Peaks[]): RunUpPass['envelope'] {
  const of = watched.points.length > 0 ? 'point' : 'mount'
  const places =
    of === 'point' ? watched.points : watched.mounts.map(({ id, travel }) => ({ id, at: travel }))
  const height = ({ at }: { readonly at: number }) => peaks[at]!.value[3] ?? 0
  const worst = places.reduce((best, place) => (height(place) > height(best) ? place : best), places[0]!)
  const top = { value: height(worst), panel: peaks[worst.at]!.panel[3]!, x: peaks[worst.at]!.x[3]! }
  const { time, speed, value } = envelopeOf(march, watched.watches[worst.at]!, top, ENVELOPE_SAMPLES)
  return { place: worst.id, of, time, speed, displacement: value }
}
