import type { Vec3 } from '../project/fields.ts'
import type { Dimension, UnitSystem } from '../units/dimensions.ts'
import { formatNumber, formatQuantity, NOT_KNOWN, unitLabel } from '../units/format.ts'
import { factorOf } from '../units/parse.ts'

/** Said in words where a quantity of the report is not known. */
export const NOT_KNOWN_WORDS = 'not known'

type Value = number | null | undefined

/** Formats quantities in one system of units; every number of the report passes through here. */
export interface Writer {
  readonly system: UnitSystem
  /** number and unit; 'not known' where there is none. @param value SI */
  quantity(value: Value, dimension: Dimension, digits?: number): string
  /** the number alone; a dash where there is none. @param value SI */
  number(value: Value, dimension: Dimension, digits?: number): string
  unit(dimension: Dimension): string
  /** `(1, 2, 3) mm` */
  vector(value: Vec3, dimension: Dimension): string
  /** for a figure: the number in the display unit, null where there is none. @param value SI */
  plotted(value: number, dimension: Dimension): number | null
}

export function writerFor(system: UnitSystem): Writer {
  const number: Writer['number'] = (value, dimension, digits = 4) =>
    formatNumber(value, dimension, system, digits)
  return {
    system,
    number,
    quantity: (value, dimension, digits = 4) => {
      const text = formatQuantity(value, dimension, system, digits)
      return text === NOT_KNOWN ? NOT_KNOWN_WORDS : text
    },
    unit: (dimension) => unitLabel(dimension, system),
    vector: (value, dimension) => {
      const parts = withoutNoise(value, dimension === 'length' ? SMALLEST_LENGTH : 0)
        .map((part) => number(part, dimension))
        .join(', ')
      return `(${parts}) ${unitLabel(dimension, system)}`.trimEnd()
    },
    plotted: (value, dimension) => (Number.isFinite(value) ? value / factorOf(dimension, system) : null),
  }
}

/** No drawing shows a place closer than this [m]. */
const SMALLEST_LENGTH = 1e-10
/** A value this small beside the largest of its kind is rounding: sixteen digits less four of margin. */
export const NOISE = 1e-12

/** Values that are only rounding beside the largest of them, or below `floor`, read as zero. */
export function withoutNoise(values: readonly number[], floor = 0): readonly number[] {
  const least = Math.max(floor, NOISE * Math.max(...values.map((value) => Math.abs(value))))
  return values.map((value) => (Math.abs(value) < least ? 0 : value))
}
