import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import type { Dimension } from '../../../core/units/dimensions.ts'
import { parseQuantity } from '../../../core/units/parse.ts'

const read = (text: string, dimension: Dimension = 'ratio') => parseQuantity(text, dimension, 'SI')

describe('a bare number', () => {
  it('is taken in the display unit of the field', () => {
    expect(parseQuantity('100', 'length', 'SI')).toBeCloseTo(0.1, 15)
    expect(parseQuantity('100', 'length', 'US')).toBeCloseTo(2.54, 14)
    expect(parseQuantity('25', 'share', 'US')).toBeCloseTo(0.25, 15)
  })

  it('is taken in SI where no display unit is given, as in a project file', () => {
    expect(parseQuantity('100', 'length')).toBe(100)
    expect(parseQuantity('0.25', 'share')).toBe(0.25)
    expect(parseQuantity('100', 'shaftSpeed')).toBe(100)
  })

  it('means the same quantity whichever system is shown, once it carries its unit', () => {
    expect(parseQuantity('3/8 in', 'length', 'SI')).toBe(parseQuantity('3/8 in', 'length', 'US'))
  })
})

describe('arithmetic', () => {
  it.each([
    ['2*85', 170],
    ['(3+4)*2', 14],
    ['2^10', 1024],
    ['10/4 - 1', 1.5],
    ['-3', -3],
    ['1.5e3', 1500],
    ['2 × 3', 6],
    ['5 − 2', 3],
  ])('computes %s', (text, expected) => expect(read(text)).toBe(expected))

  it('adds quantities in different units of one kind', () => {
    // 12 kg + 4 × 0.453 592 37 kg; 1e-12 [kg]: two roundings of a sum near 14
    expect(read('12 kg + 4 lb', 'mass')).toBeCloseTo(13.81436948, 12)
    expect(read('2*85 kg', 'mass')).toBeCloseTo(170, 12)
    expect(read('1/2 in + 3 mm', 'length')).toBeCloseTo(0.0157, 15)
  })

  it('refuses to add a bare number to a quantity, and a percentage to a bare number', () => {
    expect(() => read('12 kg + 4', 'mass')).toThrow(InputError)
    expect(() => read('20 + 5%', 'share')).toThrow(InputError)
    expect(read('20% + 5%', 'share')).toBeCloseTo(0.25, 15)
  })
})

describe('separators', () => {
  it.each([
    ['2,5', 2.5],
    ['0,125', 0.125],
    ['0,5', 0.5],
    ['1,48', 1.48],
    ['1,480', 1480],
    ['12,500.5', 12500.5],
    ['12.500,5', 12500.5],
    ['1,234,567', 1234567],
    ['12 500', 12500],
    ['12 500,5', 12500.5],
    ['12\u202f500', 12500],
    ['1,5*2', 3],
  ])('reads %s', (text, expected) => expect(read(text)).toBe(expected))

  it.each(['1.2.3', '1,2,3', '1,,5', '12 50', '1, 5'])('refuses %s', (text) => {
    expect(() => read(text)).toThrow(InputError)
  })

  it('keeps the number before the unit whole', () => {
    expect(read('2,5 mm', 'length')).toBeCloseTo(0.0025, 15)
    expect(read('1 480 rpm', 'shaftSpeed')).toBeCloseTo((1480 * 2 * Math.PI) / 60, 12)
    expect(read('11/min', 'shaftSpeed')).toBeCloseTo((11 * 2 * Math.PI) / 60, 13)
  })
})

describe('a quantity of another kind', () => {
  it.each<[string, Dimension]>([
    ['5 kg', 'length'],
    ['5 mm', 'mass'],
    ['5 mm', 'ratio'],
    ['5 m^2', 'length'],
    ['5 N', 'stiffness'],
    ['5 lb', 'stiffness'],
    ['5 kg', 'force'],
    ['5 %', 'length'],
    ['10% mm', 'length'],
    ['5 Hz', 'angle'],
    ['5 mm/s', 'displacement'],
    ['5 degC', 'ratio'],
  ])('is refused: %s as %s', (text, dimension) => expect(() => read(text, dimension)).toThrow(InputError))

  it('names the field, what was typed and what would do', () => {
    try {
      parseQuantity('5 kg', 'length', 'US', 'machine.shaft')
    } catch (error) {
      expect(error).toMatchObject({
        field: 'machine.shaft',
        value: '5 kg',
        allowed: expect.stringContaining('in'),
      })
      return
    }
    expect.unreachable('a mass is no length')
  })
})
