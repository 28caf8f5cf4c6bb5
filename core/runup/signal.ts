/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { March } from './march.ts'
import { TERMS, type Panel } from './panel.ts'
import { resultant, type Watch } from './watch.ts'

/** One watched quantity at one instant: by direction, then the resultant; orders added up. */
export interface Sample {
  readonly value: Float64Array
  /** amplitude of the forced motion alone */
  readonly forced: Float64Array
  /** bound of the free vibration from here on, and of its curvature by x */
  readonly free: Float64Array
  readonly freeCurvature: Float64Array
}

export function sample(): Sample {
  const make = () => new Float64Array(4)
  return { value: make(), forced: make(), free: make(), freeCurvature: make() }
}

/** Free vibrations smaller than this share of the peak are left out of a quantity. */
const NEGLIGIBLE = 1e-13

/** A watched quantity over one panel: a polynomial per order and direction, and the free vibrations that count. */
export interface SignalWork {
  readonly orders: number
  readonly panels: readonly Panel[]
  readonly keep: (order: number, panel: Panel) => void
  axes: number
  /** power k of order o and direction d at (o 3 + d) TERMS + k */
  readonly forcedRe: Float64Array
  readonly forcedIm: Float64Array
  /** highest power that counts */
  top: number
  /** bound of the forced motion's curvature, by direction and resultant */
  readonly curvature: Float64Array
  /** free vibrations: how many of each order, and per vibration kappa, weights by direction, length */
  readonly vibrations: Int32Array
  readonly kappaRe: Float64Array
  readonly kappaIm: Float64Array
  readonly weightRe: Float64Array
  readonly weightIm: Float64Array
  readonly weightSize: Float64Array
  /** the directions at one instant, while it is computed */
  readonly nowRe: Float64Array
  readonly nowIm: Float64Array
}

export function signalWork({ poles, loads }: March): SignalWork {
  const orders = loads.length
  const { count } = poles
  const make = (size: number) => new Float64Array(size)
  const panels = loads.map((): Panel => ({
    count,
    forcedRe: make(count * TERMS),
    forcedIm: make(count * TERMS),
    freeRe: make(count),
    freeIm: make(count),
    kappaRe: make(count),
    kappaIm: make(count),
    bound: make(count),
    phase: make(2),
    cut: make(1),
  }))
  return {
    orders,
    panels,
    keep: (order, from) => {
      const to = panels[order]!
      to.forcedRe.set(from.forcedRe)
      to.forcedIm.set(from.forcedIm)
      to.freeRe.set(from.freeRe)
      to.freeIm.set(from.freeIm)
      to.kappaRe.set(from.kappaRe)
      to.kappaIm.set(from.kappaIm)
      to.phase.set(from.phase)
    },
    axes: 0,
    forcedRe: make(orders * 3 * TERMS),
    forcedIm: make(orders * 3 * TERMS),
    top: 0,
    curvature: make(4),
    vibrations: new Int32Array(orders),
    kappaRe: make(orders * count),
    kappaIm: make(orders * count),
    weightRe: make(orders * count * 3),
    weightIm: make(orders * count * 3),
    weightSize: make(orders * count * 4),
    nowRe: make(3),
    nowIm: make(3),
  }
}

/** @param scale values below which nothing matters, by direction and resultant */
export function loadSignal(work: SignalWork, watch: Watch, scale: Float64Array): void {
  const axes = watch.axes.length
  work.axes = axes
  work.top = 0
  const least = NEGLIGIBLE * scale[scale.length - 1]!
  work.curvature.fill(0)
  for (let o = 0; o < work.orders; o++) {
    const panel = work.panels[o]!
    let total = 0
    for (let d = 0; d < axes; d++) {
      combineForced(work, panel, watch, o, d)
      const bend = curvatureOf(work, (o * 3 + d) * TERMS)
      work.curvature[d]! += bend
      total += bend * bend
    }
    if (axes > 1) work.curvature[axes]! += Math.sqrt(total)
    work.vibrations[o] = loadVibrations(work, panel, watch, o, least)
  }
}

function combineForced(work: SignalWork, panel: Panel, watch: Watch, o: number, d: number): void {
  const { re: wRe, im: wIm } = watch.axes[d]!
  const { forcedRe, forcedIm } = work
  const at = (o * 3 + d) * TERMS
  forcedRe.fill(0, at, at + TERMS)
  forcedIm.fill(0, at, at + TERMS)
  for (let j = 0; j < panel.count; j++) {
    const a = wRe[j]!
    const b = wIm[j]!
    if (a === 0 && b === 0) continue
    const from = j * TERMS
    for (let k = 0; k < TERMS; k++) {
      const re = panel.forcedRe[from + k]!
      const im = panel.forcedIm[from + k]!
      forcedRe[at + k]! += a * re - b * im
      forcedIm[at + k]! += a * im + b * re
    }
  }
}

/** Bound of the second derivative over the panel; also notes the highest power that counts. */
function curvatureOf(work: SignalWork, at: number): number {
  let largest = 0
  let bend = 0
  for (let k = 0; k < TERMS; k++) {
    const re = work.forcedRe[at + k]!
    const im = work.forcedIm[at + k]!
    const size = Math.sqrt(re * re + im * im)
    bend += k * (k - 1) * size
    largest = Math.max(largest, size)
  }
  for (let k = TERMS - 1; k > work.top; k--) {
    const size = Math.abs(work.forcedRe[at + k]!) + Math.abs(work.forcedIm[at + k]!)
    if (size > NEGLIGIBLE * largest) work.top = k
  }
  return bend
}

function loadVibrations(work: SignalWork, panel: Panel, watch: Watch, o: number, least: number): number {
  const axes = watch.axes.length
  let kept = 0
  for (let j = 0; j < panel.count; j++) {
    const p = panel.freeRe[j]!
    const q = panel.freeIm[j]!
    const amplitude = Math.sqrt(p * p + q * q)
    if (!(amplitude * watch.size[j]! > least)) continue
    const at = o * panel.count + kept
    kept++
    work.kappaRe[at] = panel.kappaRe[j]!
    work.kappaIm[at] = panel.kappaIm[j]!
    for (let d = 0; d < axes; d++) {
      const { re, im, size } = watch.axes[d]!
      work.weightRe[at * 3 + d] = re[j]! * p - im[j]! * q
      work.weightIm[at * 3 + d] = re[j]! * q + im[j]! * p
      work.weightSize[at * 4 + d] = size[j]! * amplitude
    }
    if (axes > 1) work.weightSize[at * 4 + axes] = watch.size[j]! * amplitude
  }
  return kept
}

/** The loaded quantity at x. */
export function evaluateSignal(work: SignalWork, x: number, target: Sample): void {
  const { orders } = work
  const { value, forced, free, freeCurvature } = target
  value.fill(0)
  forced.fill(0)
  free.fill(0)
  freeCurvature.fill(0)
  for (let o = 0; o < orders; o++) {
    forcedMotion(work, o, x)
    addAmplitudes(work, forced)
    addVibrations(work, o, x, free, freeCurvature)
    addAmplitudes(work, value)
  }
}

/** Puts one order's motion at x into `work.now`, against its straight phase. */
export function evaluateOrder(work: SignalWork, o: number, x: number, scratch: Sample): void {
  forcedMotion(work, o, x)
  addVibrations(work, o, x, scratch.free, scratch.freeCurvature)
}

function forcedMotion({ axes, top, forcedRe, forcedIm, nowRe, nowIm }: SignalWork, o: number, x: number) {
  for (let d = 0; d < axes; d++) {
    const at = (o * 3 + d) * TERMS
    let re = 0
    let im = 0
    for (let k = top; k >= 0; k--) {
      re = re * x + forcedRe[at + k]!
      im = im * x + forcedIm[at + k]!
    }
    nowRe[d] = re
    nowIm[d] = im
  }
}

/** Adds the vibrations of an order at x to the directions' values, and their sizes to the bounds. */
function addVibrations(
  work: SignalWork,
  o: number,
  x: number,
  free: Float64Array,
  freeCurvature: Float64Array,
): void {
  const { axes, kappaRe, kappaIm, weightRe, weightIm, weightSize, nowRe, nowIm } = work
  const first = o * work.panels[o]!.count
  const objectives = axes === 1 ? 1 : axes + 1
  for (let v = first; v < first + work.vibrations[o]!; v++) {
    const a = kappaRe[v]!
    const b = kappaIm[v]!
    const decay = Math.exp(a * (x + 1))
    const cos = decay * Math.cos(b * (x + 1))
    const sin = decay * Math.sin(b * (x + 1))
    for (let d = 0; d < axes; d++) {
      const p = weightRe[v * 3 + d]!
      const q = weightIm[v * 3 + d]!
      nowRe[d]! += p * cos - q * sin
      nowIm[d]! += p * sin + q * cos
    }
    const square = a * a + b * b
    for (let q = 0; q < objectives; q++) {
      const size = decay * weightSize[v * 4 + q]!
      free[q]! += size
      freeCurvature[q]! += square * size
    }
  }
}

function addAmplitudes({ axes, nowRe, nowIm }: SignalWork, target: Float64Array): void {
  let square = 0
  let re = 0
  let im = 0
  for (let d = 0; d < axes; d++) {
    const p = nowRe[d]!
    const q = nowIm[d]!
    target[d]! += Math.sqrt(p * p + q * q)
    square += p * p + q * q
    re += p * p - q * q
    im += 2 * p * q
  }
  if (axes > 1) target[axes]! += resultant(square, re, im)
}
