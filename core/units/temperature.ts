import { InputError } from '../errors.ts'
import type { UnitSystem } from './dimensions.ts'
import { NOT_KNOWN, formatPlain } from './format.ts'

/**
 * Temperatures are kept in degrees Celsius: their scales differ by more than a factor, which is why
 * they stand beside the other quantities and not among them.
 */
const ABSOLUTE_ZERO = -273.15
const PATTERN = /^\s*([+\-−–]?\d+(?:[.,]\d+)?)\s*(?:°|deg\s*)?(C|F|K)?\s*$/i

const fromFahrenheit = (value: number) => ((value - 32) * 5) / 9
const toFahrenheit = (value: number) => (value * 9) / 5 + 32

/**
 * Reads `35`, `35 °C`, `95 degF` or `308 K`. A bare number is taken in °C, or in °F where the reader's
 * units are US customary.
 * @returns degrees Celsius
 * @throws InputError for anything else, and below absolute zero
 */
export function parseTemperature(
  text: string,
  system: UnitSystem | 'base' = 'base',
  field = 'temperature',
): number {
  const match = PATTERN.exec(text)
  const example = system === 'US' ? '95 °F' : '35 °C'
  if (!match) throw new InputError(field, text, `enter a temperature, for example ${example}`)
  const value = Number((match[1] ?? '').replace(',', '.').replace(/[−–]/, '-'))
  const scale = (match[2] ?? (system === 'US' ? 'F' : 'C')).toUpperCase()
  const celsius = scale === 'F' ? fromFahrenheit(value) : scale === 'K' ? value + ABSOLUTE_ZERO : value
  if (celsius < ABSOLUTE_ZERO)
    throw new InputError(field, text, 'must not be below absolute zero, -273.15 °C')
  return celsius
}

/** Number and unit, such as `35 °C` or `95 °F`. @param value [°C] */
export function formatTemperature(value: number | null, system: UnitSystem, digits = 4): string {
  if (value === null || !Number.isFinite(value)) return NOT_KNOWN
  return system === 'US'
    ? `${formatPlain(toFahrenheit(value), digits)} °F`
    : `${formatPlain(value, digits)} °C`
}
