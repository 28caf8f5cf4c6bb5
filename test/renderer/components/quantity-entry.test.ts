import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { readEntry, refusal, stepValue } from '../../../renderer/components/quantity-entry.ts'

/** One metre to the last digit but one: the arithmetic of units rounds once or twice. */
const DIGITS = 12

describe('what is typed into a field', () => {
  it('is read in the units of the project, with units of its own, and as arithmetic', () => {
    // SOURCE the inch is 25.4 mm and the pound 0.45359237 kg exactly (international agreement of 1959; from memory)
    expect(readEntry('3/8 in', 'length', 'SI', false)).toEqual({ value: expect.closeTo(0.009525, DIGITS) })
    expect(readEntry('2*85', 'mass', 'SI', false)).toEqual({ value: 170 })
    expect(readEntry('100', 'mass', 'US', false)).toEqual({ value: expect.closeTo(45.359237, 9) })
  })

  it('means "not given" when it is empty, where that is allowed', () => {
    expect(readEntry('  ', 'mass', 'SI', true)).toEqual({ value: null })
    expect(readEntry('  ', 'mass', 'SI', false)).toHaveProperty('message')
  })

  it.each(['abc', '3 m', '1/0', '5 +', '1e999'])('is refused in words: %s as a mass', (text) => {
    expect(readEntry(text, 'mass', 'SI', true)).toEqual({ message: 'Enter a number, for example 25 kg.' })
  })

  it('is refused in the words of the schema, and other errors go on', () => {
    expect(refusal(new InputError('mass', 0, 'must be greater than 0 kg'))).toBe('Must be greater than 0 kg.')
    expect(() => refusal(new TypeError('bug'))).toThrow(TypeError)
  })

  it('is refused with limits in the units of the project', () => {
    const heavy = new InputError('mass', 0, 'must be greater than 0 kg')
    expect(refusal(heavy, 'mass', 'US')).toBe('Must be greater than 0 lb.')
    // SOURCE 1 in = 25.4 mm exactly: 1 m is 39.3700787402 in
    const thick = new InputError('shim', 2, 'must not be beyond 1 m')
    expect(refusal(thick, 'deflection', 'US')).toBe('Must not be beyond 39.3700787402 in.')
    expect(refusal(thick, 'deflection', 'SI')).toBe('Must not be beyond 1000 mm.')
    expect(refusal(new InputError('x', 2, 'must not be beyond 0.9'), 'share', 'SI')).toBe(
      'Must not be beyond 90 %.',
    )
    // said of another quantity than that of the field, or in other words: as it stands
    expect(refusal(heavy, 'length', 'US')).toBe('Must be greater than 0 kg.')
    expect(refusal(new InputError('x', 2, 'points must rise'), 'length', 'US')).toBe('Points must rise.')
  })
})

describe('stepping', () => {
  it('moves by a tenth to a hundredth of the value, on round numbers', () => {
    expect(stepValue(850, 'mass', 'SI', 1)).toBe(860)
    expect(stepValue(12, 'mass', 'SI', 1)).toBe(13)
    expect(stepValue(null, 'mass', 'SI', 1)).toBe(1)
    expect(stepValue(0.05, 'ratio', 'SI', 1)).toBe(0.06)
  })

  it('comes back to the digit', () => {
    const start = 0.1
    const up = stepValue(start, 'length', 'US', 3)
    expect(stepValue(up, 'length', 'US', -3)).toBeCloseTo(start, DIGITS)
    expect(stepValue(0.3, 'length', 'SI', 1)).toBeCloseTo(0.301, DIGITS)
  })
})
