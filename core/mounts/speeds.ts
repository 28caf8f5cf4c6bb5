import type { Project } from '../project/project.ts'
import type { Mode } from '../results.ts'

/** Chart's end where none is given, over the highest operating speed. */
const CHART_BEYOND = 1.25
/** Chart's begin over its end; lower where a resonance lies lower. */
const CHART_BEGIN = 1 / 100
const LOWEST_BEGIN = 1 / 10_000
/** Share of the points that gather about resonances. */
const GATHERED = 0.6
const MOST_PER_RESONANCE = 81
const LEAST_PER_RESONANCE = 11
/** Resonances with more damping than this are so broad that even spacing shows them. */
const BROAD = 0.4
/** Half-width given to a resonance without damping, so that its points do not fall together. */
const LEAST_HALF_WIDTH = 1e-5

export interface SpeedRange {
  readonly lowest: number
  readonly highest: number
  /** speeds that must be hit exactly [rad/s] */
  readonly exact: readonly number[]
}

/** Speeds that the charts span, or null where the project names no speed at all. */
export function chartRange(project: Project, modes: readonly Mode[]): SpeedRange | null {
  const { runningSpeed, lowestSpeed, highestSpeed, chartSpeed } = project.machine.duty
  const exact = [runningSpeed, lowestSpeed, highestSpeed, chartSpeed].filter((speed) => speed !== null)
  const operating = [runningSpeed, lowestSpeed, highestSpeed].filter((speed) => speed !== null)
  if (exact.length === 0) return null
  const highest = Math.max(...exact, chartSpeed === null ? CHART_BEYOND * Math.max(...operating) : 0)
  const crossings = modes.flatMap((mode) => mode.crossings.map(({ speed }) => speed))
  const lowest = Math.max(
    LOWEST_BEGIN * highest,
    Math.min(
      CHART_BEGIN * highest,
      ...exact.map((speed) => speed / 2),
      ...crossings.map((speed) => speed / 2),
    ),
  )
  return { lowest, highest, exact }
}

/**
 * Rising speeds for the curves: evenly spaced, denser about every speed at which an order meets a
 * mode (spacing a small part of the half-power width at the peak, growing away from it), and exactly
 * through the speeds of the duty.
 * @param modes those whose resonances show in the curves, with and without absorbers
 * @param points about how many
 */
export function sweepSpeeds(range: SpeedRange, modes: readonly Mode[], points: number): Float64Array {
  const resonances = resonancesWithin(range, modes)
  const each = Math.min(
    MOST_PER_RESONANCE,
    Math.max(LEAST_PER_RESONANCE, Math.floor((GATHERED * points) / Math.max(1, resonances.length))),
  )
  const half = Math.floor(each / 2)
  const speeds: number[] = [range.lowest, range.highest]
  for (const { speed, width } of resonances) {
    for (let k = -half; k <= half; k++) {
      // without damping there is no value at the very resonance
      if (k === 0 && width === 0) continue
      const away = Math.sinh((5 * k) / half) / 5
      speeds.push(speed * (1 + Math.max(width, LEAST_HALF_WIDTH) * away))
    }
  }
  const even = Math.max(100, points - speeds.length - range.exact.length)
  const step = (range.highest - range.lowest) / (even - 1)
  for (let k = 1; k < even - 1; k++) speeds.push(range.lowest + k * step)
  return merge(
    speeds.filter((speed) => speed >= range.lowest && speed <= range.highest),
    range,
  )
}

function resonancesWithin(
  range: SpeedRange,
  modes: readonly Mode[],
): readonly { readonly speed: number; readonly width: number }[] {
  return modes.flatMap((mode) =>
    mode.dampingRatio > BROAD
      ? []
      : mode.crossings.flatMap(({ speed }) =>
          speed < range.lowest || speed > range.highest ? [] : [{ speed, width: mode.dampingRatio }],
        ),
  )
}

/** Sorted, without doubles; the exact speeds stay to the last bit. */
function merge(speeds: readonly number[], range: SpeedRange): Float64Array {
  const apart = 1e-9 * range.highest
  const exact = new Set(range.exact)
  const clear = speeds.filter((speed) => range.exact.every((value) => Math.abs(speed - value) > apart))
  const sorted = Float64Array.from([...clear, ...exact]).sort()
  let last = -Infinity
  return sorted.filter((speed) => {
    const keep = exact.has(speed) || speed - last > apart
    if (keep) last = speed
    return keep
  })
}
