/**
 * Closed forms of one mass on one spring: starting points and previews. The engine, not this file,
 * answers for a project.
 * [1] S. S. Rao, Mechanical Vibrations (harmonic excitation; vibration control).
 * [2] W. T. Thomson, Theory of Vibration with Applications, chapter on harmonic vibration.
 * [3] J. E. Ruzicka, Resonance characteristics of unidirectional viscous and Coulomb-damped vibration
 *     isolation systems, J. Engineering for Industry (ASME) 89, 1967.
 * r = omega / omega_n, zeta = c / (2 √(k m)), eta the loss factor of k (1 + i eta).
 */
import { InputError } from '../errors.ts'

export interface Peak {
  /** frequency ratio r at which it stands */
  readonly at: number
  readonly height: number
}

/** Natural frequency [Hz] of a mass that sinks by `deflection` [m] on a linear spring: √(g/δ) / 2π. */
export function frequencyFromDeflection(deflection: number, gravity = 9.80665): number {
  requirePositive('deflection', deflection)
  return Math.sqrt(gravity / deflection) / (2 * Math.PI)
}

/** Static deflection [m] of a linear spring for a natural frequency [Hz]. */
export function deflectionForFrequency(frequency: number, gravity = 9.80665): number {
  requirePositive('frequency', frequency)
  return gravity / (2 * Math.PI * frequency) ** 2
}

/** Stiffness [N/m] on which `mass` [kg] sinks by `deflection` [m]. */
export function stiffnessForDeflection(mass: number, deflection: number, gravity = 9.80665): number {
  requirePositive('mass', mass)
  requirePositive('deflection', deflection)
  return (mass * gravity) / deflection
}

/**
 * Frequency ratio above resonance at which the force transmissibility is 1 - efficiency.
 * Viscous [1]: T² = (1 + (2 zeta r)²) / ((1 - r²)² + (2 zeta r)²); hysteretic: T² = (1 + eta²) / ((1 - r²)² + eta²).
 * @param efficiency isolation efficiency, 0 <= efficiency < 1
 * @example ratioForEfficiency(0.8, { dampingRatio: 0 }) // 2.449489...
 */
export function ratioForEfficiency(
  efficiency: number,
  damping: { readonly dampingRatio: number } | { readonly lossFactor: number },
): number {
  if (!(efficiency >= 0 && efficiency < 1)) {
    throw new InputError('efficiency', efficiency, 'must be at least 0 and below 1')
  }
  const square = (1 - efficiency) ** 2
  if ('lossFactor' in damping) {
    const etaSquared = damping.lossFactor ** 2
    return Math.sqrt(1 + Math.sqrt((1 + etaSquared) / square - etaSquared))
  }
  const four = 4 * damping.dampingRatio ** 2
  // square x² + b x - (1 - square) = 0 in x = r²
  const b = four * (square - 1) - 2 * square
  return Math.sqrt((Math.sqrt(b * b + 4 * square * (1 - square)) - b) / (2 * square))
}

/** Highest viscous transmissibility [1]: r = √(√(1 + 8 zeta²) - 1) / (2 zeta). */
export function transmissibilityPeak(dampingRatio: number): Peak {
  requirePositive('dampingRatio', dampingRatio)
  const at = Math.sqrt(Math.sqrt(1 + 8 * dampingRatio ** 2) - 1) / (2 * dampingRatio)
  const damper = (2 * dampingRatio * at) ** 2
  return { at, height: Math.sqrt((1 + damper) / ((1 - at * at) ** 2 + damper)) }
}

/** Highest k X / F under a constant force [2]: r = √(1 - 2 zeta²). Null when it falls from r = 0 on. */
export function displacementPeak(dampingRatio: number): Peak | null {
  requirePositive('dampingRatio', dampingRatio)
  const square = 1 - 2 * dampingRatio ** 2
  if (square <= 0) return null
  return { at: Math.sqrt(square), height: 1 / (2 * dampingRatio * Math.sqrt(1 - dampingRatio ** 2)) }
}

/** Highest m X / U under rotating unbalance [2]: r = 1 / √(1 - 2 zeta²), as high as under a force. */
export function unbalancePeak(dampingRatio: number): Peak | null {
  const peak = displacementPeak(dampingRatio)
  return peak === null ? null : { at: 1 / peak.at, height: peak.height }
}

/** Best damping of an elastically supported damper, and the peak that it leaves. */
export interface RelaxationOptimum {
  /** c / (2 √(k m)) with the main spring k */
  readonly dampingRatio: number
  readonly peak: Peak
}

/**
 * Elastically supported damper [3], N = series stiffness / main stiffness: the damping with the
 * lowest peak of transmissibility (absolute motion), or of relative over support displacement.
 */
export function relaxationOptimum(
  stiffnessRatio: number,
  motion: 'absolute' | 'relative' = 'absolute',
): RelaxationOptimum {
  requirePositive('stiffnessRatio', stiffnessRatio)
  const n = stiffnessRatio
  const height = 1 + 2 / n
  if (motion === 'relative') {
    return {
      dampingRatio: n / Math.sqrt(2 * (n + 1) * (n + 2)),
      peak: { at: Math.sqrt((n + 2) / 2), height },
    }
  }
  return {
    dampingRatio: (n / (4 * (n + 1))) * Math.sqrt(2 * (n + 2)),
    peak: { at: Math.sqrt((2 * (n + 1)) / (n + 2)), height },
  }
}

function requirePositive(field: string, value: number): void {
  if (!(value > 0 && Number.isFinite(value))) throw new InputError(field, value, 'must be greater than 0')
}
