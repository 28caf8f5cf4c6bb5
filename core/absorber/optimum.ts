/**
 * True minimax: the frequency and damping of the absorber for which the highest peak of a response is
 * least, for a damped or undamped host. For a damped host no closed form exists; it is computed from the
 * optimality conditions (at the optimum two peaks are level and no change lowers both).
 */
import { minimax, type MinimaxResult, type Pair, type Piece } from '../numerics/minimax.ts'
import { simplexSearch } from '../numerics/simplex-search.ts'
import { fixedPointTuning } from './fixed-points.ts'
import { valueAtInfinity, valueAtZero, type Kind } from './kinds.ts'
import { logShape, logShapeJet, type LogShape } from './log-shape.ts'
import { barePeak, localMaxima, worstPeak, type Peak } from './peaks.ts'

export interface HostOptimum {
  /** f = omega_a / omega_1 [-] */
  readonly frequencyRatio: number
  /** zeta_a = c / (2 m_a omega_a) [-] */
  readonly dampingRatio: number
  /** least worst value of the kind over all g > 0 */
  readonly peak: number
  readonly peaks: readonly Peak[]
  /** the larger of the values at rest and at very high speed, which no absorber changes; the peak is not below it */
  readonly floor: number
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
  const found = search(kind, shape, massRatio, hostDamping)
  const frequencyRatio = Math.exp(found.parameters[0] / 2)
  const dampingRatio = Math.exp(found.parameters[1]) / (2 * frequencyRatio)
  const worst = worstPeak(kind, { massRatio, hostDamping, frequencyRatio, dampingRatio })
  return {
    frequencyRatio,
    dampingRatio,
    peak: worst.height ?? Number.MAX_VALUE,
    peaks: worst.peaks,
    floor: endValue(kind, massRatio, hostDamping),
    // where the value at an end is the largest, nothing is left to gain
    converged: found.converged || worst.atEnd,
    iterations: found.iterations,
    residual: found.residual,
  }
}

/** Newton's method from the closed form; where that does not settle, a slower search finds a better start. */
function search(kind: Kind, shape: LogShape, massRatio: number, hostDamping: number): MinimaxResult {
  const first = startingPoint(kind, massRatio, hostDamping)
  let best = minimax((p) => peakPieces(shape, p), first)
  const floor = endValue(kind, massRatio, hostDamping)
  const level = floor > 0 ? 2 * Math.log(floor) : -Infinity
  if (best.converged || best.value <= level) return best
  const width = Math.min(1, Math.sqrt(massRatio))
  const value = (p: Pair) => Math.max(highestPeak(shape, p), floor)
  // the value at an end takes part as a peak that nothing moves: below it there is nothing to gain
  const end: readonly Piece[] = floor > 0 ? [{ value: level, gradient: [0, 0], hessian: [0, 0, 0] }] : []
  const pieces = (p: Pair) => {
    const peaks = peakPieces(shape, p)
    return peaks === null ? null : [...peaks, ...end]
  }
  for (const start of [first, [first[0], first[1] + 1], [first[0] - width, first[1]]] as const) {
    const near = simplexSearch(value, start, width, SEARCH_EVALUATIONS)
    const found = minimax(pieces, near.parameters)
    if (found.value < best.value || (found.converged && found.value <= best.value + 1e-9)) best = found
    if (best.converged) break
  }
  return best
}

const SEARCH_EVALUATIONS = 150
/** ln of f² and of 2 zeta_a f beyond which nothing is an absorber any more: a thousandth, a thousandfold. */
const FARTHEST = 14

/**
 * Parameters of the search: ln f² and ln(2 zeta_a f), so that every pair is a real absorber. The closed
 * form, moved to the resonance of the damped host; an absorber that is small against the host's damping
 * wants more damping itself: the factor 1 + 0.23 (zeta_1 / sqrt(mu))^0.6 was fitted to computed optima
 * and is only a starting value.
 */
function startingPoint(kind: Kind, massRatio: number, hostDamping: number): Pair {
  const closed = fixedPointTuning(kind, massRatio)
  const resonance = barePeak(kind, hostDamping)?.at ?? 1
  const f = (closed?.frequencyRatio ?? 1 / (1 + massRatio)) * resonance
  const zeta = closed?.dampingRatio ?? Math.sqrt((3 * massRatio) / (8 * (1 + massRatio)))
  const more = 1 + 0.23 * Math.min(10, (hostDamping / Math.sqrt(massRatio)) ** 0.6)
  return [2 * Math.log(f), Math.log(2 * zeta * more * f)]
}

/** Largest limit of the curve at rest and at very high speed; of no design, so it bounds them all. */
function endValue(kind: Kind, massRatio: number, hostDamping: number): number {
  return Math.max(valueAtZero(kind, massRatio, 1), valueAtInfinity(kind, hostDamping))
}

/** Highest local maximum; Infinity where a resonance is not damped. */
function highestPeak(shape: LogShape, [logA, logB]: Pair): number {
  if (Math.abs(logA) > FARTHEST || Math.abs(logB) > FARTHEST) return Infinity
  const peaks = localMaxima(shape, Math.expm1(logA), Math.exp(logB))
  return peaks === null ? Infinity : peaks.reduce((most, { height }) => Math.max(most, height), 0)
}

/** Each peak as a smooth function of the parameters: envelope theorem for the first and second derivatives. */
function peakPieces(shape: LogShape, [logA, logB]: Pair): readonly Piece[] | null {
  if (Math.abs(logA) > FARTHEST || Math.abs(logB) > FARTHEST) return null
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
