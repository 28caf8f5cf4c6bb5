import { NOT_KNOWN, formatPlain } from '../../core/units/format.ts'

/** Text of a tick: the shortest that tells neighbours apart. */
export function tickText(value: number, step: number): string {
  if (!Number.isFinite(value)) return NOT_KNOWN
  if (value === 0) return '0'
  if (!(step > 0)) return formatPlain(value, 3)
  const magnitude = Math.abs(value)
  // enough digits to show one step at this magnitude, and no binary noise behind them
  const digits = Math.max(
    1,
    Math.min(8, Math.floor(Math.log10(magnitude)) - Math.floor(Math.log10(step)) + 2),
  )
  return formatPlain(value, digits).replace('-', '−')
}

/**
 * Values at which a logarithmic axis carries a label: 1, 2 and 5 of each decade over up to two
 * decades, whole decades beyond; of a very short span also the rest.
 */
export function logTicks(min: number, max: number): readonly number[] {
  if (!(min > 0) || !(max > min)) return []
  const decades = Math.log10(max / min)
  const steps = decades <= 0.7 ? [1, 1.5, 2, 3, 4, 5, 6, 7, 8, 9] : decades <= 2.2 ? [1, 2, 5] : [1]
  const ticks: number[] = []
  for (let power = Math.floor(Math.log10(min)); power <= Math.ceil(Math.log10(max)); power += 1) {
    for (const step of steps) {
      const value = Number((step * 10 ** power).toPrecision(3))
      if (value >= min * (1 - 1e-9) && value <= max * (1 + 1e-9)) ticks.push(value)
    }
  }
  return ticks
}

/** Values of a logarithmic axis that get a fine grid line: 1 to 9 of each decade. */
export function logGrid(min: number, max: number): readonly number[] {
  if (!(min > 0) || !(max > min)) return []
  const lines: number[] = []
  for (let power = Math.floor(Math.log10(min)); power <= Math.ceil(Math.log10(max)); power += 1) {
    for (let step = 1; step <= 9; step += 1) {
      const value = Number((step * 10 ** power).toPrecision(3))
      if (value >= min * (1 - 1e-9) && value <= max * (1 + 1e-9)) lines.push(value)
    }
  }
  return lines
}

/** `force ratio`, `support force [N]`: title of an axis or heading of a column. */
export function withUnit(title: string, unit: string): string {
  return unit === '' ? title : `${title} [${unit}]`
}
