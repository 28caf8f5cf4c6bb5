/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { amplitudesOfStates, amplitudeWork, objectivesOf, type AmplitudeWork } from './amplitude.ts'
import { crestHeight, crestPlace, crestWork, loadCubics, mayExceed, type CrestWork } from './crest.ts'
import { stateAt, type March } from './march.ts'
import { BEGIN, END, enterPanel, halfOf, motionOf, sampleAt, WHOLE, type Motion } from './motion.ts'
import { closeBounds, roughBound } from './panel-bound.ts'
import {
  emptySignal,
  fourthBound,
  freeBound,
  freeFourthBound,
  readForced,
  readSignal,
  secondBound,
  type Signal,
} from './signal.ts'
import type { Watch, WatchSize } from './watch.ts'

/** The largest value of a watched quantity and where it stands: each direction, then the resultant. */
export interface Peaks {
  readonly value: Float64Array
  readonly panel: Int32Array
  /** position in the panel, -1 its begin, 1 its end */
  readonly x: Float64Array
}

/** What a direction or resultant may still hide above the value found, as a share of it. */
export const PEAK_TOLERANCE = 5e-5
const ALL_WANTED = [true, true, true, true] as const
/** An interval halved as often as this cannot be told from a point. */
const DEEPEST = 40
/** More intervals of one panel mean that its beats are not worth following. */
const MOST_INTERVALS = 20_000

interface Search {
  readonly march: March
  readonly watch: Watch
  readonly motion: Motion
  readonly crest: CrestWork
  readonly best: Peaks
  /** the largest found of all rivals: below it nothing matters */
  readonly floor: Float64Array
  readonly wanted: readonly boolean[]
  /** quantities at both ends of the panel, then at the middle of each interval on the way down, then for one-off looks */
  readonly slots: Signal[]
  readonly spare: Signal
  /** whether an objective can exceed its best in the panel at all, and whether it has, how far around it lies open */
  readonly alive: Uint8Array
  /** bounds over the panel looked at */
  readonly close: Float64Array
  readonly improved: Uint8Array
  readonly width: Float64Array
  /** bounds of the forced motion's derivatives */
  readonly second: Float64Array
  readonly fourth: Float64Array
  /** where cubics have crests */
  readonly crests: Float64Array
  readonly tolerance: number
  intervals: number
  panel: number
}

export interface PeakScope {
  /** what a peak may hide, as a share of it; left out: 5e-5 */
  readonly tolerance?: number
  /**
   * Quantities with the same number are rivals: only the largest of them is found, the others are what
   * they happened to be when they could no longer win. Left out: every quantity stands by itself.
   */
  readonly rivals?: readonly number[]
  /** of three directions and the resultant those that are wanted; left out: all */
  readonly wanted?: readonly boolean[]
}

/**
 * Peaks of every watched quantity over the whole course. Panels whose bound lies below what has been
 * found are passed over; in the others intervals are halved until they cannot hold more, or a cubic
 * tells where their crest is.
 * @returns the peaks, and whether every search came to its end
 */
export function findPeaks(
  march: March,
  watches: readonly Watch[],
  { tolerance = PEAK_TOLERANCE, rivals, wanted }: PeakScope = {},
): { readonly peaks: readonly Peaks[]; readonly complete: boolean } {
  const orders = march.loads.length
  const shared = {
    motion: motionOf(
      march,
      watches.some(({ moves }) => moves),
      rivals ? 'quick' : 'fine',
    ),
    crest: crestWork(orders),
    slots: [emptySignal(orders), emptySignal(orders)],
    spare: emptySignal(orders),
  }
  const floors = new Map<number, Float64Array>()
  const searches = watches.map((watch, index) => {
    const floor = floors.get(rivals?.[index] ?? -1 - index) ?? new Float64Array(4)
    floors.set(rivals?.[index] ?? -1 - index, floor)
    return newSearch(march, watch, { ...shared, floor, wanted: wanted ?? ALL_WANTED }, tolerance)
  })
  const scratch = amplitudeWork()
  const first = new Set<number>()
  for (const search of searches) {
    sampleBegins(search, scratch)
    for (const panel of search.best.panel) first.add(panel)
  }
  let complete = true
  const visit = (panel: number) => {
    let entered = false
    for (const search of searches) {
      // once a panel is in hand, looking costs no more than bounding closely
      if (!panelMayExceed(search, panel, !entered)) continue
      if (!entered) enterPanel(shared.motion, panel)
      entered = true
      complete = searchPanel(search, panel) && complete
    }
  }
  for (const panel of first) visit(panel)
  for (let panel = 0; panel < march.plan.count; panel++) if (!first.has(panel)) visit(panel)
  return { peaks: searches.map(({ best }) => best), complete }
}

function newSearch(
  march: March,
  watch: Watch,
  shared: Pick<Search, 'motion' | 'crest' | 'slots' | 'spare' | 'floor' | 'wanted'>,
  tolerance: number,
): Search {
  const objectives = objectivesOf(watch)
  return {
    march,
    watch,
    ...shared,
    best: {
      value: new Float64Array(objectives),
      panel: new Int32Array(objectives),
      x: new Float64Array(objectives).fill(-1),
    },
    alive: new Uint8Array(objectives),
    close: new Float64Array(4),
    improved: new Uint8Array(objectives),
    width: new Float64Array(objectives),
    second: new Float64Array(objectives),
    fourth: new Float64Array(objectives),
    crests: new Float64Array(objectives),
    tolerance,
    intervals: 0,
    panel: 0,
  }
}

/** A first idea of the peaks from the states that are known anyway. */
function sampleBegins({ march, watch, best, floor, spare }: Search, scratch: AmplitudeWork): void {
  const { plan, poles, loads, stateRe, stateIm } = march
  const { value } = spare
  const apart = (plan.count + 1) * poles.count
  for (let panel = 0; panel < plan.count; panel++) {
    const at = stateAt(march, 0, panel)
    amplitudesOfStates(scratch, watch, loads.length, apart, stateRe, stateIm, at, value, 0)
    for (let q = 0; q < best.value.length; q++) {
      if (value[q]! <= best.value[q]!) continue
      best.value[q] = value[q]!
      best.panel[q] = panel
      floor[q] = Math.max(floor[q]!, value[q]!)
    }
  }
}

const sizeOf = (watch: Watch, q: number): WatchSize =>
  q < watch.axes.length ? watch.axes[q]!.size : watch.all

/** Marks what may exceed its best in a panel. @param closely whether a costly bound is worth it @returns whether anything may */
function panelMayExceed(
  { march, watch, floor, wanted, tolerance, alive, close }: Search,
  panel: number,
  closely: boolean,
): boolean {
  const { bounds, plan, loads } = march
  let any = false
  for (let q = 0; q < alive.length; q++) {
    const rough =
      wanted[q] === true ? roughBound(bounds, sizeOf(watch, q), watch.moves, loads.length, panel) : 0
    alive[q] = rough > floor[q]! * (1 + tolerance) ? 1 : 0
    any ||= alive[q] === 1
  }
  if (!any || !closely) return any
  any = false
  closeBounds(bounds, watch, plan.half[panel]!, loads.length, panel, alive, close)
  for (let q = 0; q < alive.length; q++) {
    if (!(close[q]! > floor[q]! * (1 + tolerance))) alive[q] = 0
    any ||= alive[q] === 1
  }
  return any
}

/** @returns whether nothing was given up */
function searchPanel(search: Search, panel: number): boolean {
  const { motion, watch, slots, improved, second, fourth } = search
  search.panel = panel
  search.intervals = 0
  improved.fill(0)
  for (let q = 0; q < second.length; q++) {
    second[q] = secondBound(motion, watch, sizeOf(watch, q))
    fourth[q] = fourthBound(motion, watch, sizeOf(watch, q))
  }
  read(search, -1, BEGIN, slots[0]!, 2)
  read(search, 1, END, slots[1]!, 2)
  const complete = searchInterval(search, -1, slots[0]!, 1, slots[1]!, WHOLE, 'left', 0)
  for (let q = 0; q < improved.length; q++) if (improved[q] === 1) polish(search, q)
  return complete
}

/**
 * Reads the quantity and what bounds it from a sample on.
 * @param length of the intervals that begin or end there
 */
function read(search: Search, x: number, sample: number, signal: Signal, length: number): void {
  const { motion, watch, alive, floor } = search
  readSignal(motion, watch, sample, signal)
  note(search, x, signal, length)
  let beating = false
  for (let q = 0; q < alive.length; q++) {
    if (alive[q] === 0) continue
    signal.free[q] = freeBound(motion, sizeOf(watch, q), sample)
    signal.freeFourth[q] = freeFourthBound(motion, sizeOf(watch, q), sample)
    // where cubics cannot follow the beats, forced motion and beats are bounded apart
    beating ||= quartic(length) * signal.freeFourth[q]! > 0.1 * floor[q]!
  }
  if (beating) readForced(motion, watch, sample, signal)
  else signal.forced.fill(Infinity)
}

const quartic = (length: number): number => (length * length * length * length) / 384

/** Keeps what a sample shows where it is more than the best. */
function note(
  { best, floor, improved, width, panel }: Search,
  x: number,
  signal: Signal,
  around: number,
): void {
  for (let q = 0; q < best.value.length; q++) {
    if (signal.value[q]! <= best.value[q]!) continue
    best.value[q] = signal.value[q]!
    best.panel[q] = panel
    best.x[q] = x
    floor[q] = Math.max(floor[q]!, signal.value[q]!)
    improved[q] = 1
    width[q] = around
  }
}

/**
 * @param a,b ends of the interval, with the quantity there
 * @param parent sample in the middle of the interval of which this is the half on `side`
 */
function searchInterval(
  search: Search,
  a: number,
  atA: Signal,
  b: number,
  atB: Signal,
  parent: number,
  side: 'left' | 'right',
  depth: number,
): boolean {
  if (!mustSplit(search, a, atA, b, atB)) return true
  if (depth >= DEEPEST || ++search.intervals > MOST_INTERVALS) return false
  const { motion } = search
  const x = (a + b) / 2
  const middle = halfOf(motion, parent, side, x)
  const signal = (search.slots[depth + 2] ??= emptySignal(motion.orders))
  read(search, x, middle, signal, (b - a) / 2)
  // the side with the larger end first: what it finds spares the other
  const last = search.best.value.length - 1
  if (atA.value[last]! > atB.value[last]!) {
    const left = searchInterval(search, a, atA, x, signal, middle, 'left', depth + 1)
    return searchInterval(search, x, signal, b, atB, middle, 'right', depth + 1) && left
  }
  const right = searchInterval(search, x, signal, b, atB, middle, 'right', depth + 1)
  return searchInterval(search, a, atA, x, signal, middle, 'left', depth + 1) && right
}

/** Looks at the crests that cubics tell; whether an interval may hide more than they can tell. */
function mustSplit(search: Search, a: number, atA: Signal, b: number, atB: Signal): boolean {
  const { floor, alive, watch, motion, crest, second, fourth, tolerance } = search
  const axes = watch.axes.length
  const length = b - a
  loadCubics(crest, axes, motion.orders, atA, atB, length)
  let found = 0
  for (let q = 0; q < alive.length; q++) {
    if (alive[q] === 0) continue
    const limit = floor[q]! * (1 + tolerance)
    const left = quartic(length) * (fourth[q]! + atA.freeFourth[q]!)
    if (left < limit && !mayExceed(crest, axes, motion.orders, q, limit - left)) continue
    const forced = Math.max(atA.forced[q]!, atB.forced[q]!) + (length * length * second[q]!) / 8
    if (forced + atA.free[q]! <= limit) continue
    if (left > 0.5 * tolerance * floor[q]!) return true
    const place = crestPlace(crest)
    if (crestHeight(crest, place) + left <= limit) continue
    search.crests[found++] = a + place * length
  }
  for (let i = 0; i < found; i++) {
    const x = search.crests[i]!
    readSignal(motion, watch, sampleAt(motion, x), search.spare)
    note(search, x, search.spare, length / 8)
  }
  return false
}

/** Moves a peak onto the top of the curve through three samples, closer each time. */
function polish(search: Search, q: number): void {
  const { best, floor, motion, watch, spare } = search
  if (best.panel[q] !== search.panel || best.value[q]! < floor[q]!) return
  const at = (x: number) => {
    readSignal(motion, watch, sampleAt(motion, x), spare)
    return spare.value[q]!
  }
  let step = Math.min(search.width[q]!, 0.05)
  for (let round = 0; round < 2; round++) {
    const x = Math.min(1 - step, Math.max(-1 + step, best.x[q]!))
    const left = at(x - step)
    const middle = at(x)
    const right = at(x + step)
    const bend = left - 2 * middle + right
    const top = bend < 0 ? x + Math.max(-step, Math.min(step, (step * (left - right)) / (2 * bend))) : x
    const value = at(top)
    if (value > best.value[q]!) {
      best.value[q] = value
      best.x[q] = top
      floor[q] = Math.max(floor[q]!, value)
    }
    step /= 8
  }
}
