/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Signal } from './signal.ts'

/**
 * How high a quantity rises between two samples. Each direction's motion is the cubic through both
 * values and derivatives but for length⁴ / 384 of its fourth derivative; the square of a cubic's
 * amplitude is a polynomial of degree six, nowhere above the largest of its Bernstein coefficients.
 * G. Farin, Curves and Surfaces for CAGD, 5th ed., Morgan Kaufmann, 2002 (convex hull property).
 */
export interface CrestWork {
  /** coefficient k of order o and direction d at (o 3 + d) 7 + k: squared amplitude, and square without conjugation */
  readonly square: Float64Array
  readonly plainRe: Float64Array
  readonly plainIm: Float64Array
  /** coefficients of one objective, order o from o 7 on, and all together */
  readonly byOrder: Float64Array
  readonly together: Float64Array
}

export function crestWork(orders: number): CrestWork {
  const make = (size: number) => new Float64Array(size)
  return {
    square: make(orders * 21),
    plainRe: make(orders * 21),
    plainIm: make(orders * 21),
    byOrder: make(orders * 7),
    together: make(7),
  }
}

/** Prepares the cubics between two samples. @param length of the interval in x */
export function loadCubics(
  work: CrestWork,
  axes: number,
  orders: number,
  a: Signal,
  b: Signal,
  length: number,
): void {
  for (let o = 0; o < orders; o++) {
    for (let d = 0; d < axes; d++) squares(work, a, b, 3 * o + d, length / 3, axes > 1)
  }
}

/**
 * Whether an objective (a direction, or the resultant after them) of the loaded cubics may exceed a
 * height; cheap bounds first.
 */
export function mayExceed(
  work: CrestWork,
  axes: number,
  orders: number,
  objective: number,
  height: number,
): boolean {
  if (!(height > 0)) return true
  let sum = 0
  for (let o = 0; o < orders; o++) {
    let top = 0
    for (let k = o * 21; k < o * 21 + 7; k++) {
      // the resultant is no longer than the length of the complex vector
      let square = 0
      if (objective < axes) square = work.square[k + 7 * objective]!
      else for (let d = 0; d < axes; d++) square += work.square[k + 7 * d]!
      if (square > top) top = square
    }
    sum += Math.sqrt(top)
  }
  if (sum <= height) return false
  for (let o = 0; o < orders; o++) ofOrder(work, axes, o, objective)
  combineOrders(work, orders)
  let top = 0
  for (let k = 0; k < 7; k++) if (work.together[k]! > top) top = work.together[k]!
  return top > height * height
}

/** Where in the interval (0 to 1) the objective that was asked for last has its crest. */
export function crestPlace({ together }: CrestWork): number {
  let best = 0
  let value = -Infinity
  for (let i = 0; i <= STEPS; i++) {
    const now = bernstein(together, i / STEPS)
    if (now <= value) continue
    value = now
    best = i
  }
  if (best === 0 || best === STEPS) return best / STEPS
  const before = bernstein(together, (best - 1) / STEPS)
  const after = bernstein(together, (best + 1) / STEPS)
  const bend = before - 2 * value + after
  return (best + (bend < 0 ? (before - after) / (2 * bend) : 0)) / STEPS
}

/** Height of the cubics' amplitude there. */
export function crestHeight({ together }: CrestWork, place: number): number {
  return Math.sqrt(Math.max(0, bernstein(together, place)))
}

const STEPS = 8

function bernstein(c: Float64Array, t: number): number {
  const s = 1 - t
  const s2 = s * s
  const t2 = t * t
  return (
    s2 * s2 * (s2 * c[0]! + 6 * s * t * c[1]! + 15 * t2 * c[2]!) +
    20 * s2 * s * t2 * t * c[3]! +
    t2 * t2 * (15 * s2 * c[4]! + 6 * s * t * c[5]! + t2 * c[6]!)
  )
}

/** Products of the control points i and j fall on coefficient i + j, with C(3,i) C(3,j) / C(6,i+j). */
function squares(work: CrestWork, a: Signal, b: Signal, at: number, third: number, plain: boolean): void {
  const { square, plainRe, plainIm } = work
  const r0 = a.re[at]!
  const i0 = a.im[at]!
  const r1 = r0 + third * a.slopeRe[at]!
  const i1 = i0 + third * a.slopeIm[at]!
  const r3 = b.re[at]!
  const i3 = b.im[at]!
  const r2 = r3 - third * b.slopeRe[at]!
  const i2 = i3 - third * b.slopeIm[at]!
  const k = at * 7
  square[k] = r0 * r0 + i0 * i0
  square[k + 1] = r0 * r1 + i0 * i1
  square[k + 2] = 0.6 * (r1 * r1 + i1 * i1) + 0.4 * (r0 * r2 + i0 * i2)
  square[k + 3] = 0.9 * (r1 * r2 + i1 * i2) + 0.1 * (r0 * r3 + i0 * i3)
  square[k + 4] = 0.6 * (r2 * r2 + i2 * i2) + 0.4 * (r1 * r3 + i1 * i3)
  square[k + 5] = r2 * r3 + i2 * i3
  square[k + 6] = r3 * r3 + i3 * i3
  if (!plain) return
  plainRe[k] = r0 * r0 - i0 * i0
  plainRe[k + 1] = r0 * r1 - i0 * i1
  plainRe[k + 2] = 0.6 * (r1 * r1 - i1 * i1) + 0.4 * (r0 * r2 - i0 * i2)
  plainRe[k + 3] = 0.9 * (r1 * r2 - i1 * i2) + 0.1 * (r0 * r3 - i0 * i3)
  plainRe[k + 4] = 0.6 * (r2 * r2 - i2 * i2) + 0.4 * (r1 * r3 - i1 * i3)
  plainRe[k + 5] = r2 * r3 - i2 * i3
  plainRe[k + 6] = r3 * r3 - i3 * i3
  plainIm[k] = 2 * r0 * i0
  plainIm[k + 1] = r0 * i1 + i0 * r1
  plainIm[k + 2] = 1.2 * r1 * i1 + 0.4 * (r0 * i2 + i0 * r2)
  plainIm[k + 3] = 0.9 * (r1 * i2 + i1 * r2) + 0.1 * (r0 * i3 + i0 * r3)
  plainIm[k + 4] = 1.2 * r2 * i2 + 0.4 * (r1 * i3 + i1 * r3)
  plainIm[k + 5] = r2 * i3 + i2 * r3
  plainIm[k + 6] = 2 * r3 * i3
}

/** Squared objective of one order: |F_d|², or (|F|² + |F.F|) / 2, of which a sum of |coefficients| is no less. */
function ofOrder({ square, plainRe, plainIm, byOrder }: CrestWork, axes: number, o: number, q: number): void {
  for (let k = 0; k < 7; k++) {
    if (q < axes) {
      byOrder[o * 7 + k] = square[(3 * o + q) * 7 + k]!
      continue
    }
    let size = 0
    let re = 0
    let im = 0
    for (let d = 0; d < axes; d++) {
      const at = (3 * o + d) * 7 + k
      size += square[at]!
      re += plainRe[at]!
      im += plainIm[at]!
    }
    byOrder[o * 7 + k] = (size + Math.sqrt(re * re + im * im)) / 2
  }
}

/**
 * Amplitudes of orders add: (sum A_o)² is at most sum A_o² / w_o for any shares w_o that sum to 1, and
 * equal where they are the orders' own shares.
 */
function combineOrders({ byOrder, together }: CrestWork, orders: number): void {
  if (orders === 1) {
    for (let k = 0; k < 7; k++) together[k] = byOrder[k]!
    return
  }
  let whole = 0
  for (let o = 0; o < orders; o++) whole += meanAmplitude(byOrder, o)
  together.fill(0)
  for (let o = 0; o < orders; o++) {
    const share = (meanAmplitude(byOrder, o) / whole + LEAST_SHARE) / (1 + LEAST_SHARE * orders)
    for (let k = 0; k < 7; k++) together[k]! += byOrder[o * 7 + k]! / share
  }
}

/** Keeps an order that stands still at both ends from counting without bound. */
const LEAST_SHARE = 1e-7

function meanAmplitude(byOrder: Float64Array, o: number): number {
  return Math.sqrt(Math.max(0, byOrder[o * 7]!)) + Math.sqrt(Math.max(0, byOrder[o * 7 + 6]!)) + 1e-300
}
