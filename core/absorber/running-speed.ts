/**
 * Absorber tuned to one running speed, with as little damping as can be had.
 * Source: J. P. Den Hartog, Mechanical Vibrations, 4th ed., 1956 (undamped dynamic vibration absorber).
 */
import { InputError } from '../errors.ts'

/**
 * Natural frequencies of host and absorber together, both undamped, as g = omega / omega_1, rising:
 * roots of g⁴ - g² (1 + f² (1 + mu)) + f² = 0.
 * @example splitFrequencyRatios(0.05, 1) // [0.894427, 1.118034]
 */
export function splitFrequencyRatios(massRatio: number, frequencyRatio: number): readonly [number, number] {
  const a = frequencyRatio * frequencyRatio
  const sum = 1 + a * (1 + massRatio)
  // (1 - a)² + mu a (2 + 2 a + mu a) is the discriminant without cancellation
  const root = Math.sqrt((1 - a) ** 2 + massRatio * a * (2 + 2 * a + massRatio * a))
  const high = (sum + root) / 2
  return [Math.sqrt(a / high), Math.sqrt(high)]
}

/**
 * Mass ratio that puts a split frequency at g for an absorber tuned to the host (f = 1):
 * mu = (1 - g²)² / g². The other split frequency is then 1 / g.
 */
export function massRatioForSplit(frequencyRatio: number): number {
  if (!(frequencyRatio > 0 && Number.isFinite(frequencyRatio))) {
    throw new InputError('frequencyRatio', frequencyRatio, 'must be a finite number above 0')
  }
  const x = frequencyRatio * frequencyRatio
  return (1 - x) ** 2 / x
}

/**
 * Host mass found by a trial: an absorber of known mass tuned to the host's frequency gave a split
 * frequency at g of it. [kg]
 */
export function hostMassFromTrial(trialMass: number, frequencyRatio: number): number {
  return trialMass / massRatioForSplit(frequencyRatio)
}

/**
 * Least absorber mass whose travel against the host, under a harmonic force on the host at the tuned
 * speed, stays within the limit. Undamped: k_a = F / X_a, m_a = k_a / omega², whatever the host.
 * With damping in the absorber's spring the travel is F / |(k - m omega² + i c omega) 2 i zeta_a
 * - m_a omega² (1 + 2 i zeta_a)|, which gives a quadratic equation for m_a.
 * @param force [N]
 * @param strokeLimit zero to peak [m]
 * @param omega tuned speed [rad/s]
 * @param hostStiffness real and imaginary part of k - m omega² + i c omega [N/m]
 * @param dampingRatio zeta_a [-]
 * @returns [kg]; 0 when the absorber's damping alone keeps the travel within the limit
 */
export function massForStroke(
  force: number,
  strokeLimit: number,
  omega: number,
  hostStiffness: readonly [number, number],
  dampingRatio: number,
): number {
  const needed = force / strokeLimit
  const twice = 2 * dampingRatio
  const z: readonly [number, number] = [-twice * hostStiffness[1], twice * hostStiffness[0]]
  const w: readonly [number, number] = [1, twice]
  const square = w[0] * w[0] + w[1] * w[1]
  const half = z[0] * w[0] + z[1] * w[1]
  const under = half * half - square * (z[0] * z[0] + z[1] * z[1] - needed * needed)
  if (under < 0) return 0
  return Math.max(0, (half + Math.sqrt(under)) / square) / (omega * omega)
}
