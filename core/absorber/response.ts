/**
 * Host with absorber at given parameters, as two coupled freedoms. Symbols in `kinds.ts`.
 * Source: J. P. Den Hartog, Mechanical Vibrations, 4th ed., 1956 (damped vibration absorber), with a
 * damped host from the equations of motion.
 */
import type { Complex } from '../results.ts'
import type { Shape } from './kinds.ts'

export interface HostAndAbsorber {
  /** mu = m_a / m, > 0 [-] */
  readonly massRatio: number
  /** zeta_1, host's own [-] */
  readonly hostDamping: number
  /** f = omega_a / omega_1 [-] */
  readonly frequencyRatio: number
  /** zeta_a = c / (2 m_a omega_a) [-] */
  readonly dampingRatio: number
  /** loss factor of the absorber's spring, k_a (1 + i eta) [-]; 0 when left out */
  readonly lossFactor?: number
}

/**
 * Complex value of a shape at g = omega / omega_1. The relative motion carries its physical sign: it is
 * -R<n> for a support acceleration of +1.
 * @returns zero over zero never occurs for mu > 0; at an undamped resonance the parts are not finite
 */
export function shapeValue(shape: Shape, system: HostAndAbsorber, g: number): Complex {
  const { massRatio: mu, hostDamping, frequencyRatio: f, dampingRatio, lossFactor = 0 } = system
  const x = g * g
  const aRe = f * f
  const aIm = 2 * dampingRatio * f * g + lossFactor * f * f
  const hIm = 2 * hostDamping * g
  const dRe = (1 - x) * (aRe - x) - hIm * aIm - mu * x * aRe
  const dIm = (1 - x) * aIm + hIm * (aRe - x) - mu * x * aIm
  let nRe = 1
  let nIm = 0
  if (shape.numerator === 'absolute') {
    nRe = aRe - x
    nIm = aIm
  } else if (shape.numerator === 'relative') {
    nRe = -((1 + mu) * aRe - x)
    nIm = -(1 + mu) * aIm
  }
  if (shape.suspension) {
    const re = nRe - hIm * nIm
    nIm += hIm * nRe
    nRe = re
  }
  const scale = g ** shape.power / (dRe * dRe + dIm * dIm)
  return { re: scale * (nRe * dRe + nIm * dIm), im: scale * (nIm * dRe - nRe * dIm) }
}

/** Magnitude of `shapeValue`. */
export function shapeMagnitude(shape: Shape, system: HostAndAbsorber, g: number): number {
  const { re, im } = shapeValue(shape, system, g)
  return Math.hypot(re, im)
}

/** The same ratio of the bare host; `power` and `suspension` as in the shape. */
export function bareMagnitude(shape: Shape, hostDamping: number, g: number): number {
  const hIm = 2 * hostDamping * g
  const suspension = shape.suspension ? Math.hypot(1, hIm) : 1
  return (g ** shape.power * suspension) / Math.hypot(1 - g * g, hIm)
}
