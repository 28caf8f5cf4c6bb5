import { InputError } from '../../core/errors.ts'
import { DIMENSIONS, type Dimension, type UnitSystem } from '../../core/units/dimensions.ts'
import { editableNumber, unitLabel } from '../../core/units/format.ts'
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

/**
 * What a refused value should have been, as a sentence for under its field.
 * @param dimension of the field; with `units` the limits of the schema are said in the project's units
 * @throws anything unexpected
 */
export function refusal(error: unknown, dimension?: Dimension, units?: UnitSystem): string {
  if (!(error instanceof InputError)) throw error
  const words =
    dimension === undefined || units === undefined ? error.allowed : inUnits(error.allowed, dimension, units)
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}.`
}

const LIMIT = /^(must be greater than|must not be less than|must not be beyond) (-?[\d.e+-]+)(?: (.+))?$/

/** A limit of the schema, which stands in the base unit of its dimension, in the units of the reader. */
function inUnits(words: string, dimension: Dimension, units: UnitSystem): string {
  const [, must, limit, unit = ''] = LIMIT.exec(words) ?? []
  if (must === undefined || unit !== DIMENSIONS[dimension].baseLabel) return words
  const label = unitLabel(dimension, units)
  return `${must} ${editableNumber(Number(limit), dimension, units)}${label === '' ? '' : ` ${label}`}`
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
