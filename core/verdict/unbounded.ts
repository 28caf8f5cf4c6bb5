import type { Mode, Sweep } from '../results.ts'
import { formatPlain } from '../units/format.ts'

/** Damping ratios below this are none: what is left is rounding. */
const UNDAMPED = 1e-9
/** Distances from a resonance, as shares of its speed, between which a curve shows whether it has a bound there. */
const NEAREST = 2e-9
const FARTHEST = 1e-2
/** How much farther the second of two speeds must lie. */
const APART = 4
/** Share of the growth 1 / distance from which a curve has no bound; one that has a bound hardly grows at all. */
const GROWS = 0.5

/**
 * Says which mode leaves a curve without a bound within a span of speeds: one without damping, met
 * by an order that drives it. There the curve grows as 1 / distance from the resonance, and its
 * highest sampled value means nothing.
 * @param span lowest and highest speed [rad/s]
 * @returns null when every peak within the span has a bound
 */
export function unboundedPeak(
  modes: readonly Mode[],
  { speed }: Sweep,
  curves: readonly Float64Array[],
  [lowest, highest]: readonly [number, number],
): string | null {
  for (const mode of modes) {
    if (mode.dampingRatio >= UNDAMPED) continue
    for (const { order, speed: meets } of mode.crossings) {
      if (meets < lowest * (1 - NEAREST) || meets > highest * (1 + NEAREST)) continue
      if (curves.some((curve) => growsWithoutBound(speed, curve, meets))) {
        return `Order ${formatPlain(order)} meets mode ${mode.number} (${mode.name}, ${formatPlain(mode.frequency)} Hz), which nothing damps: the peak there has no bound. Give the mounts damping.`
      }
    }
  }
  return null
}

/** Compares the two speeds that lie nearest on one side of the resonance, well apart from each other. */
function growsWithoutBound(speed: Float64Array, curve: Float64Array, meets: number): boolean {
  const first = speed.findIndex((value) => value > meets)
  return [
    { from: first < 0 ? speed.length : first, step: 1 },
    { from: (first < 0 ? speed.length : first) - 1, step: -1 },
  ].some(({ from, step }) => {
    let near: { away: number; value: number } | null = null
    for (let i = from; i >= 0 && i < speed.length; i += step) {
      const away = Math.abs((speed[i] ?? 0) / meets - 1)
      if (away > FARTHEST) return false
      if (away < NEAREST) continue
      const value = curve[i] ?? 0
      if (near === null) near = { away, value }
      else if (away >= APART * near.away) return near.value > (GROWS * value * away) / near.away
    }
    return false
  })
}
