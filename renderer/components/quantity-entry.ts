import { InputError } from '../../core/errors.ts'
import type { Dimension, UnitSystem } from '../../core/units/dimensions.ts'
import { factorOf, parseQuantity } from '../../core/units/parse.ts'

export type Entry = { readonly value: number | null } | { readonly message: string }

/**
 * Reads what was typed into a field.
 * @param optional whether an emptied field means "not given"
 * @returns the SI value, or what was expected, as a sentence
 */
export function readEntry(text: string, dimension: Dimension, units: UnitSystem, optional: boolean): Entry {
  if (text.trim() === '' && optional) return { value: null }
  try {
    return { value: parseQuantity(text, dimension, units) }
  } catch (error) {
    return { message: refusal(error) }
  }
}

/** What a refused value should have been, as a sentence for under its field. @throws anything unexpected */
export function refusal(error: unknown): string {
  if (!(error instanceof InputError)) throw error
  return `${error.allowed.charAt(0).toUpperCase()}${error.allowed.slice(1)}.`
}

/** Steps of the arrow keys in display units where the size of the number is a poor guide. */
const STEPS: Partial<Record<Dimension, Readonly<Record<UnitSystem, number>>>> = {
  length: { SI: 1, US: 0.1 },
  shaftSpeed: { SI: 10, US: 10 },
  frequency: { SI: 0.1, US: 0.1 },
  angle: { SI: 1, US: 1 },
  ratio: { SI: 0.01, US: 0.01 },
  share: { SI: 1, US: 1 },
}

/**
 * The value some steps further: about a tenth to a hundredth of it each, on round numbers of
 * the display unit, so that stepping up and down again comes back to the digit.
 * @param value SI; null counts as zero
 * @param count steps, negative downwards; 0.1 and 10 are the fine and the coarse step
 */
export function stepValue(
  value: number | null,
  dimension: Dimension,
  units: UnitSystem,
  count: number,
): number {
  const factor = factorOf(dimension, units)
  const shown = Number(((value ?? 0) / factor).toPrecision(12))
  const step = STEPS[dimension]?.[units] ?? magnitudeStep(shown)
  return Number((shown + step * count).toPrecision(12)) * factor
}

function magnitudeStep(shown: number): number {
  return shown === 0 ? 1 : 10 ** (Math.floor(Math.log10(Math.abs(shown))) - 1)
}
