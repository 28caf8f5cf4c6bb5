/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { amplitudesOfStates, amplitudeWork, objectivesOf } from './amplitude.ts'
import { crests, crestWork, type CrestWork } from './crest.ts'
import { stateAt, type March } from './march.ts'
import {
  evaluateSignal,
  fillSignal,
  loadSignal,
  sample,
  signalWork,
  type Sample,
  type SignalWork,
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
export const PEAK_TOLERANCE = 1e-5
/** An interval halved as often as this cannot be told from a point. */
const DEEPEST = 44
/** More samples for one quantity in one panel mean that its beats are not worth following. */
const MOST_SAMPLES = 20_000

interface Search {
  readonly march: March
  readonly watch: Watch
  readonly signal: SignalWork
  readonly crest: CrestWork
  readonly best: Peaks
  /** both ends of a panel, then the middle of each interval on the way down; made when first needed */
  readonly slots: Sample[]
  /** whether an objective's best has moved in this panel, and how far around it lies open */
  readonly improved: Uint8Array
  readonly width: Float64Array
  readonly tolerance: number
  samples: number
  panel: number
}

/**
 * Peaks of every watched quantity over the whole course. Panels whose bound lies below what has been
 * found are passed over; in the others an interval is split until it cannot hide more than the tolerance.
 * @returns the peaks, and whether every search came to its end
 */
export function findPeaks(
  march: March,
  watches: readonly Watch[],
  tolerance = PEAK_TOLERANCE,
): { readonly peaks: readonly Peaks[]; readonly complete: boolean } {
  const signal = signalWork(march)
  const orders = march.loads.length
  const crest = crestWork(orders)
  const slots = [sample(orders), sample(orders), sample(orders)]
  const searches = watches.map((watch) => newSearch(march, watch, signal, crest, slots, tolerance))
  const first = new Set<number>()
  const scratch = amplitudeWork()
  for (const search of searches) {
    sampleBegins(search, scratch)
    for (const panel of search.best.panel) first.add(panel)
  }
  let complete = true
  const visit = (panel: number) => {
    let filled = false
    for (const search of searches) {
      if (!panelMayExceed(search, panel)) continue
      if (!filled)
        fillSignal(
          signal,
          panel,
          watches.some(({ moves }) => moves),
        )
      filled = true
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
  signal: SignalWork,
  crest: CrestWork,
  slots: Sample[],
  tolerance: number,
): Search {
  const objectives = objectivesOf(watch)
  return {
    march,
    watch,
    signal,
    crest,
    best: {
      value: new Float64Array(objectives),
      panel: new Int32Array(objectives),
      x: new Float64Array(objectives).fill(-1),
    },
    slots,
    improved: new Uint8Array(objectives),
    width: new Float64Array(objectives),
    tolerance,
    samples: 0,
    panel: 0,
  }
}

/** A first idea of the peaks from the states that are known anyway. */
function sampleBegins(
  { march, watch, best, slots }: Search,
  scratch: ReturnType<typeof amplitudeWork>,
): void {
  const { plan, poles, loads, stateRe, stateIm } = march
  const { value } = slots[0]!
  const apart = (plan.count + 1) * poles.count
  for (let panel = 0; panel < plan.count; panel++) {
    amplitudesOfStates(
      scratch,
      watch,
      loads.length,
      apart,
      stateRe,
      stateIm,
      stateAt(march, 0, panel),
      value,
      0,
    )
    for (let q = 0; q < best.value.length; q++) {
      if (value[q]! <= best.value[q]!) continue
      best.value[q] = value[q]!
      best.panel[q] = panel
    }
  }
}

function panelMayExceed({ march, watch, best, tolerance }: Search, panel: number): boolean {
  for (let q = 0; q < best.value.length; q++) {
    const size = q < watch.axes.length ? watch.axes[q]!.size : watch.all
    if (panelBound(march, size, panel, watch.moves) > best.value[q]! * (1 + tolerance)) return true
  }
  return false
}

function panelBound(march: March, size: WatchSize, panel: number, moves: boolean): number {
  const { modes, count } = march.poles
  let bound = 0
  for (let o = 0; o < march.loads.length; o++) {
    const at = o * march.plan.count + panel
    for (let r = 0; r < modes; r++) {
      bound += size.displacement[r]! * march.displacement[at * modes + r]!
      if (moves) bound += size.velocity[r]! * march.velocity[at * modes + r]!
    }
    for (let j = 0; j < count; j++) bound += size.state[j]! * march.free[at * count + j]!
  }
  return bound
}

/** @returns whether nothing was given up */
function searchPanel(search: Search, panel: number): boolean {
  const { signal, slots, best, improved } = search
  search.panel = panel
  search.samples = 0
  loadSignal(signal, search.watch, leastThatMatters(best.value))
  improved.fill(0)
  const begin = slots[0]!
  const end = slots[1]!
  take(search, -1, begin, 2)
  take(search, 1, end, 2)
  const complete = split(search, -1, begin, 1, end, 0)
  for (let q = 0; q < improved.length; q++) if (improved[q] === 1) polish(search, q)
  return complete
}

/** The smallest of the peaks, but a direction that hardly moves need not be as exact as the others. */
function leastThatMatters(values: Float64Array): number {
  let least = Infinity
  let most = 0
  for (const value of values) {
    least = Math.min(least, value)
    most = Math.max(most, value)
  }
  return Math.max(least, 1e-3 * most)
}

function take(search: Search, x: number, slot: Sample, width: number): void {
  const { signal, best, improved } = search
  evaluateSignal(signal, x, slot)
  search.samples++
  for (let q = 0; q < best.value.length; q++) {
    if (slot.value[q]! <= best.value[q]!) continue
    best.value[q] = slot.value[q]!
    best.panel[q] = search.panel
    best.x[q] = x
    improved[q] = 1
    search.width[q] = width
  }
}

function split(search: Search, a: number, atA: Sample, b: number, atB: Sample, depth: number): boolean {
  const share = crestWithin(search, b - a, atA, atB)
  if (share === 0) return true
  if (depth >= DEEPEST || search.samples > MOST_SAMPLES) return false
  const middle = a + share * (b - a)
  const slot = (search.slots[depth + 2] ??= sample(search.signal.orders))
  take(search, middle, slot, Math.min(share, 1 - share) * (b - a))
  const last = search.best.value.length - 1
  // the side with the larger end first: what it finds spares the other
  if (atA.value[last]! > atB.value[last]!) {
    const left = split(search, a, atA, middle, slot, depth + 1)
    return split(search, middle, slot, b, atB, depth + 1) && left
  }
  const right = split(search, middle, slot, b, atB, depth + 1)
  return split(search, a, atA, middle, slot, depth + 1) && right
}

/** Where to split an interval, as a share of its length; 0 when it cannot hold more than has been found. */
function crestWithin(search: Search, length: number, atA: Sample, atB: Sample): number {
  const { best, signal, tolerance, crest } = search
  const eighth = (length * length) / 8
  const left = length ** 4 / 384
  crests(crest, signal, atA, atB, length)
  let share = 0
  let most = 1 + tolerance
  for (let q = 0; q < best.value.length; q++) {
    const together = crest.bound[q]! + left * (signal.fourth[q]! + atA.freeFourth[q]!)
    const apart = Math.max(atA.forced[q]!, atB.forced[q]!) + eighth * signal.second[q]! + atA.free[q]!
    const excess = Math.min(together, apart) / best.value[q]!
    if (!(excess > most)) continue
    most = excess
    // where the cubic says little the crest's place is a guess, and half is safer
    share = crest.bound[q]! > 0.5 * together ? Math.min(0.9, Math.max(0.1, crest.at[q]!)) : 0.5
  }
  return share
}

/** Moves a peak onto the top of the curve through three samples, closer each time. */
function polish(search: Search, q: number): void {
  const { best, signal, slots } = search
  if (best.panel[q] !== search.panel) return
  const slot = slots[0]!
  const at = (x: number) => {
    evaluateSignal(signal, x, slot)
    return slot.value[q]!
  }
  let step = Math.min(search.width[q]!, 0.05)
  for (let round = 0; round < 3; round++) {
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
    }
    step /= 8
  }
}
