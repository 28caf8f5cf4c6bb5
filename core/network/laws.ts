import { assertNever } from '../errors.ts'
import type { Complex } from '../results.ts'

/** Spring and damper side by side: z = k (1 + i eta) + i omega c. */
export interface SpringDamperLaw {
  readonly kind: 'springDamper'
  /** [N/m] or [N m/rad] */
  readonly stiffness: number
  /** loss factor eta of the complex stiffness [-] */
  readonly lossFactor: number
  /** [N s/m] or [N m s/rad] */
  readonly viscous: number
}

/**
 * Elastically supported damper: a spring beside a damper that has a spring of its own in series,
 * z = k + i omega c k_s / (k_s + i omega c).
 * J. E. Ruzicka, Resonance characteristics of unidirectional viscous and Coulomb-damped vibration
 * isolation systems, J. Engineering for Industry (ASME) 89, 1967: N = k_s / k.
 */
export interface RelaxationLaw {
  readonly kind: 'relaxation'
  readonly stiffness: number
  readonly seriesStiffness: number
  readonly viscous: number
}

export type Law = SpringDamperLaw | RelaxationLaw

/** The part of a law that does not change with frequency: z = k + i h + i omega c. */
export interface SteadyPart {
  readonly stiffness: number
  readonly hysteretic: number
  readonly viscous: number
}

export function steadyPart(law: Law): SteadyPart {
  switch (law.kind) {
    case 'springDamper':
      return {
        stiffness: law.stiffness,
        hysteretic: law.stiffness * law.lossFactor,
        viscous: law.viscous,
      }
    case 'relaxation':
      return { stiffness: law.stiffness, hysteretic: 0, viscous: 0 }
    default:
      return assertNever(law, 'law')
  }
}

/** Whether `varyingPart` is ever anything but zero. */
export function varies(law: Law): boolean {
  return law.kind === 'relaxation' && law.viscous > 0 && law.seriesStiffness > 0
}

/** What a law adds to its steady part at `omega` [rad/s]. */
export function varyingPart(law: Law, omega: number): Complex {
  if (law.kind !== 'relaxation' || !varies(law)) return { re: 0, im: 0 }
  const resistance = omega * law.viscous
  const share = resistance / (law.seriesStiffness ** 2 + resistance ** 2)
  return {
    re: law.seriesStiffness * resistance * share,
    im: law.seriesStiffness ** 2 * share,
  }
}

/** Complex dynamic stiffness at `omega` [rad/s]. */
export function dynamicStiffness(law: Law, omega: number): Complex {
  const steady = steadyPart(law)
  const varying = varyingPart(law, omega)
  return {
    re: steady.stiffness + varying.re,
    im: steady.hysteretic + omega * steady.viscous + varying.im,
  }
}
