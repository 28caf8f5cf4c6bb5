import type { Complex } from '../../../core/results.ts'
import { sourceOf, type Check, type ReferenceCase } from '../check-type.ts'

type Through = Check['through']

/**
 * Makes checks of one case whose tolerance is the file's relative one.
 * @returns a function of quantity, unit, expected value and ours
 */
export function checkMaker(given: ReferenceCase<unknown, unknown>) {
  return (
    quantity: string,
    unit: string,
    expected: number,
    through: Through,
    ours: () => number,
    tolerance = given.tolerance.rel * Math.abs(expected),
  ): Check => ({
    id: `${given.id} ${quantity}`,
    source: sourceOf(given),
    quantity,
    unit,
    expected,
    tolerance,
    through,
    ours,
  })
}

export function magnitude({ re, im }: Complex): number {
  return Math.hypot(re, im)
}

export function quotient(a: Complex, b: Complex): Complex {
  const square = b.re * b.re + b.im * b.im
  return { re: (a.re * b.re + a.im * b.im) / square, im: (a.im * b.re - a.re * b.im) / square }
}

/** Phase [deg], taken on the turn nearest to `near`: -180° and 180° are one direction. */
export function phaseNear(value: Complex, near: number): number {
  const phase = (Math.atan2(value.im, value.re) * 180) / Math.PI
  return phase + 360 * Math.round((near - phase) / 360)
}

/** For a quantity that the result must have. */
export function missing(): never {
  throw new Error('not computed')
}
