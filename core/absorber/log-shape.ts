/**
 * Logarithm of the squared response curve with its exact first and second derivatives in
 * delta = g² - 1, alpha = f² - 1 and b = 2 zeta_a f, and the polynomial whose roots are its level points.
 *   L = n ln x + [suspension] ln(1 + h² x) + ln N - ln(R² + x I²),   x = 1 + delta,
 *   R = delta² - alpha delta - (h b + mu (1 + alpha)) x,   I = h (alpha - delta) - b (mu + (1 + mu) delta),
 *   N = w² + q² b² x with w = alpha - delta, q = 1 (absolute motion),
 *       w = mu + (1 + mu) alpha - delta, q = 1 + mu (relative motion), N = 1 (travel).
 * It is the magnitude of the ratios in `kinds.ts` squared, written about g = f = 1 without cancellation.
 */
import { polynomialDerivative, polynomialProduct } from '../numerics/polynomial.ts'
import type { Shape } from './kinds.ts'

export interface LogShape {
  readonly mu: number
  /** h = 2 zeta_1 */
  readonly h: number
  readonly power: number
  /** 1 when the suspension's factor enters, else 0 */
  readonly suspension: 0 | 1
  readonly numerator: Shape['numerator']
}

/** Value, gradient and second derivatives; d, a, b stand for delta, alpha, b. */
export interface LogShapeJet {
  readonly value: number
  readonly d: number
  readonly a: number
  readonly b: number
  readonly dd: number
  readonly aa: number
  readonly bb: number
  readonly da: number
  readonly db: number
  readonly ab: number
}

export function logShape(shape: Shape, massRatio: number, hostDamping: number): LogShape {
  return {
    mu: massRatio,
    h: 2 * hostDamping,
    power: shape.power,
    suspension: shape.suspension && hostDamping > 0 ? 1 : 0,
    numerator: shape.numerator,
  }
}

/** Magnitude of the curve; infinite only at an undamped resonance. */
export function magnitudeAt(shape: LogShape, delta: number, alpha: number, b: number): number {
  const { mu, h } = shape
  const x = 1 + delta
  const re = delta * delta - alpha * delta - (h * b + mu * (1 + alpha)) * x
  const im = h * (alpha - delta) - b * (mu + (1 + mu) * delta)
  let squared = x ** shape.power / (re * re + x * im * im)
  if (shape.numerator === 'absolute') squared *= (alpha - delta) ** 2 + b * b * x
  else if (shape.numerator === 'relative') {
    squared *= (mu + (1 + mu) * alpha - delta) ** 2 + (1 + mu) ** 2 * b * b * x
  }
  if (shape.suspension === 1) squared *= 1 + h * h * x
  return Math.sqrt(squared)
}

export function logShapeJet(shape: LogShape, delta: number, alpha: number, b: number): LogShapeJet {
  const { mu, h, power } = shape
  const m = 1 + mu
  const x = 1 + delta

  const r = delta * delta - alpha * delta - (h * b + mu * (1 + alpha)) * x
  const rd = 2 * delta - alpha - (h * b + mu * (1 + alpha))
  const ra = -delta - mu * x
  const rb = -h * x
  const i = h * (alpha - delta) - b * (mu + m * delta)
  const id = -h - m * b
  const ia = h
  const ib = -(mu + m * delta)

  const q = r * r + x * i * i
  const qd = (2 * (r * rd + x * i * id) + i * i) / q
  const qa = (2 * (r * ra + x * i * ia)) / q
  const qb = (2 * (r * rb + x * i * ib)) / q
  const qdd = (2 * (rd * rd + 2 * r + x * id * id) + 4 * i * id) / q
  const qaa = (2 * (ra * ra + x * ia * ia)) / q
  const qbb = (2 * (rb * rb + x * ib * ib)) / q
  const qda = (2 * (rd * ra - m * r + x * id * ia) + 2 * i * ia) / q
  const qdb = (2 * (rd * rb - h * r + x * (id * ib - m * i)) + 2 * i * ib) / q
  const qab = (2 * (ra * rb + x * ia * ib)) / q

  let value = -Math.log(q)
  let d = -qd
  let a = -qa
  let bb = qb * qb - qbb
  let bFirst = -qb
  let dd = qd * qd - qdd
  let aa = qa * qa - qaa
  let da = qd * qa - qda
  let db = qd * qb - qdb
  let ab = qa * qb - qab

  if (power !== 0) {
    value += power * Math.log(x)
    d += power / x
    dd -= power / (x * x)
  }
  if (shape.suspension === 1) {
    const factor = 1 + h * h * x
    value += Math.log(factor)
    d += (h * h) / factor
    dd -= ((h * h) / factor) ** 2
  }
  if (shape.numerator !== 'travel') {
    const wa = shape.numerator === 'absolute' ? 1 : m
    const w = shape.numerator === 'absolute' ? alpha - delta : mu + m * alpha - delta
    const n = w * w + wa * wa * b * b * x
    const nd = (-2 * w + wa * wa * b * b) / n
    const na = (2 * w * wa) / n
    const nb = (2 * wa * wa * b * x) / n
    value += Math.log(n)
    d += nd
    a += na
    bFirst += nb
    dd += 2 / n - nd * nd
    aa += (2 * wa * wa) / n - na * na
    bb += (2 * wa * wa * x) / n - nb * nb
    da += (-2 * wa) / n - nd * na
    db += (2 * wa * wa * b) / n - nd * nb
    ab -= na * nb
  }
  return { value, d, a, b: bFirst, dd, aa, bb, da, db, ab }
}

/** Polynomial in delta that vanishes where the curve is level (and changes sign with its slope). */
export function levelPolynomial(shape: LogShape, alpha: number, b: number): Float64Array {
  const { mu, h, power } = shape
  const m = 1 + mu
  const loaded = h * b + mu * (1 + alpha)
  const re = [-loaded, -alpha - loaded, 1]
  const im = [h * alpha - mu * b, -h - m * b]
  const q = polynomialProduct(re, re)
  const im2 = polynomialProduct(im, im)
  const q0 = [im2[0] ?? 0, (im2[0] ?? 0) + (im2[1] ?? 0), (im2[1] ?? 0) + (im2[2] ?? 0), im2[2] ?? 0]
  for (let k = 0; k < 4; k++) q[k] = (q[k] ?? 0) + (q0[k] ?? 0)
  const n = numeratorPolynomial(shape, alpha, b)
  const level = polynomialProduct(polynomialDerivative(n), q)
  const other = polynomialProduct(n, polynomialDerivative(q))
  const slope = new Float64Array(Math.max(level.length, other.length))
  for (let k = 0; k < slope.length; k++) slope[k] = (level[k] ?? 0) - (other[k] ?? 0)
  if (power === 0 && shape.suspension === 0) return slope

  // x (1 + h² x) N'Q... + (power (1 + h² x) + h² x) N Q, less the factors that are not needed
  const nq = polynomialProduct(n, q)
  const carried = shape.suspension === 1 ? [1 + h * h, h * h] : [1]
  const before = power === 0 ? carried : polynomialProduct(carried, [1, 1])
  const h2 = shape.suspension === 1 ? h * h : 0
  const beside =
    power === 0 ? [h2] : shape.suspension === 1 ? [power + (power + 1) * h2, (power + 1) * h2] : [power]
  const first = polynomialProduct(before, slope)
  const second = polynomialProduct(beside, nq)
  const sum = new Float64Array(Math.max(first.length, second.length))
  for (let k = 0; k < sum.length; k++) sum[k] = (first[k] ?? 0) + (second[k] ?? 0)
  return sum
}

function numeratorPolynomial(shape: LogShape, alpha: number, b: number): readonly number[] {
  if (shape.numerator === 'travel') return [1]
  if (shape.numerator === 'absolute') return [alpha * alpha + b * b, b * b - 2 * alpha, 1]
  const m = 1 + shape.mu
  const w0 = shape.mu + m * alpha
  return [w0 * w0 + m * m * b * b, m * m * b * b - 2 * w0, 1]
}
