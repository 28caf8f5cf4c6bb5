/**
 * Damping of one freedom from what can be measured: free decay and the width of a resonance.
 * [1] S. S. Rao, Mechanical Vibrations. [2] W. T. Thomson, Theory of Vibration with Applications.
 * [3] D. J. Ewins, Modal Testing (single-freedom chapter).
 */
import { InputError } from '../errors.ts'

/** Natural logarithm of the ratio of successive maxima [1]: delta = 2 pi zeta / √(1 - zeta²). */
export function logDecrement(dampingRatio: number): number {
  if (!(dampingRatio >= 0 && dampingRatio < 1)) {
    throw new InputError('dampingRatio', dampingRatio, 'must be at least 0 and below 1')
  }
  return (2 * Math.PI * dampingRatio) / Math.sqrt(1 - dampingRatio ** 2)
}

/** Damping ratio from the logarithmic decrement [1], exact. */
export function dampingFromDecrement(decrement: number): number {
  return decrement / Math.hypot(2 * Math.PI, decrement)
}

/** Logarithmic decrement from two maxima `cycles` apart. @param ratio earlier over later amplitude */
export function decrementFromDecay(ratio: number, cycles: number): number {
  if (!(ratio > 0)) throw new InputError('ratio', ratio, 'must be greater than 0')
  if (!(cycles > 0)) throw new InputError('cycles', cycles, 'must be greater than 0')
  return Math.log(ratio) / cycles
}

/** Frequency ratios at which the square of the response is half that of its peak. */
export type HalfPower = readonly [low: number, high: number]

/** Half-power points of the receptance of a viscous single freedom [2]: r² = 1 - 2 zeta² ∓ 2 zeta √(1 - zeta²). */
export function receptanceHalfPower(dampingRatio: number): HalfPower {
  const middle = 1 - 2 * dampingRatio ** 2
  const half = 2 * dampingRatio * Math.sqrt(1 - dampingRatio ** 2)
  if (!(middle - half > 0)) {
    throw new InputError(
      'dampingRatio',
      dampingRatio,
      'must be below 0.38: above, the curve has no lower point',
    )
  }
  return [Math.sqrt(middle - half), Math.sqrt(middle + half)]
}

/** Half-power points of the mobility of a viscous single freedom: exactly 2 zeta apart. */
export function mobilityHalfPower(dampingRatio: number): HalfPower {
  const middle = Math.sqrt(1 + dampingRatio ** 2)
  return [middle - dampingRatio, middle + dampingRatio]
}

/** Half-power points of a hysteretic receptance [3]: r² = 1 ∓ eta, so that eta = (r2² - r1²) / 2. */
export function hystereticHalfPower(lossFactor: number): HalfPower {
  if (!(lossFactor >= 0 && lossFactor < 1)) {
    throw new InputError('lossFactor', lossFactor, 'must be at least 0 and below 1')
  }
  return [Math.sqrt(1 - lossFactor), Math.sqrt(1 + lossFactor)]
}
