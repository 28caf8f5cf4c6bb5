/**
 * True minimax: the frequency and damping of the absorber for which the highest peak of a response is
 * least, for a damped or undamped host. For a damped host no closed form exists; it is computed from the
 * optimality conditions (at the optimum two peaks are level and no change lowers both).
 */
import { minimax, type Pair, type Piece } from '../numerics/minimax.ts'
import { fixedPointTuning } from './fixed-points.ts'
import type { Kind } from './kinds.ts'
import { logShape, logShapeJet, type LogShape } from './log-shape.ts'
import { localMaxima, worstPeak, type Peak } from './peaks.ts'

export interface HostOptimum {
  /** f = omega_a / omega_1 [-] */
  readonly frequencyRatio: number
  /** zeta_a = c / (2 m_a omega_a) [-] */
  readonly dampingRatio: number
  /** least worst value of the kind over all g > 0 */
  readonly peak: number
  readonly peaks: readonly Peak[]
  /** true where the value at rest or at very high speed is the largest, which no absorber changes */
  readonly atEnd: boolean
  readonly converged: boolean
  readonly iterations: number
  readonly residual: number
}

/**
 * @param kind a bounded one (`unboundedAt` null)
 * @param massRatio mu, > 0
 * @param hostDamping zeta_1, >= 0
 */
export function hostOptimum(kind: Kind, massRatio: number, hostDamping: number): HostOptimum {
  const shape = logShape(kind, massRatio, hostDamping)
  const start = startingPoint(kind, massRatio)
  const found = minimax((p) => peakPieces(shape, p), start)
  const frequencyRatio = Math.exp(found.parameters[0] / 2)
  const dampingRatio = Math.exp(found.parameters[1]) / (2 * frequencyRatio)
  const worst = worstPeak(kind, { massRatio, hostDamping, frequencyRatio, dampingRatio })
  return {
    frequencyRatio,
    dampingRatio,
    peak: worst.height ?? Number.MAX_VALUE,
    peaks: worst.peaks,
    atEnd: worst.atEnd,
    converged: found.converged,
    iterations: found.iterations,
    residual: found.residual,
  }
}

/** Parameters of the search: ln f² and ln(2 zeta_a f), so that every pair is a real absorber. */
function startingPoint(kind: Kind, massRatio: number): Pair {
  const closed = fixedPointTuning({ ...kind, suspension: false }, massRatio)
  const f = closed?.frequencyRatio ?? 1 / (1 + massRatio)
  const zeta = closed?.dampingRatio ?? Math.sqrt((3 * massRatio) / (8 * (1 + massRatio)))
  return [2 * Math.log(f), Math.log(2 * zeta * f)]
}

/** Each peak as a smooth function of the parameters: envelope theorem for the first and second derivatives. */
function peakPieces(shape: LogShape, [logA, logB]: Pair): readonly Piece[] | null {
  const alpha = Math.expm1(logA)
  const a = 1 + alpha
  const b = Math.exp(logB)
  const peaks = localMaxima(shape, alpha, b)
  if (peaks === null) return null
  return peaks.map(({ delta }) => {
    const jet = logShapeJet(shape, delta, alpha, b)
    // the peak moves with the parameters: d²/dp² of the peak = L_pp - L_pd L_dp / L_dd
    const aa = jet.aa - (jet.da * jet.da) / jet.dd
    const ab = jet.ab - (jet.da * jet.db) / jet.dd
    const bb = jet.bb - (jet.db * jet.db) / jet.dd
    return {
      value: jet.value,
      gradient: [a * jet.a, b * jet.b],
      hessian: [a * a * aa + a * jet.a, a * b * ab, b * b * bb + b * jet.b],
    }
  })
}
