import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { formatTemperature, parseTemperature } from '../../../core/units/temperature.ts'

describe('a temperature', () => {
  // SOURCE  definitions of the scales: 0 °C = 273.15 K = 32 °F, 100 °C = 212 °F
  it.each<[string, number]>([
    ['35', 35],
    ['35 °C', 35],
    ['-40 °F', -40],
    ['212 degF', 100],
    ['32F', 0],
    ['273.15 K', 0],
    ['21,5 C', 21.5],
    ['−10 °C', -10],
  ])('reads %s', (text, celsius) => expect(parseTemperature(text)).toBeCloseTo(celsius, 10))

  it('takes a bare number in the units of the reader', () => {
    expect(parseTemperature('95', 'US')).toBeCloseTo(35, 10)
    expect(parseTemperature('95', 'SI')).toBe(95)
  })

  it.each(['', 'warm', '20 bar', '1e3', '-300', '20 °R', '3 4'])('refuses "%s"', (text) => {
    expect(() => parseTemperature(text)).toThrow(InputError)
  })

  it('reads back what it writes, in both systems', () => {
    const value = fc.integer({ min: -60, max: 300 })
    fc.assert(
      fc.property(value, fc.constantFrom('SI' as const, 'US' as const), (celsius, system) => {
        // written to 8 digits
        expect(parseTemperature(formatTemperature(celsius, system, 8), system)).toBeCloseTo(celsius, 4)
      }),
    )
    expect(formatTemperature(null, 'SI')).toBe('–')
  })
})
