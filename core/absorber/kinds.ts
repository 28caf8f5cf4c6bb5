/**
 * Which ratio an absorber shall keep low: the objective table, excitation by response.
 *
 * Symbols, used in the whole folder: g = omega / omega_1 with omega_1 the bare host's frequency,
 * f = omega_a / omega_1, mu = m_a / m, zeta_1 the host's damping ratio, zeta_a = c_a / (2 m_a omega_a),
 * A = f² + 2 i zeta_a f g and D = (1 - g² + 2 i zeta_1 g)(A - g²) - mu g² A. Then
 *   absolute motion  F<n> = g^n (A - g²) / D
 *   relative motion  R<n> = g^n ((1 + mu) A - g²) / D
 *   travel of the absorber against the host   g^n / D
 * each times (1 + 2 i zeta_1 g) where the host's spring and damper carry it (TF).
 */
import type { Objective } from '../project/absorber.ts'

export interface Shape {
  /** n, the power of g */
  readonly power: number
  readonly numerator: 'absolute' | 'relative' | 'travel'
  /** whether the factor 1 + 2 i zeta_1 g of the host's suspension multiplies it */
  readonly suspension: boolean
}

export interface Kind extends Shape {
  /** F0, F1, F2, F3, F4, F-1, F-2, TF, R0, R2; TF<n> and RT<n> where the suspension's damper matters */
  readonly name: string
  readonly numerator: 'absolute' | 'relative'
}

const RESPONSE_POWER = {
  displacement: 0,
  velocity: 1,
  acceleration: 2,
  relativeDisplacement: 0,
  transmittedForce: 0,
} as const satisfies Record<Objective['response'], number>

/** Normalised by F/k, by m_e e/m, by a_0/omega_1² and by the support's displacement. */
const EXCITATION_POWER = {
  force: 0,
  unbalance: 2,
  supportAcceleration: -2,
  supportDisplacement: 0,
} as const satisfies Record<Objective['excitation'], number>

/**
 * The kind of an objective. With an undamped host the factor of the suspension is 1 and left out,
 * so that F0 also stands for the transmitted force.
 * Source of the table: Warburton 1982 (Earthquake Engineering and Structural Dynamics 10), widened to
 * damped hosts from the equations of motion.
 * @param hostDamping zeta_1 [-]
 */
export function kindOf(objective: Objective, hostDamping: number): Kind {
  const { excitation, response } = objective
  const damped = hostDamping > 0
  const supportMoves = excitation === 'supportAcceleration' || excitation === 'supportDisplacement'
  if (!supportMoves) {
    const power = EXCITATION_POWER[excitation] + RESPONSE_POWER[response]
    return named(power, 'absolute', damped && response === 'transmittedForce')
  }
  if (response === 'relativeDisplacement' || response === 'transmittedForce') {
    return named(EXCITATION_POWER[excitation] + 2, 'relative', damped && response === 'transmittedForce')
  }
  return named(EXCITATION_POWER[excitation] + RESPONSE_POWER[response], 'absolute', damped)
}

/** Travel of the absorber mass against the host, normalised as the kinds of the same excitation are. */
export function travelShape(excitation: Objective['excitation'], hostDamping: number): Shape {
  const supportMoves = excitation === 'supportAcceleration' || excitation === 'supportDisplacement'
  return {
    power: EXCITATION_POWER[excitation] + 2,
    numerator: 'travel',
    suspension: supportMoves && hostDamping > 0,
  }
}

/** Where a shape grows without limit, or null when it is bounded over all speeds. */
export function unboundedAt(shape: Shape, hostDamping: number): 'zero' | 'infinity' | null {
  if (shape.power < 0) return 'zero'
  const numeratorDegree = shape.numerator === 'travel' ? 0 : 2
  const suspensionDegree = shape.suspension && hostDamping > 0 ? 1 : 0
  return shape.power + numeratorDegree + suspensionDegree > 4 ? 'infinity' : null
}

/** Value of a bounded shape at g = 0. */
export function valueAtZero(shape: Shape, massRatio: number, tuning: number): number {
  if (shape.power > 0) return 0
  if (shape.numerator === 'travel') return 1 / (tuning * tuning)
  return shape.numerator === 'relative' ? 1 + massRatio : 1
}

/** Limit of a bounded shape as g grows. */
export function valueAtInfinity(shape: Shape, hostDamping: number): number {
  const numeratorDegree = shape.numerator === 'travel' ? 0 : 2
  const suspensionDegree = shape.suspension && hostDamping > 0 ? 1 : 0
  if (shape.power + numeratorDegree + suspensionDegree < 4) return 0
  return suspensionDegree === 1 ? 2 * hostDamping : 1
}

function named(power: number, numerator: Kind['numerator'], suspension: boolean): Kind {
  const letter = numerator === 'absolute' ? (suspension ? 'TF' : 'F') : suspension ? 'RT' : 'R'
  const name = letter === 'TF' && power === 0 ? 'TF' : `${letter}${power}`
  return { name, power, numerator, suspension }
}
