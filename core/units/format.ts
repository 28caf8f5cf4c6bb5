import { DIMENSIONS, type Dimension, type UnitSystem } from './dimensions.ts'
import { factorOf } from './parse.ts'

/** Shown where a quantity is not known: never NaN, never a made-up zero. */
export const NOT_KNOWN = '–'

/**
 * The number of a quantity in its display unit, without the unit, for an editing field:
 * twelve significant digits hide binary noise and lose nothing that a person typed.
 * @param value base unit (SI)
 */
export function editableNumber(value: number, dimension: Dimension, system: UnitSystem): string {
  if (!Number.isFinite(value)) return ''
  return String(Number((value / factorOf(dimension, system)).toPrecision(12)))
}

/** Label of the display unit, such as `N/mm`; empty for a pure number. */
export function unitLabel(dimension: Dimension, system: UnitSystem): string {
  return DIMENSIONS[dimension][system][1]
}

/**
 * Number for reading, to `digits` significant digits, in plain notation between 1e-4 and 1e7.
 * @param value base unit (SI); anything not finite becomes a dash
 */
export function formatNumber(
  value: number | null | undefined,
  dimension: Dimension,
  system: UnitSystem,
  digits = 4,
): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NOT_KNOWN
  return formatPlain(value / factorOf(dimension, system), digits)
}

/** Number and unit, such as `213.7 N`. @param value base unit (SI) */
export function formatQuantity(
  value: number | null | undefined,
  dimension: Dimension,
  system: UnitSystem,
  digits = 4,
): string {
  const number = formatNumber(value, dimension, system, digits)
  const label = unitLabel(dimension, system)
  if (number === NOT_KNOWN || label === '') return number
  return label === '%' || label === '°'
    ? `${number}${label === '°' ? '' : ' '}${label}`
    : `${number} ${label}`
}

/** A pure number to `digits` significant digits; anything not finite becomes a dash. */
export function formatPlain(value: number, digits = 4): string {
  if (!Number.isFinite(value)) return NOT_KNOWN
  if (value === 0) return '0'
  // rounded first: 9999.9 has one digit more before the point than it seems to have
  const rounded = Number(value.toPrecision(digits))
  const magnitude = Math.abs(rounded)
  if (magnitude < 1e-4 || magnitude >= 1e7) {
    return rounded
      .toExponential(digits - 1)
      .replace(/(\.\d*?)0+e/, '$1e')
      .replace('.e', 'e')
      .replace('e+', 'e')
  }
  if (magnitude >= 10 ** (digits - 1)) return rounded.toFixed(0)
  return rounded
    .toPrecision(digits)
    .replace(/(\.\d*?)0+$/, '$1')
    .replace(/\.$/, '')
}
