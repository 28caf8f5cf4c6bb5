import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { DIMENSIONS, UNIT_SYSTEMS, type Dimension } from '../../../core/units/dimensions.ts'
import {
  editableNumber,
  formatNumber,
  formatPlain,
  formatQuantity,
  NOT_KNOWN,
} from '../../../core/units/format.ts'
import { parseQuantity } from '../../../core/units/parse.ts'

const EVERY_DIMENSION = Object.keys(DIMENSIONS) as Dimension[] // keys of the table itself
const system = fc.constantFrom(...UNIT_SYSTEMS)
const dimension = fc.constantFrom(...EVERY_DIMENSION)

describe('a number for reading', () => {
  it.each([
    [213.74, '213.7'],
    [0, '0'],
    [-0, '0'],
    [2.5, '2.5'],
    [-0.1234567, '-0.1235'],
    [1200, '1200'],
    [12345.6, '12350'],
    [9999.9, '10000'],
    [999.96, '1000'],
    [99.996, '100'],
    [0.00099999, '0.001'],
    [0.00001234, '1.234e-5'],
    [1e-5, '1e-5'],
    [12345678, '1.235e7'],
    [1e9, '1e9'],
    [9999999.9, '1e7'],
    [1234567, '1235000'],
  ])('writes %d as %s', (value, expected) => expect(formatPlain(value)).toBe(expected))

  it.each([NaN, Infinity, -Infinity, null, undefined])('writes %s as not known', (value) => {
    expect(formatNumber(value, 'force', 'SI')).toBe(NOT_KNOWN)
    expect(formatQuantity(value, 'force', 'SI')).toBe(NOT_KNOWN)
  })

  it('keeps to the asked digits: never further off than half a unit of the last one', () => {
    const value = fc.double({ min: 1e-12, max: 1e12, noNaN: true })
    fc.assert(
      fc.property(value, fc.integer({ min: 2, max: 8 }), (number, digits) => {
        const text = formatPlain(number, digits)
        expect(Number(text)).not.toBeNaN()
        // half a unit of the last digit is at most 0.5 × 10^(1-digits) of the number; 1e-12 for rounding
        expect(Math.abs(Number(text) / number - 1)).toBeLessThanOrEqual(0.5 * 10 ** (1 - digits) + 1e-12)
        const significant = text.replace(/e.*$/, '').replace('.', '').replace(/^0+/, '')
        expect(significant.replace(/0+$/, '').length).toBeLessThanOrEqual(digits)
      }),
    )
  })

  it('sets the unit as the trade does', () => {
    expect(formatQuantity(213.74, 'force', 'SI')).toBe('213.7 N')
    expect(formatQuantity(213.74, 'force', 'US')).toBe('48.05 lbf')
    expect(formatQuantity(0.9, 'share', 'US')).toBe('90 %')
    expect(formatQuantity(Math.PI / 2, 'angle', 'SI')).toBe('90°')
    expect(formatQuantity(1.25, 'ratio', 'SI')).toBe('1.25')
  })
})

describe('a number for editing', () => {
  // Up to nine digits are typed; twelve are shown, which leaves three for binary noise.
  const typed = fc
    .tuple(fc.integer({ min: -999_999_999, max: 999_999_999 }), fc.integer({ min: -12, max: 3 }))
    .map(([digits, exponent]) => Number(`${digits}e${exponent}`))

  it('shows exactly what was typed, in either system', () => {
    fc.assert(
      fc.property(typed, dimension, system, (number, kind, units) => {
        const stored = parseQuantity(String(number), kind, units)
        expect(Number(editableNumber(stored, kind, units))).toBe(number === 0 ? 0 : number)
      }),
      { numRuns: 2000 },
    )
  })

  it('does not move the value when the other system has been shown in between', () => {
    fc.assert(
      fc.property(typed, dimension, (number, kind) => {
        const stored = parseQuantity(String(number), kind, 'SI')
        const seen = parseQuantity(editableNumber(stored, kind, 'US'), kind, 'US')
        // shown with twelve digits: half a unit of the last one
        expect(Math.abs(seen - stored)).toBeLessThanOrEqual(5e-12 * Math.abs(stored))
        expect(Number(editableNumber(seen, kind, 'US'))).toBe(Number(editableNumber(stored, kind, 'US')))
      }),
    )
  })

  it('is empty where nothing is known', () => expect(editableNumber(NaN, 'mass', 'SI')).toBe(''))
})
