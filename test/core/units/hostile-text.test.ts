import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { DIMENSIONS, type Dimension } from '../../../core/units/dimensions.ts'
import { parseQuantity } from '../../../core/units/parse.ts'

const EVERY_DIMENSION = Object.keys(DIMENSIONS) as Dimension[] // keys of the table itself

describe('text that is no quantity', () => {
  const texts = [
    '',
    '   ',
    'soft',
    'NaN',
    'Infinity',
    '-Infinity',
    '1e999',
    '-1e999',
    '9^9^9^9',
    '1/0',
    '0/0',
    '1/0 mm',
    '(-1)^0.5',
    'i',
    'pi',
    'e',
    'true',
    'null',
    'undefined',
    'constructor',
    '__proto__',
    'prototype',
    'toString',
    'hasOwnProperty',
    'constructor.constructor("return 1")()',
    '2 constructor',
    '1 __proto__',
    'sqrt(4)',
    'eval("1")',
    'import("fs")',
    'createUnit("foo")',
    'f(x) = x',
    'a = 3',
    '1; 2',
    '1\n2',
    '[1, 2]',
    '{a: 1}',
    '{"a": 1}.a',
    '"5"',
    '5!',
    '5 > 3',
    '5 == 5',
    '1 ? 2 : 3',
    'not 1',
    '5 to mm',
    '1:3',
    '5 |',
    '# 5',
    '5 mod 3',
    "5'",
    '5..3',
    '((((5',
    '5 5',
    '5 kg kg',
  ]
  it.each(texts)('is refused for every kind of quantity: %j', (text) => {
    for (const dimension of EVERY_DIMENSION) {
      expect(() => parseQuantity(text, dimension, 'SI')).toThrow(InputError)
    }
  })

  it('is refused when it is too long to be typed', () => {
    expect(() => parseQuantity('1+'.repeat(60) + '1', 'ratio')).toThrow(InputError)
    expect(() => parseQuantity('9'.repeat(1_000_000), 'ratio')).toThrow(InputError)
    expect(() => parseQuantity('('.repeat(60) + ')'.repeat(60), 'ratio')).toThrow(InputError)
  })

  it('changes nothing for later readers', () => {
    for (const text of texts) {
      try {
        parseQuantity(text, 'length')
      } catch {
        // only what is left behind counts here
      }
    }
    expect(parseQuantity('1 in', 'length')).toBe(0.0254)
    expect(({} as Record<string, unknown>)['a']).toBeUndefined() // a plain object, seen as a map
  })
})

describe('any text at all', () => {
  const pieces = fc.constantFrom(
    ...[
      '1',
      '2,5',
      '.',
      '-',
      '+',
      '*',
      '/',
      '^',
      '(',
      ')',
      ' ',
      'mm',
      'in',
      'lb',
      '%',
      '°',
      'rpm',
      'x',
      '=',
      '[',
      '"',
    ],
  )
  const typed = fc.oneof(
    fc.string({ maxLength: 140 }),
    fc.array(pieces, { maxLength: 12 }).map((list) => list.join('')),
  )

  it('gives a finite number or an InputError, nothing else', () => {
    fc.assert(
      fc.property(typed, fc.constantFrom(...EVERY_DIMENSION), (text, dimension) => {
        try {
          expect(Number.isFinite(parseQuantity(text, dimension, 'US'))).toBe(true)
        } catch (error) {
          expect(error).toBeInstanceOf(InputError)
        }
      }),
      { numRuns: 3000 },
    )
  })
})
