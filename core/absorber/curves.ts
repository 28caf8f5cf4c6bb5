import { bareMagnitude, shapeMagnitude, type HostAndAbsorber } from './response.ts'
import type { Kind, Shape } from './kinds.ts'
import { splitFrequencyRatios } from './running-speed.ts'

export interface HostCurves {
  readonly g: Float64Array
  readonly without: Float64Array
  readonly with: Float64Array
  readonly stroke: Float64Array
}

const EVEN_POINTS = 320
/** Distances from a peak, in its half width, at which the curve gets extra points. */
const ABOUT_PEAK = [0.15, 0.3, 0.6, 1, 1.6, 2.6, 4.2, 7, 12]

/**
 * Curves of the single-freedom host over the range that matters, denser about every peak. An undamped
 * resonance has no finite top: the points stand beside it, never on it.
 * @param kind of the objective
 * @param travel of the absorber against the host
 */
export function hostCurves(kind: Kind, travel: Shape, system: HostAndAbsorber): HostCurves {
  const { massRatio, hostDamping, frequencyRatio, dampingRatio } = system
  const [low, high] = splitFrequencyRatios(massRatio, frequencyRatio)
  const from = 0.4 * Math.min(1, low, frequencyRatio)
  const to = 1.8 * Math.max(1, high, frequencyRatio)
  const points: number[] = []
  for (let k = 0; k <= EVEN_POINTS; k++) points.push(from * (to / from) ** (k / EVEN_POINTS))
  const absorberWidth = (dampingRatio * massRatio) / (1 + massRatio)
  const centres: readonly (readonly [number, number])[] = [
    [1, hostDamping],
    [low, hostDamping + absorberWidth],
    [high, hostDamping + absorberWidth],
    [frequencyRatio, dampingRatio],
  ]
  for (const [centre, damping] of centres) {
    const width = centre * Math.min(0.05, Math.max(damping, 1e-4))
    if (damping > 0) points.push(centre)
    for (const distance of ABOUT_PEAK) points.push(centre - distance * width, centre + distance * width)
  }
  const g = Float64Array.from(new Set(points.filter((value) => value >= from && value <= to))).sort()
  const clear = g.filter((value) =>
    [
      bareMagnitude(kind, hostDamping, value),
      shapeMagnitude(kind, system, value),
      shapeMagnitude(travel, system, value),
    ].every(Number.isFinite),
  )
  return {
    g: clear,
    without: clear.map((value) => bareMagnitude(kind, hostDamping, value)),
    with: clear.map((value) => shapeMagnitude(kind, system, value)),
    stroke: clear.map((value) => shapeMagnitude(travel, system, value)),
  }
}
