import type { AbsorberResult } from '../../results.ts'

export interface TrimStep {
  /** change of the absorber's own frequency, as a share */
  readonly share: number
  /** moving mass to add for it, the spring unchanged; negative to take off [kg] */
  readonly addedMass: number
  /** spring that gives the same, the mass unchanged [N/m] */
  readonly stiffness: number
}

/**
 * What moves the absorber's own frequency by a share s. With omega_a² = k / m_a the mass becomes
 * m_a / (1 + s)² at an unchanged spring, or the spring k (1 + s)² at an unchanged mass.
 */
export function trimSteps(absorber: AbsorberResult, shares: readonly number[]): readonly TrimStep[] {
  return shares.map((share) => ({
    share,
    addedMass: absorber.mass * (1 / (1 + share) ** 2 - 1),
    stiffness: absorber.stiffness * (1 + share) ** 2,
  }))
}
