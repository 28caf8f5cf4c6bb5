/**
 * Equal height at the fixed points: the closed form for an undamped host.
 * Every response curve, whatever the absorber's damping, passes through the two points P and Q; tuning
 * sets them level, and the damping is the mean (of squares) of the two that give a level tangent there.
 *
 * [1] J. P. Den Hartog, Mechanical Vibrations, 4th ed., McGraw-Hill, 1956 (damped vibration absorber).
 * [2] J. E. Brock, A note on the damped vibration absorber, J. Applied Mechanics 13, 1946.
 * [3] G. B. Warburton, Optimum absorber parameters for various combinations of response and excitation
 *     parameters, Earthquake Engineering and Structural Dynamics 10, 1982.
 */
import { InputError } from '../errors.ts'
import type { Kind } from './kinds.ts'

export interface FixedPointTuning {
  /** f = omega_a / omega_1 [-] */
  readonly frequencyRatio: number
  /** zeta_a = c / (2 m_a omega_a) [-] */
  readonly dampingRatio: number
  /** height of the curve at both fixed points, normalised as the kind [-] */
  readonly height: number
  /** g of the fixed points P and Q [-] */
  readonly fixedPointsAt: readonly [number, number]
  /** zeta_a² for which the tangent at P, at Q, is level [-] */
  readonly levelDampingSquared: readonly [number, number]
}

/**
 * @param kind its suspension factor is ignored: the closed form is for an undamped host
 * @param massRatio mu, > 0
 * @returns null where no level fixed points or no positive damping exist (large mass ratios of some kinds)
 * @throws InputError when the mass ratio is not finite and > 0
 * @example fixedPointTuning(kindOf({ excitation: 'force', response: 'displacement' }, 0), 0.05) // f = 1/1.05
 */
export function fixedPointTuning(kind: Kind, massRatio: number): FixedPointTuning | null {
  if (!(massRatio > 0 && Number.isFinite(massRatio))) {
    throw new InputError('massRatio', massRatio, 'must be a finite number above 0')
  }
  const squared = levelTuningSquared(kind, massRatio)
  if (squared === null || !(squared > 0)) return null
  const alpha = squared - 1
  const points =
    kind.numerator === 'absolute' ? absolutePoints(massRatio, alpha) : relativePoints(massRatio, alpha)
  if (points === null || !(points[0] > -1)) return null
  const level = points.map((delta) => levelCoefficientSquared(kind, massRatio, alpha, delta) / (4 * squared))
  const [atP, atQ] = level
  if (atP === undefined || atQ === undefined || !(atP + atQ > 0) || !Number.isFinite(atP + atQ)) return null
  return {
    frequencyRatio: Math.sqrt(squared),
    dampingRatio: Math.sqrt((atP + atQ) / 2),
    height: heightAt(kind, massRatio, points[0]),
    fixedPointsAt: [Math.sqrt(1 + points[0]), Math.sqrt(1 + points[1])],
    levelDampingSquared: [atP, atQ],
  }
}

/**
 * f² that sets the fixed points level. F0: [1]; F1, F2, R0: [3]. The others are not taken from a source:
 * they follow from the condition of equal height at the roots of the fixed-point equation below (each is
 * the root of a linear or quadratic equation in f²), and were confirmed against values computed apart.
 */
function levelTuningSquared(kind: Kind, mu: number): number | null {
  const m = 1 + mu
  if (kind.numerator === 'relative') {
    if (kind.power === 0) return (1 - mu / 2) / (m * m)
    if (kind.power === 2) return (1 + mu / 2) / (m * m)
    return null
  }
  switch (kind.power) {
    case 0:
      return 1 / (m * m)
    case 1:
      return (1 + mu / 2) / (m * m)
    case 2:
      return 1 / m
    case 3:
      return 1 / (1 + mu / 2)
    case 4:
      return 1
    case -1: {
      const under = 4 - 6 * mu
      return under < 0 ? null : ((Math.sqrt(2 * (2 + mu)) + Math.sqrt(under)) / (4 * m)) ** 2
    }
    case -2: {
      const under = (2 - mu) ** 2 - 8 * m * mu
      return under < 0 || mu >= 2 ? null : (2 - mu + Math.sqrt(under)) / (4 * m * m)
    }
    default:
      return null
  }
}

/*
 * Everything below is written in delta = g² - 1 and alpha = f² - 1: for small mass ratios the fixed
 * points crowd at g = 1 and the plain form would lose its digits.
 */

/** Roots of (2 + mu) g⁴ - 2 g² (1 + (1 + mu) f²) + 2 f² = 0, as g² - 1, rising. */
function absolutePoints(mu: number, alpha: number): readonly [number, number] | null {
  return quadraticRoots(2 + mu, -2 * (1 + mu) * alpha, -mu * (1 + 2 * alpha))
}

/** The same with ((1 + mu) A - g²) above the line: 2 m g⁴ - g² (1 + m + 2 m² f²) + 2 m f² = 0, m = 1 + mu. */
function relativePoints(mu: number, alpha: number): readonly [number, number] | null {
  const m = 1 + mu
  return quadraticRoots(2 * m, -mu * (1 + 2 * mu) - 2 * m * m * alpha, mu * (1 - 2 * m * (1 + alpha)))
}

function quadraticRoots(a: number, b: number, c: number): readonly [number, number] | null {
  const under = b * b - 4 * a * c
  if (!(under >= 0)) return null
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(under)) / 2
  if (q === 0) return [0, 0]
  const [one, other] = [q / a, c / q]
  return one < other ? [one, other] : [other, one]
}

/** (2 zeta_a f)² for which the tangent at the fixed point is level, by [2]. */
function levelCoefficientSquared(kind: Kind, mu: number, alpha: number, delta: number): number {
  const x = 1 + delta
  const m = 1 + mu
  const absolute = kind.numerator === 'absolute'
  const u = absolute ? alpha - delta : mu + m * alpha - delta
  const v = mu + m * delta
  const undamped = delta * delta - alpha * delta - mu * (1 + alpha) * x
  const undampedSlope = 2 * delta - alpha - mu * (1 + alpha)
  const ratio = absolute ? (u * u) / x : (u * u) / (m * m * x)
  return (-ratio * (kind.power / x - 2 / u - (2 * undampedSlope) / undamped)) / (kind.power / x - (2 * m) / v)
}

/** Height of the curve with a locked absorber, which every curve shares at a fixed point. */
function heightAt(kind: Kind, mu: number, delta: number): number {
  const locked = (1 + delta) ** (kind.power / 2) / Math.abs(mu + (1 + mu) * delta)
  return kind.numerator === 'relative' ? (1 + mu) * locked : locked
}
