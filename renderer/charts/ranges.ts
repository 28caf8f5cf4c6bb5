import type { ScaleKind } from './chart-types.ts'

export interface AxisRange {
  readonly min: number
  readonly max: number
}

/** More decades than this flatten what matters; deeper notches run off the bottom. */
const MOST_DECADES = 4
/** How far below the lowest tenth of the values the axis goes: the run to standstill may leave it. */
const TAIL = 0.5
/** A spike this far above nearly all of the curve (an undamped resonance) runs off the top. */
const SPIKE_DECADES = 2.5

/**
 * Ends of a vertical axis that hold the curves: round numbers, zero included on a linear scale,
 * at most four decades on a logarithmic one, six tens of dB likewise.
 * @param values all values that shall be seen, in the unit of the axis, any order
 * @param keep values that must be inside (limits)
 */
export function valueRange(
  values: readonly number[],
  keep: readonly number[],
  scale: ScaleKind | 'dB',
): AxisRange {
  const usable = values.filter((value) => Number.isFinite(value) && (scale !== 'log' || value > 0))
  const wanted = keep.filter((value) => Number.isFinite(value) && (scale !== 'log' || value > 0))
  if (usable.length === 0 && wanted.length === 0) {
    return scale === 'log'
      ? { min: 0.1, max: 10 }
      : scale === 'dB'
        ? { min: -40, max: 20 }
        : { min: 0, max: 1 }
  }
  const sorted = Float64Array.from(usable.length > 0 ? usable : wanted).sort()
  const quantile = (share: number) => sorted[Math.round(share * (sorted.length - 1))] ?? 0
  // a limit stands clear of the edge, so that its line and name are seen
  const beyond = (value: number, sign: 1 | -1) =>
    scale === 'log'
      ? value * 1.4 ** sign
      : scale === 'dB'
        ? value + 3 * sign
        : value + 0.08 * sign * Math.abs(value)
  const highestKept = wanted.length > 0 ? beyond(Math.max(...wanted), 1) : -Infinity
  const lowestWanted = Math.min(...wanted) // infinite, and so without effect, when there is none
  const lowestKept = scale === 'linear' || wanted.length === 0 ? lowestWanted : beyond(lowestWanted, -1)
  if (scale === 'linear') {
    const top = Math.max(Math.min(quantile(1), quantile(0.9) * 10 ** SPIKE_DECADES), highestKept)
    const bottom = Math.min(0, quantile(0), lowestKept)
    return { min: bottom === 0 ? 0 : -roundUp(-bottom), max: roundUp(top <= 0 ? 1 : top) }
  }
  if (scale === 'dB') {
    const top = Math.max(Math.min(quantile(1), quantile(0.9) + 20 * SPIKE_DECADES), highestKept)
    const floor = Math.max(quantile(0.02), quantile(0.1) - 20 * TAIL, top - 20 * MOST_DECADES)
    const bottom = Math.min(floor, lowestKept)
    return { min: Math.floor(bottom / 10) * 10, max: Math.ceil((top + 1) / 10) * 10 }
  }
  const top = Math.max(Math.min(quantile(1), quantile(0.9) * 10 ** SPIKE_DECADES), highestKept)
  const floor = Math.max(quantile(0.02), quantile(0.1) / 10 ** TAIL, top / 10 ** MOST_DECADES)
  const bottom = Math.min(floor, lowestKept)
  return { min: roundDown(bottom), max: roundUp(top * 1.02) }
}

/** Next of 1, 1.5, 2, 3, 5, 7 times a power of ten that is not below the value. */
export function roundUp(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value))
  const step = [1, 1.5, 2, 3, 5, 7, 10].find((candidate) => candidate * power >= value * (1 - 1e-12)) ?? 10
  return step * power
}

function roundDown(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value))
  const step = [7, 5, 3, 2, 1.5, 1].find((candidate) => candidate * power <= value * (1 + 1e-12)) ?? 1
  return step * power
}
