/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { addAmplitudes } from './amplitude.ts'
import { refill, type March } from './march.ts'
import { panelWork, TERMS, type Panel, type PanelWork } from './panel.ts'
import type { Watch, WatchAxis } from './watch.ts'

/** One watched quantity at one instant. */
export interface Sample {
  /** amplitude by direction, then the resultant's peak; orders added up */
  readonly value: Float64Array
  /** the same of the forced motion alone */
  readonly forced: Float64Array
  /** bound of the free vibration from here on, and of its fourth derivative by x */
  readonly free: Float64Array
  readonly freeFourth: Float64Array
  /** the motion itself and its derivative by x: order o, direction d at o 3 + d */
  readonly re: Float64Array
  readonly im: Float64Array
  readonly slopeRe: Float64Array
  readonly slopeIm: Float64Array
}

export function sample(orders: number): Sample {
  const make = (size: number) => new Float64Array(size)
  return {
    value: make(4),
    forced: make(4),
    free: make(4),
    freeFourth: make(4),
    re: make(3 * orders),
    im: make(3 * orders),
    slopeRe: make(3 * orders),
    slopeIm: make(3 * orders),
  }
}

/** Free vibrations smaller than this share of what matters are left out of a quantity. */
const NEGLIGIBLE = 1e-10
/** Powers smaller than this share of the largest are rounding. */
const ROUNDING = 1e-15

/** A watched quantity over one panel: a polynomial per order and direction, and the free vibrations that count. */
export interface SignalWork {
  readonly march: March
  readonly orders: number
  /** by order, the panel that has been filled */
  readonly panels: readonly PanelWork[]
  axes: number
  /** power k of order o and direction d at (o 3 + d) TERMS + k, and the highest power that counts */
  readonly forcedRe: Float64Array
  readonly forcedIm: Float64Array
  top: number
  /** bounds of the forced motion's second and fourth derivative, by direction and resultant */
  readonly second: Float64Array
  readonly fourth: Float64Array
  /** free vibrations: how many of each order, and per vibration kappa, weights by direction, length */
  readonly vibrations: Int32Array
  readonly kappaRe: Float64Array
  readonly kappaIm: Float64Array
  readonly weightRe: Float64Array
  readonly weightIm: Float64Array
  readonly weightSize: Float64Array
}

export function signalWork(march: March): SignalWork {
  const orders = march.loads.length
  const { count } = march.poles
  const make = (size: number) => new Float64Array(size)
  return {
    march,
    orders,
    panels: march.loads.map(() => panelWork(march.poles)),
    axes: 0,
    forcedRe: make(orders * 3 * TERMS),
    forcedIm: make(orders * 3 * TERMS),
    top: 0,
    second: make(4),
    fourth: make(4),
    vibrations: new Int32Array(orders),
    kappaRe: make(orders * count),
    kappaIm: make(orders * count),
    weightRe: make(orders * count * 3),
    weightIm: make(orders * count * 3),
    weightSize: make(orders * count * 4),
  }
}

/** Takes the motion over a panel in hand. @param velocity whether a quantity with velocities will be loaded */
export function fillSignal(work: SignalWork, panel: number, velocity: boolean): void {
  for (let o = 0; o < work.orders; o++) refill(work.march, o, panel, work.panels[o]!, velocity)
}

/** Loads one quantity over the panel in hand. @param matters free vibrations far below this are left out */
export function loadSignal(work: SignalWork, watch: Watch, matters: number): void {
  const axes = watch.axes.length
  work.axes = axes
  work.top = 0
  work.second.fill(0)
  work.fourth.fill(0)
  for (let o = 0; o < work.orders; o++) {
    const { panel } = work.panels[o]!
    let second = 0
    let fourth = 0
    for (let d = 0; d < axes; d++) {
      const at = (o * 3 + d) * TERMS
      combineForced(work, panel, watch.axes[d]!, watch.moves, at)
      second += boundDerivatives(work, at, d)
      fourth += work.fourth[d]!
    }
    if (axes > 1) {
      work.second[axes]! += second
      work.fourth[axes] = fourth
    }
    work.vibrations[o] = loadVibrations(work, panel, watch, o, NEGLIGIBLE * matters)
  }
}

function combineForced(
  work: SignalWork,
  panel: Panel,
  { re, im, velocity }: WatchAxis,
  moves: boolean,
  at: number,
): void {
  const { forcedRe, forcedIm } = work
  forcedRe.fill(0, at, at + TERMS)
  forcedIm.fill(0, at, at + TERMS)
  for (let r = 0; r < re.length; r++) {
    const from = r * TERMS
    const a = re[r]!
    const b = im[r]!
    if (a !== 0) addScaled(a, panel.displacementRe, panel.displacementIm, from, forcedRe, forcedIm, at)
    if (b !== 0) {
      for (let k = 0; k < TERMS; k++) {
        forcedRe[at + k]! -= b * panel.displacementIm[from + k]!
        forcedIm[at + k]! += b * panel.displacementRe[from + k]!
      }
    }
    const c = moves ? velocity[r]! : 0
    if (c !== 0) addScaled(c, panel.velocityRe, panel.velocityIm, from, forcedRe, forcedIm, at)
  }
}

function addScaled(
  factor: number,
  re: Float64Array,
  im: Float64Array,
  from: number,
  targetRe: Float64Array,
  targetIm: Float64Array,
  at: number,
): void {
  for (let k = 0; k < TERMS; k++) {
    targetRe[at + k]! += factor * re[from + k]!
    targetIm[at + k]! += factor * im[from + k]!
  }
}

/** Adds bounds of second and fourth derivative over the panel; also notes the highest power that counts. */
function boundDerivatives(work: SignalWork, at: number, d: number): number {
  let largest = 0
  let second = 0
  let fourth = 0
  for (let k = 0; k < TERMS; k++) {
    const re = work.forcedRe[at + k]!
    const im = work.forcedIm[at + k]!
    const size = Math.sqrt(re * re + im * im)
    const twice = k * (k - 1) * size
    second += twice
    fourth += (k - 2) * (k - 3) * twice
    if (size > largest) largest = size
  }
  for (let k = TERMS - 1; k > work.top; k--) {
    const size = Math.abs(work.forcedRe[at + k]!) + Math.abs(work.forcedIm[at + k]!)
    if (size > ROUNDING * largest) work.top = k
  }
  work.second[d]! += second
  work.fourth[d]! += fourth
  return second
}

function loadVibrations(work: SignalWork, panel: Panel, watch: Watch, o: number, least: number): number {
  const axes = watch.axes.length
  let kept = 0
  for (let j = 0; j < panel.count; j++) {
    const p = panel.freeRe[j]!
    const q = panel.freeIm[j]!
    const amplitude = Math.sqrt(p * p + q * q)
    const whole = watch.all.state[j]!
    if (!(amplitude * whole > least)) continue
    const at = o * panel.count + kept
    kept++
    work.kappaRe[at] = panel.kappaRe[j]!
    work.kappaIm[at] = panel.kappaIm[j]!
    for (let d = 0; d < axes; d++) {
      const { stateRe, stateIm, size } = watch.axes[d]!
      work.weightRe[at * 3 + d] = stateRe[j]! * p - stateIm[j]! * q
      work.weightIm[at * 3 + d] = stateRe[j]! * q + stateIm[j]! * p
      work.weightSize[at * 4 + d] = size.state[j]! * amplitude
    }
    if (axes > 1) work.weightSize[at * 4 + axes] = whole * amplitude
  }
  return kept
}

/** The loaded quantity at x. */
export function evaluateSignal(work: SignalWork, x: number, target: Sample): void {
  target.value.fill(0)
  target.forced.fill(0)
  target.free.fill(0)
  target.freeFourth.fill(0)
  for (let o = 0; o < work.orders; o++) {
    forcedMotion(work, o, x, target)
    addAmplitudes(work.axes, target.re, target.im, 3 * o, target.forced, 0)
    addVibrations(work, o, x, target)
    addAmplitudes(work.axes, target.re, target.im, 3 * o, target.value, 0)
  }
}

/** Value and derivative together, from the highest power down. */
function forcedMotion(
  { axes, top, forcedRe, forcedIm }: SignalWork,
  o: number,
  x: number,
  target: Sample,
): void {
  for (let d = 0; d < axes; d++) {
    const at = (o * 3 + d) * TERMS
    let re = 0
    let im = 0
    let slopeRe = 0
    let slopeIm = 0
    for (let k = top; k >= 0; k--) {
      slopeRe = slopeRe * x + re
      slopeIm = slopeIm * x + im
      re = re * x + forcedRe[at + k]!
      im = im * x + forcedIm[at + k]!
    }
    target.re[3 * o + d] = re
    target.im[3 * o + d] = im
    target.slopeRe[3 * o + d] = slopeRe
    target.slopeIm[3 * o + d] = slopeIm
  }
}

/** Adds the vibrations of an order at x to its motion, and their sizes to the bounds. */
function addVibrations(work: SignalWork, o: number, x: number, target: Sample): void {
  const { axes, kappaRe, kappaIm, weightRe, weightIm, weightSize } = work
  const { re, im, slopeRe, slopeIm, free, freeFourth } = target
  const first = o * work.march.poles.count
  const objectives = axes === 1 ? 1 : axes + 1
  for (let v = first; v < first + work.vibrations[o]!; v++) {
    const a = kappaRe[v]!
    const b = kappaIm[v]!
    const decay = Math.exp(a * (x + 1))
    const cos = decay * Math.cos(b * (x + 1))
    const sin = decay * Math.sin(b * (x + 1))
    for (let d = 0; d < axes; d++) {
      const p = weightRe[v * 3 + d]! * cos - weightIm[v * 3 + d]! * sin
      const q = weightRe[v * 3 + d]! * sin + weightIm[v * 3 + d]! * cos
      const at = 3 * o + d
      re[at]! += p
      im[at]! += q
      slopeRe[at]! += a * p - b * q
      slopeIm[at]! += a * q + b * p
    }
    const square = a * a + b * b
    for (let q = 0; q < objectives; q++) {
      const size = decay * weightSize[v * 4 + q]!
      free[q]! += size
      freeFourth[q]! += square * square * size
    }
  }
}
