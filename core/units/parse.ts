import type { MathNode, Unit } from 'mathjs'
import { InputError } from '../errors.ts'
import { DIMENSIONS, type Dimension, type UnitSystem } from './dimensions.ts'
import { engine } from './engine.ts'

const OPERATORS = new Set(['+', '-', '*', '/', '^'])
const MAX_LENGTH = 120

type Spelling = readonly [RegExp, string]

/** Spellings from the trade that mathjs does not know, as whole words. */
const SPELLINGS: readonly Spelling[] = [
  [/µm|μm|\bmicrons?\b/g, 'um'],
  [/²/g, '^2'],
  [/³/g, '^3'],
  [/⁻¹/g, '^-1'],
  [/[·×]/g, '*'],
  [/[−–]/g, '-'],
  [/°/g, ' deg'],
  [/%/g, ' percent'],
  [/\bips\b/g, 'inch/s'],
  [/\brev\/min\b|\br\/min\b|(?<![\d.,])1\/min\b|\bmin-1\b/g, 'rpm'],
  [/\b(RPM|cpm|CPM)\b/g, 'rpm'],
  // `oz-in`, `N-m` and `N.m` join units; a minus or a point between letters means nothing else
  [/(?<=[a-z])[-.](?=[a-z])/gi, ' '],
  [/\bin\b/g, 'inch'],
  [/\bmils\b/g, 'mil'],
  [/\blbm\b/g, 'lb'],
]

/** In a field for a force a pound can only be a pound-force. */
const POUND_FORCE: readonly Spelling[] = [[/\blbs?\b/g, 'lbf']]

/** What a word means only in a field of this dimension. */
const SPELLINGS_WITHIN: Partial<Record<Dimension, readonly Spelling[]>> = {
  force: POUND_FORCE,
  moment: POUND_FORCE,
  stiffness: POUND_FORCE,
  damping: POUND_FORCE,
  acceleration: [[/\bg\b/g, '*9.80665 m/s^2']],
  // the grade is named by its figure in mm/s, without a unit
  balanceGrade: [[/^G\s*([\d.]+)$/, '$1 mm/s']],
}

function normalise(text: string, dimension: Dimension): string {
  let result = plainNumbers(text.trim())
  for (const [pattern, replacement] of [...SPELLINGS, ...(SPELLINGS_WITHIN[dimension] ?? [])]) {
    result = result.replace(pattern, replacement)
  }
  return result
}

/**
 * `2,5` is two and a half; `1,480`, `12,500.5`, `12.500,5` and `12 500` are read as thousands.
 * A group after a leading zero is none: `0,125` is an eighth.
 */
function plainNumbers(text: string): string {
  const closed = text.replace(/(?<![\d.,])[1-9]\d{0,2}(?:[ \u00a0\u202f]\d{3})+(?!\d)/g, (number) =>
    number.replace(/\s/g, ''),
  )
  return closed.replace(/\d[\d.,]*/g, (number) => {
    if (!number.includes(',')) return number
    if (/^[1-9]\d{0,2}(,\d{3})+(\.\d+)?$/.test(number)) return number.replaceAll(',', '')
    if (/^[1-9]\d{0,2}(\.\d{3})+,\d+$/.test(number)) return number.replaceAll('.', '').replace(',', '.')
    return /^\d+,\d+$/.test(number) ? number.replace(',', '.') : number
  })
}

function assertAllowed(node: MathNode): void {
  node.traverse((part) => {
    if (part.type === 'ConstantNode' || part.type === 'ParenthesisNode') return
    if (part.type === 'SymbolNode' && engine.Unit.isValuelessUnit((part as unknown as { name: string }).name))
      return
    if (part.type === 'OperatorNode' && OPERATORS.has((part as unknown as { op: string }).op)) return
    throw new Error('not a quantity')
  })
}

/** What a field of this dimension takes, as said under the field. */
export function expectedText(dimension: Dimension, system: UnitSystem): string {
  const label = DIMENSIONS[dimension][system][1]
  const example = label === '' ? '0.25' : label === '°' || label === '%' ? `25${label}` : `25 ${label}`
  return `enter a number, for example ${example}`
}

/**
 * Reads typed text as a quantity: a number or arithmetic (`2*85`), with or without units
 * (`3/8 in`, `12 kg + 4 lb`). A bare number is taken in the display unit of `system`.
 * @returns the value in the base unit of the dimension (SI; rad/s for shaft speed)
 * @throws InputError for anything that is not a finite quantity of this dimension
 * @example parseQuantity('1480 rpm', 'shaftSpeed') // 154.985...
 */
export function parseQuantity(
  text: string,
  dimension: Dimension,
  system: UnitSystem | 'base' = 'base',
  field = dimension as string,
): number {
  const fail = (): never => {
    throw new InputError(field, text, expectedText(dimension, system === 'base' ? 'SI' : system))
  }
  if (text.trim() === '' || text.length > MAX_LENGTH) return fail()
  let value: unknown
  try {
    const node = engine.parse(normalise(text, dimension))
    assertAllowed(node)
    value = node.compile().evaluate({})
  } catch {
    return fail()
  }
  const result = toBase(value, dimension, system)
  return result !== null && Number.isFinite(result) ? result : fail()
}

function toBase(value: unknown, dimension: Dimension, system: UnitSystem | 'base'): number | null {
  const spec = DIMENSIONS[dimension]
  if (typeof value === 'number') return value * factorOf(dimension, system)
  if (!engine.isUnit(value)) return null
  const unit = value as Unit
  if (spec.base === '') return unit.equalBase(engine.unit('percent')) ? unit.toNumber('percent') / 100 : null
  if (dimension === 'shaftSpeed' && unit.equalBase(engine.unit('Hz')))
    return unit.toNumber('Hz') * 2 * Math.PI
  if (dimension === 'frequency' && unit.equalBase(engine.unit('rad/s')))
    return unit.toNumber('rad/s') / (2 * Math.PI)
  return unit.equalBase(engine.unit(spec.base)) ? unit.toNumber(spec.base) : null
}

const factors = new Map<string, number>()

/** Size of the display unit in base units: stored value = shown value × factor. */
export function factorOf(dimension: Dimension, system: UnitSystem | 'base'): number {
  const spec = DIMENSIONS[dimension]
  const unit = system === 'base' ? spec.base : spec[system][0]
  if (unit === '' || unit === spec.base) return 1
  if (unit === 'percent') return 0.01
  const key = `${unit}>${spec.base}`
  const known = factors.get(key)
  if (known !== undefined) return known
  const factor = engine.unit(unit).toNumber(spec.base)
  factors.set(key, factor)
  return factor
}
