import { z } from 'zod'
import { InputError } from '../errors.ts'
import { DIMENSIONS, type Dimension } from '../units/dimensions.ts'
import { parseQuantity } from '../units/parse.ts'
import { parseTemperature } from '../units/temperature.ts'

export type Vec3 = [x: number, y: number, z: number]
/** [ux uy uz rx ry rz] at the centre of gravity. */
export type Vec6 = readonly [number, number, number, number, number, number]

interface Limits {
  readonly above?: number
  readonly min?: number
  readonly max?: number
}

/** No machine here weighs, turns or measures more than this in SI units; beyond it is a slip. */
const ABSURD = 1e15

/**
 * A quantity in a project file: a number in SI units (rad/s for shaft speed), or text with its
 * unit such as "850 kg". It is always kept as the SI number.
 */
export function quantity(dimension: Dimension, meaning: string, limits: Limits = {}) {
  const unit = DIMENSIONS[dimension].baseLabel
  return z
    .union([z.number(), z.string().transform((text, context) => fromText(text, dimension, context))])
    .check((context) => {
      const problem = outside(context.value, limits, unit)
      if (problem) context.issues.push({ code: 'custom', message: problem, input: context.value })
    })
    .meta({ description: meaning, unit: unit === '' ? 'pure number' : unit, ...limitsForSchema(limits) })
}

/** A quantity that a draft may lack: null says that nobody has given it yet. */
export function optionalQuantity(dimension: Dimension, meaning: string, limits: Limits = {}) {
  const unit = DIMENSIONS[dimension].baseLabel
  return quantity(dimension, meaning, limits)
    .nullable()
    .default(null)
    .meta({ description: meaning, unit: unit === '' ? 'pure number' : unit })
}

/** A temperature in a project file: a number in °C, or text such as "35 °C" or "95 degF". Kept in °C. */
export function temperature(meaning: string) {
  const read = (text: string, context: z.RefinementCtx) => {
    try {
      return parseTemperature(text)
    } catch (error) {
      return refuse(error, text, context)
    }
  }
  return z.union([z.number().min(-273.15).max(5000), z.string().transform(read)]).meta({
    description: meaning,
    unit: '°C',
  })
}

export function vector(dimension: Dimension, meaning: string, limits: Limits = {}) {
  const part = (axis: string) => quantity(dimension, `${axis} component`, limits)
  return z.tuple([part('x'), part('y'), part('z')]).meta({ description: meaning })
}

/** A direction in machine axes; any length but zero, used as a unit vector. */
export function direction(meaning: string) {
  return vector('ratio', meaning).check((context) => {
    const [x, y, zed] = context.value
    if (Math.hypot(x, y, zed) < 1e-12) {
      context.issues.push({
        code: 'custom',
        message: 'a direction needs at least one component that is not zero',
        input: context.value,
      })
    }
  })
}

export const identifier = z
  .string()
  .min(1)
  .max(80)
  .meta({ description: 'identifier, unique in its list; other parts of the project refer to it' })

export const label = (meaning: string) => z.string().max(200).default('').meta({ description: meaning })

function fromText(text: string, dimension: Dimension, context: z.RefinementCtx): number {
  try {
    return parseQuantity(text, dimension)
  } catch (error) {
    return refuse(error, text, context)
  }
}

function refuse(error: unknown, text: string, context: z.RefinementCtx): never {
  const message = error instanceof InputError ? error.allowed : 'not a quantity'
  context.addIssue({ code: 'custom', message, input: text })
  return z.NEVER
}

function outside(value: number, limits: Limits, unit: string): string | null {
  const tail = unit === '' ? '' : ` ${unit}`
  if (!Number.isFinite(value)) return 'must be a finite number'
  if (limits.above !== undefined && !(value > limits.above))
    return `must be greater than ${limits.above}${tail}`
  if (limits.min !== undefined && value < limits.min) return `must not be less than ${limits.min}${tail}`
  const max = limits.max ?? ABSURD
  if (Math.abs(value) > max) return `must not be beyond ${max}${tail}`
  return null
}

function limitsForSchema(limits: Limits): Record<string, number> {
  return {
    ...(limits.above === undefined ? {} : { exclusiveMinimum: limits.above }),
    ...(limits.min === undefined ? {} : { minimum: limits.min }),
    ...(limits.max === undefined ? {} : { maximum: limits.max }),
  }
}
