/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { boundAt, refill, stateAt, type March } from './march.ts'
import { evaluateSignal, loadSignal, sample, signalWork, type Sample, type SignalWork } from './signal.ts'
import { addAmplitudes, objectivesOf, type Watch } from './watch.ts'

/** The largest value of a watched quantity and where it stands: each direction, then the resultant. */
export interface Peaks {
  readonly value: Float64Array
  readonly panel: Int32Array
  /** position in the panel, -1 its begin, 1 its end */
  readonly x: Float64Array
}

/** What a direction or resultant may still hide above the value found, as a share of it. */
export const PEAK_TOLERANCE = 1e-5
/** Intervals no longer than this are not split: a beat that fast has no meaning. */
const DEEPEST = 44
/** More samples for one quantity in one panel mean that its beats are not worth following. */
const MOST_SAMPLES = 20_000

interface Search {
  readonly march: March
  readonly watch: Watch
  readonly signal: SignalWork
  readonly best: Peaks
  readonly slots: readonly Sample[]
  readonly improved: Uint8Array
  readonly width: Float64Array
  readonly tolerance: number
  samples: number
  panel: number
}

/**
 * Peaks of every watched quantity over the whole course. Panels whose bound lies below what has been
 * found are passed over; the others are halved until an interval cannot hide more: between two samples
 * a curve exceeds the larger by at most an eighth of its length squared times its curvature.
 * @returns the peaks, and whether every search came to its end
 */
export function findPeaks(
  march: March,
  watches: readonly Watch[],
  tolerance = PEAK_TOLERANCE,
): { readonly peaks: readonly Peaks[]; readonly complete: boolean } {
  const signal = signalWork(march)
  const searches = watches.map((watch) => newSearch(march, watch, signal, tolerance))
  const first = new Set<number>()
  for (const search of searches) {
    sampleBegins(search)
    for (const panel of search.best.panel) first.add(panel)
  }
  let complete = true
  const visit = (panel: number) => {
    let filled = false
    for (const search of searches) {
      if (!mayExceed(search, panel)) continue
      if (!filled) {
        for (let o = 0; o < march.loads.length; o++) signal.keep(o, refill(march, o, panel).panel)
        filled = true
      }
      complete = searchPanel(search, panel) && complete
    }
  }
  for (const panel of first) visit(panel)
  for (let panel = 0; panel < march.plan.count; panel++) if (!first.has(panel)) visit(panel)
  return { peaks: searches.map(({ best }) => best), complete }
}

function newSearch(march: March, watch: Watch, signal: SignalWork, tolerance: number): Search {
  const objectives = objectivesOf(watch)
  return {
    march,
    watch,
    signal,
    best: {
      value: new Float64Array(objectives),
      panel: new Int32Array(objectives),
      x: new Float64Array(objectives).fill(-1),
    },
    slots: Array.from({ length: DEEPEST + 3 }, sample),
    improved: new Uint8Array(objectives),
    width: new Float64Array(objectives),
    tolerance,
    samples: 0,
    panel: 0,
  }
}

/** A first idea of the peaks from the states that are known anyway. */
function sampleBegins({ march, watch, best, slots }: Search): void {
  const { plan, poles, loads, stateRe, stateIm } = march
  const { value } = slots[0]!
  const apart = (plan.count + 1) * poles.count
  for (let panel = 0; panel < plan.count; panel++) {
    addAmplitudes(
      watch,
      loads.length,
      poles.count,
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

function mayExceed({ march, watch, best, tolerance }: Search, panel: number): boolean {
  const { count } = march.poles
  const objectives = best.value.length
  for (let q = 0; q < objectives; q++) {
    const size = q < watch.axes.length ? watch.axes[q]!.size : watch.size
    let bound = 0
    for (let o = 0; o < march.loads.length; o++) {
      const at = boundAt(march, o, panel)
      for (let j = 0; j < count; j++) bound += size[j]! * march.bound[at + j]!
    }
    if (bound > best.value[q]! * (1 + tolerance)) return true
  }
  return false
}

/** @returns whether nothing was given up */
function searchPanel(search: Search, panel: number): boolean {
  const { signal, slots, best, improved } = search
  search.panel = panel
  search.samples = 0
  loadSignal(signal, search.watch, best.value)
  improved.fill(0)
  const begin = slots[DEEPEST + 1]!
  const end = slots[DEEPEST + 2]!
  take(search, -1, begin, 2)
  take(search, 1, end, 2)
  const complete = split(search, -1, begin, 1, end, 0)
  for (let q = 0; q < improved.length; q++) if (improved[q] === 1) polish(search, q)
  return complete
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
  if (!intervalMayExceed(search, b - a, atA, atB)) return true
  if (depth >= DEEPEST || search.samples > MOST_SAMPLES) return false
  const middle = (a + b) / 2
  const slot = search.slots[depth]!
  take(search, middle, slot, (b - a) / 2)
  // the side with the larger end first: what it finds spares the other
  const last = search.best.value.length - 1
  if (atA.value[last]! > atB.value[last]!) {
    const left = split(search, a, atA, middle, slot, depth + 1)
    return split(search, middle, slot, b, atB, depth + 1) && left
  }
  const right = split(search, middle, slot, b, atB, depth + 1)
  return split(search, a, atA, middle, slot, depth + 1) && right
}

function intervalMayExceed(
  { best, signal, tolerance }: Search,
  length: number,
  atA: Sample,
  atB: Sample,
): boolean {
  const eighth = (length * length) / 8
  for (let q = 0; q < best.value.length; q++) {
    const forcedBend = eighth * signal.curvature[q]!
    const total = Math.max(atA.value[q]!, atB.value[q]!) + forcedBend + eighth * atA.freeCurvature[q]!
    const apart = Math.max(atA.forced[q]!, atB.forced[q]!) + forcedBend + atA.free[q]!
    if (Math.min(total, apart) > best.value[q]! * (1 + tolerance)) return true
  }
  return false
}

/** Moves a peak onto the top of the curve through three samples, twice. */
function polish(search: Search, q: number): void {
  const { best, signal, slots } = search
  if (best.panel[q] !== search.panel) return
  const slot = slots[0]!
  const at = (x: number) => {
    evaluateSignal(signal, x, slot)
    return slot.value[q]!
  }
  // the tolerance tells how wide the top is that has been found
  let step = Math.min(search.width[q]!, 0.25)
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
