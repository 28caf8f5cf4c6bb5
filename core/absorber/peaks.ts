/**
 * Peaks of a response curve, located exactly. In x = g² the squared magnitude is a ratio of polynomials,
 *   x^n (1 + h² x)^s N / Q,   h = 2 zeta_1,   Q = R² + x I²,
 * so the curve is level where a polynomial of degree 7 at most vanishes: all its real roots are found
 * between verified brackets, none can be missed between samples. Everything is expanded about g = f = 1
 * (delta = x - 1, alpha = f² - 1), where the peaks of small absorbers crowd together.
 */
import {
  polynomialDerivative,
  polynomialProduct,
  polynomialValue,
  realRoots,
} from '../numerics/polynomial.ts'
import { unboundedAt, valueAtInfinity, valueAtZero, type Shape } from './kinds.ts'
import { levelPolynomial, logShape, logShapeJet, magnitudeAt, type LogShape } from './log-shape.ts'
import type { HostAndAbsorber } from './response.ts'

export interface Peak {
  /** g at which it stands [-] */
  readonly at: number
  /** g² - 1, with more digits near 1 [-] */
  readonly delta: number
  /** magnitude, normalised as the shape */
  readonly height: number
}

export interface WorstPeak {
  /** largest magnitude over all g > 0; null when it is unbounded */
  readonly height: number | null
  /** every local maximum, g rising; null height never enters here */
  readonly peaks: readonly Peak[]
  /** true where the limit at g = 0 or at g to infinity is the largest, no peak in between */
  readonly atEnd: boolean
}

/** Local maxima of the shape over g > 0 and the largest magnitude. */
export function worstPeak(shape: Shape, system: HostAndAbsorber): WorstPeak {
  const { massRatio: mu, hostDamping, frequencyRatio: f, dampingRatio } = system
  const logarithm = logShape(shape, mu, hostDamping)
  const peaks = localMaxima(logarithm, (f - 1) * (f + 1), 2 * dampingRatio * f)
  if (peaks === null || unboundedAt(shape, hostDamping) !== null) {
    return { height: null, peaks: peaks ?? [], atEnd: peaks !== null }
  }
  const end = Math.max(valueAtZero(shape, mu, f), valueAtInfinity(shape, hostDamping))
  const highest = peaks.reduce((most, peak) => Math.max(most, peak.height), 0)
  return { height: Math.max(end, highest), peaks, atEnd: highest < end }
}

/**
 * Local maxima by rising g, or null when a resonance is not damped at all.
 * @param alpha f² - 1
 * @param b 2 zeta_a f
 */
export function localMaxima(shape: LogShape, alpha: number, b: number): Peak[] | null {
  if (b === 0 && shape.h === 0) return null
  const peaks: Peak[] = []
  const level = levelPolynomial(shape, alpha, b)
  const falling = polynomialDerivative(level)
  for (const root of realRoots(level, -1, farthest(shape, alpha, b), ROOT_STEP)) {
    if (root <= -1 || polynomialValue(falling, root) > 0) continue
    let delta = root
    let jet = logShapeJet(shape, delta, alpha, b)
    // One step of Newton's method on the factored form wins back digits that expanding it cost
    const step = -jet.d / jet.dd
    if (Math.abs(step) < 1e-3 * Math.min(Math.abs(delta), 1 + delta)) {
      delta += step
      jet = logShapeJet(shape, delta, alpha, b)
    }
    if (!(jet.dd < 0)) continue
    const height = magnitudeAt(shape, delta, alpha, b)
    if (!Number.isFinite(height)) return null
    peaks.push({ at: Math.sqrt(1 + delta), delta, height })
  }
  return peaks
}

/** The step of Newton's method that follows squares what this leaves. */
const ROOT_STEP = 1e-7

/**
 * A delta beyond every peak. Past the largest root of the denominator the curve follows a single power of
 * g; at 10 000 times that distance it is within 1e-4 of its slope there and any wave left is below 1e-8.
 */
function farthest(shape: LogShape, alpha: number, b: number): number {
  const { mu, h } = shape
  const a = 1 + alpha
  return 1e4 * (1 + a * (1 + mu) + h * h + (1 + mu) ** 2 * b * b + h * b)
}

/** Largest magnitude of the bare host and the g of its peak; null when it is unbounded. */
export function barePeak(shape: Shape, hostDamping: number): { height: number; at: number | null } | null {
  if (hostDamping === 0) return null
  const h2 = (2 * hostDamping) ** 2
  // x^n (1 + h² x)^s / Q with Q = (1 - x)² + h² x, level where its derivative vanishes, in delta = x - 1
  const q = [h2, h2, 1]
  const s = shape.suspension ? 1 : 0
  if (shape.power < 0 || shape.power + s > 2) return null
  const slope = [h2, 2]
  const level = new Float64Array(5)
  const carried = s === 1 ? [1 + h2, h2] : [1]
  const add = (factors: readonly (readonly number[])[], sign: number) => {
    let product: ArrayLike<number> = [sign]
    for (const factor of factors) product = polynomialProduct(product, factor)
    for (let k = 0; k < product.length; k++) level[k] = (level[k] ?? 0) + (product[k] ?? 0)
  }
  add([[1, 1], carried, slope], -1)
  add([carried, q], shape.power)
  if (s === 1) add([[h2], [1, 1], q], 1)
  let best = { height: shape.power === 0 ? 1 : 0, at: null as number | null }
  if (shape.power + s === 2) best = { height: s === 1 ? 2 * hostDamping : 1, at: null }
  for (const delta of realRoots(level, -1, 1e4 * (2 + h2))) {
    if (delta <= -1) continue
    const x = 1 + delta
    const height = Math.sqrt((x ** shape.power * (s === 1 ? 1 + h2 * x : 1)) / (delta * delta + h2 * x))
    if (height > best.height) best = { height, at: Math.sqrt(x) }
  }
  return best
}
