/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Poles } from '../network/poles.ts'
import { emptyForceSeries, fillForceSeries, type ForceSeries } from './force-series.ts'
import { DEGREE, speedSeries, type PanelPlan } from './panel-plan.ts'
import type { StateLoad } from './state-load.ts'

/** So many more powers has a state's own series than its force's; exp(3.5 x) is then cut at 2e-11, quick at 1e-6. */
const MORE_POWERS = 8
/** Room for every series. */
export const TERMS = DEGREE.fine + MORE_POWERS + 1
/** Below this |kappa| a state's series runs upwards from its middle, above it downwards from its end. */
const SLOW = 3.5

/**
 * The states over one panel for one order, exact but for rounding and the cut of the series. With
 * x = (t - middle) / half the phase is order · (straight line + rest(x)); against the straight line a
 * state obeys v' = kappa v + half · g(x), kappa = half (lambda - i order speed), g a power series, so
 * v(x) = P(x) + c exp(kappa (x + 1)), P a polynomial: the forced motion, c exp(...): free vibration.
 */
export interface Panel {
  readonly count: number
  /** P_j: power k at j TERMS + k */
  readonly forcedRe: Float64Array
  readonly forcedIm: Float64Array
  /** how many powers P_j has, and whether the state is slow against the panel: 1 */
  readonly terms: Int32Array
  readonly slow: Uint8Array
  readonly freeRe: Float64Array
  readonly freeIm: Float64Array
  readonly kappaRe: Float64Array
  readonly kappaIm: Float64Array
  /** forced displacement of the modes: power k of mode r at r TERMS + k; the highest power that counts */
  readonly modesRe: Float64Array
  readonly modesIm: Float64Array
  readonly top: Int32Array
  /** the straight line's rate, order · speed in the middle [rad/s] */
  readonly rate: Float64Array
  /** order · rest at the panel's begin and end [rad] */
  readonly phase: Float64Array
  /** size of the series' last terms against their first: what has been cut */
  readonly cut: Float64Array
}

export interface PanelWork {
  readonly panel: Panel
  readonly force: ForceSeries
}

export function panelWork({ count, modes }: Poles, degree: number): PanelWork {
  const make = (size: number) => new Float64Array(size)
  return {
    panel: {
      count,
      forcedRe: make(count * TERMS),
      forcedIm: make(count * TERMS),
      terms: new Int32Array(count),
      slow: new Uint8Array(count),
      freeRe: make(count),
      freeIm: make(count),
      kappaRe: make(count),
      kappaIm: make(count),
      modesRe: make(modes * TERMS),
      modesIm: make(modes * TERMS),
      top: new Int32Array(1),
      rate: make(1),
      phase: make(2),
      cut: make(1),
    },
    force: emptyForceSeries(degree),
  }
}

/**
 * Fills `work.panel` for one panel and order.
 * @param begin states at its begin against the true phase (y exp(-i order phase)), re and im from `at` on
 */
export function fillPanel(
  work: PanelWork,
  plan: PanelPlan,
  index: number,
  poles: Poles,
  load: StateLoad,
  beginRe: Float64Array,
  beginIm: Float64Array,
  at: number,
): void {
  const half = plan.half[index]!
  const piece = plan.course.pieces[plan.piece[index]!]!
  const { panel, force } = work
  speedSeries(piece, plan.middle[index]!, half, force.speed)
  fillForceSeries(force, load.order, half)
  panel.phase.set(force.phase)
  panel.cut[0] = force.cut[0]!
  const w = load.order * force.speed[0]!
  panel.rate[0] = w
  const turnRe = Math.cos(panel.phase[0]!)
  const turnIm = Math.sin(panel.phase[0]!)
  for (let j = 0; j < panel.count; j++) {
    panel.kappaRe[j] = half * poles.re[j]!
    panel.kappaIm[j] = half * (poles.im[j]! - w)
    forcedMotion(work, load, j, half)
    const re = beginRe[at + j]!
    const im = beginIm[at + j]!
    freeMotion(panel, j, re * turnRe - im * turnIm, re * turnIm + im * turnRe)
  }
}

function forcedMotion({ panel, force }: PanelWork, load: StateLoad, j: number, half: number): void {
  const degree = force.speed.length - 1
  const { forcedRe: re, forcedIm: im } = panel
  const at = j * TERMS
  const a = load.constantRe[j]!
  const b = load.constantIm[j]!
  const c = load.squaredRe[j]!
  const d = load.squaredIm[j]!
  const e = load.inertialRe[j]!
  const f = load.inertialIm[j]!
  const { baseRe, baseIm, squareRe, squareIm, massRe, massIm } = force
  for (let k = 0; k <= degree; k++) {
    re[at + k] =
      half *
      (a * baseRe[k]! -
        b * baseIm[k]! +
        c * squareRe[k]! -
        d * squareIm[k]! +
        e * massRe[k]! -
        f * massIm[k]!)
    im[at + k] =
      half *
      (a * baseIm[k]! +
        b * baseRe[k]! +
        c * squareIm[k]! +
        d * squareRe[k]! +
        e * massIm[k]! +
        f * massRe[k]!)
  }
  const x = panel.kappaRe[j]!
  const y = panel.kappaIm[j]!
  const slow = x * x + y * y < SLOW * SLOW
  panel.slow[j] = slow ? 1 : 0
  panel.terms[j] = degree + 1 + (slow ? MORE_POWERS : 0)
  if (slow) seriesUp(re, im, at, x, y, degree)
  else seriesDown(re, im, at, x, y, degree)
}

/** In place: (k + 1) P_(k+1) = kappa P_k + g_k from P_0 = 0. */
function seriesUp(
  re: Float64Array,
  im: Float64Array,
  at: number,
  x: number,
  y: number,
  degree: number,
): void {
  let nextRe = re[at]!
  let nextIm = im[at]!
  re[at] = im[at] = 0
  for (let k = 0; k < degree + MORE_POWERS; k++) {
    const p = re[at + k]!
    const q = im[at + k]!
    const gRe = nextRe
    const gIm = nextIm
    nextRe = k < degree ? re[at + k + 1]! : 0
    nextIm = k < degree ? im[at + k + 1]! : 0
    re[at + k + 1] = (x * p - y * q + gRe) / (k + 1)
    im[at + k + 1] = (x * q + y * p + gIm) / (k + 1)
  }
}

/** In place: kappa P_k = (k + 1) P_(k+1) - g_k from the highest power down. */
function seriesDown(
  re: Float64Array,
  im: Float64Array,
  at: number,
  x: number,
  y: number,
  degree: number,
): void {
  const size = x * x + y * y
  const p = x / size
  const q = -y / size
  let aboveRe = 0
  let aboveIm = 0
  for (let k = degree; k >= 0; k--) {
    const a = (k + 1) * aboveRe - re[at + k]!
    const b = (k + 1) * aboveIm - im[at + k]!
    aboveRe = a * p - b * q
    aboveIm = a * q + b * p
    re[at + k] = aboveRe
    im[at + k] = aboveIm
  }
}

/** What the forced motion lacks at the panel's begin vibrates freely from there. */
function freeMotion(panel: Panel, j: number, beginRe: number, beginIm: number): void {
  const { forcedRe, forcedIm, terms } = panel
  const at = j * TERMS
  let re = 0
  let im = 0
  for (let k = terms[j]! - 1; k >= 0; k--) {
    const p = forcedRe[at + k]!
    const q = forcedIm[at + k]!
    re = p - re
    im = q - im
  }
  panel.freeRe[j] = beginRe - re
  panel.freeIm[j] = beginIm - im
}

/**
 * Sums the forced motion of the states into that of the modes. In the modes what two states of one
 * mode do against each other has gone, so that bounds of their size are close.
 */
export function forcedModes({ panel }: PanelWork, poles: Poles): void {
  const { modesRe, modesIm, forcedRe, forcedIm, terms } = panel
  modesRe.fill(0)
  modesIm.fill(0)
  for (let r = 0; r < poles.modes; r++) {
    const to = r * TERMS
    for (let j = 0; j < poles.count; j++) {
      const a = poles.shapeRe[r * poles.count + j]!
      const b = poles.shapeIm[r * poles.count + j]!
      if (a === 0 && b === 0) continue
      const from = j * TERMS
      const end = terms[j]!
      for (let k = 0; k < end; k++) {
        const p = forcedRe[from + k]!
        const q = forcedIm[from + k]!
        modesRe[to + k]! += a * p - b * q
        modesIm[to + k]! += a * q + b * p
      }
    }
  }
  panel.top[0] = highestPower(modesRe, modesIm, poles.modes)
}

/** Powers smaller than this share of the largest of a series are rounding. */
const ROUNDING = 1e-15

function highestPower(re: Float64Array, im: Float64Array, modes: number): number {
  let top = 0
  for (let r = 0; r < modes; r++) {
    let largest = 0
    for (let k = r * TERMS; k < (r + 1) * TERMS; k++) {
      largest = Math.max(largest, Math.abs(re[k]!) + Math.abs(im[k]!))
    }
    for (let k = TERMS - 1; k > top; k--) {
      if (Math.abs(re[r * TERMS + k]!) + Math.abs(im[r * TERMS + k]!) > ROUNDING * largest) top = k
    }
  }
  return top
}

/** States at the panel's end against the true phase, written from `at` on. */
export function panelEnd(panel: Panel, endRe: Float64Array, endIm: Float64Array, at: number): void {
  const { forcedRe, forcedIm, terms, count } = panel
  const turnRe = Math.cos(panel.phase[1]!)
  const turnIm = -Math.sin(panel.phase[1]!)
  for (let j = 0; j < count; j++) {
    let re = 0
    let im = 0
    for (let k = 0; k < terms[j]!; k++) {
      re += forcedRe[j * TERMS + k]!
      im += forcedIm[j * TERMS + k]!
    }
    const size = Math.exp(2 * panel.kappaRe[j]!)
    const cos = size * Math.cos(2 * panel.kappaIm[j]!)
    const sin = size * Math.sin(2 * panel.kappaIm[j]!)
    const a = panel.freeRe[j]!
    const b = panel.freeIm[j]!
    re += a * cos - b * sin
    im += a * sin + b * cos
    endRe[at + j] = re * turnRe - im * turnIm
    endIm[at + j] = re * turnIm + im * turnRe
  }
}
