/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Watch } from './watch.ts'

/** How many values a quantity is judged by. */
export const objectivesOf = ({ axes }: Watch): number => (axes.length === 1 ? 1 : axes.length + 1)

/** Longer half-axis of the ellipse that a complex vector F draws: sqrt((|F|² + |F.F|) / 2). */
export function resultant(square: number, unconjugatedRe: number, unconjugatedIm: number): number {
  return Math.sqrt(
    (square + Math.sqrt(unconjugatedRe * unconjugatedRe + unconjugatedIm * unconjugatedIm)) / 2,
  )
}

/** Adds the amplitudes of one order's directions, and of three the resultant's, to `target` from `to` on. */
export function addAmplitudes(
  axes: number,
  re: Float64Array,
  im: Float64Array,
  from: number,
  target: Float64Array,
  to: number,
): void {
  let square = 0
  let unconjugatedRe = 0
  let unconjugatedIm = 0
  for (let d = 0; d < axes; d++) {
    const p = re[from + d]!
    const q = im[from + d]!
    target[to + d]! += Math.sqrt(p * p + q * q)
    square += p * p + q * q
    unconjugatedRe += p * p - q * q
    unconjugatedIm += 2 * p * q
  }
  if (axes > 1) target[to + axes]! += resultant(square, unconjugatedRe, unconjugatedIm)
}

const MOST_AXES = 3

export interface AmplitudeWork {
  readonly re: Float64Array
  readonly im: Float64Array
}
export const amplitudeWork = (): AmplitudeWork => ({
  re: new Float64Array(MOST_AXES),
  im: new Float64Array(MOST_AXES),
})

/**
 * Amplitudes of a quantity from the states of every order, orders added up, written from `to` on.
 * @param apart from one order's states to the next's
 */
export function amplitudesOfStates(
  work: AmplitudeWork,
  watch: Watch,
  orders: number,
  apart: number,
  re: Float64Array,
  im: Float64Array,
  from: number,
  target: Float64Array,
  to: number,
): void {
  const axes = watch.axes.length
  target.fill(0, to, to + objectivesOf(watch))
  for (let o = 0; o < orders; o++) {
    const at = from + o * apart
    for (let d = 0; d < axes; d++) {
      const { stateRe, stateIm } = watch.axes[d]!
      let x = 0
      let y = 0
      for (let j = 0; j < stateRe.length; j++) {
        const p = re[at + j]!
        const q = im[at + j]!
        x += stateRe[j]! * p - stateIm[j]! * q
        y += stateRe[j]! * q + stateIm[j]! * p
      }
      work.re[d] = x
      work.im[d] = y
    }
    addAmplitudes(axes, work.re, work.im, 0, target, to)
  }
}
