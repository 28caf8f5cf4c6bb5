import { kindOf } from '../../core/absorber/kinds.ts'
import { hostOptimum, type HostOptimum } from '../../core/absorber/optimum.ts'
import { worstPeak } from '../../core/absorber/peaks.ts'

/** T5: a force on a damped host, its displacement; the same figures go to `peer_absorber.py`. */
export const ABSORBER_CASE = {
  massRatio: 0.05,
  hostDamping: 0.03,
  /** frequency ratio and damping ratio of the map, lowest and highest */
  frequencyRatios: [0.85, 1.05],
  dampingRatios: [0.05, 0.3],
  side: 41,
} as const

const KIND = kindOf({ excitation: 'force', response: 'displacement' }, ABSORBER_CASE.hostDamping)

/** First part: one true minimax on a damped host, to 1e-7 or better. */
export function minimaxTask(): HostOptimum {
  return hostOptimum(KIND, ABSORBER_CASE.massRatio, ABSORBER_CASE.hostDamping)
}

export function peakMap(): Float64Array {
  return new Float64Array(ABSORBER_CASE.side ** 2)
}

/** Second part: the worst peak, exact, over a net of 41 x 41 tunings; frequency ratio runs slowest. */
export function peakMapTask(map: Float64Array): void {
  const { massRatio, hostDamping, side, frequencyRatios, dampingRatios } = ABSORBER_CASE
  const at = ([low, high]: readonly [number, number], k: number) => low + ((high - low) * k) / (side - 1)
  for (let i = 0; i < side; i++) {
    const frequencyRatio = at(frequencyRatios, i)
    for (let j = 0; j < side; j++) {
      const dampingRatio = at(dampingRatios, j)
      const { height } = worstPeak(KIND, { massRatio, hostDamping, frequencyRatio, dampingRatio })
      map[i * side + j] = height ?? 0
    }
  }
}
