/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Sample, SignalWork } from './signal.ts'

/**
 * Upper bound of a watched quantity between two samples. Each direction's motion is the cubic through
 * both values and derivatives but for length⁴ / 384 of its fourth derivative; the square of a cubic's
 * amplitude is a polynomial of degree six, nowhere above the largest of its Bernstein coefficients.
 * G. Farin, Curves and Surfaces for CAGD, 5th ed., Morgan Kaufmann, 2002 (convex hull property).
 */
export interface CrestWork {
  /** coefficient k of order o and direction d at (o 3 + d) 7 + k: squared amplitude, and square without conjugation */
  readonly square: Float64Array
  readonly plainRe: Float64Array
  readonly plainIm: Float64Array
  /** coefficients of one objective and order */
  readonly one: Float64Array
  readonly sum: Float64Array
  /** bound by objective, and where in the interval (0 to 1) the crest seems to stand */
  readonly bound: Float64Array
  readonly at: Float64Array
}

export function crestWork(orders: number): CrestWork {
  const make = (size: number) => new Float64Array(size)
  return {
    square: make(orders * 21),
    plainRe: make(orders * 21),
    plainIm: make(orders * 21),
    one: make(7),
    sum: make(7),
    bound: make(4),
    at: make(4),
  }
}

/** Bounds without what the cubics leave out, written to `work.bound`, and guesses of the crests to `work.at`. */
export function crests(work: CrestWork, signal: SignalWork, a: Sample, b: Sample, length: number): void {
  const { axes, orders } = signal
  for (let o = 0; o < orders; o++) {
    for (let d = 0; d < axes; d++) squares(work, a, b, 3 * o + d, length / 3)
  }
  const objectives = axes === 1 ? 1 : axes + 1
  for (let q = 0; q < objectives; q++) {
    combineOrders(work, axes, orders, q)
    const { sum } = work
    let top = 0
    for (let k = 0; k < 7; k++) if (sum[k]! > top) top = sum[k]!
    work.bound[q] = Math.sqrt(top)
    const rise = sum[1]! - sum[0]!
    const fall = sum[5]! - sum[6]!
    work.at[q] = rise > 0 && fall > 0 ? rise / (rise + fall) : 0.5
  }
}

/** Products of the control points i and j fall on coefficient i + j, with C(3,i) C(3,j) / C(6,i+j). */
function squares(work: CrestWork, a: Sample, b: Sample, at: number, third: number): void {
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

/**
 * Squared objective as Bernstein coefficients. Amplitudes of orders add: (sum A_o)² is at most
 * sum A_o² / w_o for any shares w_o that sum to 1, and equal where they are the orders' own shares.
 */
function combineOrders(work: CrestWork, axes: number, orders: number, q: number): void {
  const { one, sum } = work
  if (orders === 1) {
    ofOrder(work, axes, 0, q, sum)
    return
  }
  let whole = 0
  for (let o = 0; o < orders; o++) {
    ofOrder(work, axes, o, q, one)
    whole += meanAmplitude(one)
  }
  sum.fill(0)
  for (let o = 0; o < orders; o++) {
    ofOrder(work, axes, o, q, one)
    const share = Math.max(meanAmplitude(one) / whole, 1e-6) / (1 + 1e-6 * orders)
    for (let k = 0; k < 7; k++) sum[k]! += one[k]! / share
  }
}

function meanAmplitude(one: Float64Array): number {
  return Math.sqrt(Math.max(0, one[0]!)) + Math.sqrt(Math.max(0, one[6]!)) + 1e-300
}

function ofOrder(work: CrestWork, axes: number, o: number, q: number, target: Float64Array): void {
  const { square, plainRe, plainIm } = work
  for (let k = 0; k < 7; k++) {
    if (q < axes) {
      target[k] = square[(3 * o + q) * 7 + k]!
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
    target[k] = (size + Math.sqrt(re * re + im * im)) / 2
  }
}
