import { describe, expect, it } from 'vitest'
import { decode, encode } from '../../../electron/api/codec.ts'

describe('encode', () => {
  it('packs typed arrays as base64 of their bytes, views of a part only that part', () => {
    const whole = Uint8Array.of(1, 2, 3, 4)
    expect(encode(whole.subarray(1, 3))).toBe('{"$bytes":"Uint8Array","base64":"AgM="}')
  })

  it.each([NaN, Infinity, -Infinity])('refuses %d, which JSON would turn into null', (value) => {
    expect(() => encode({ mass: value })).toThrow('"mass" is not a finite number')
    expect(() => encode({ curve: Float64Array.of(1, value) })).toThrow(
      '"curve" holds a number that is not finite',
    )
  })

  it.each([() => 1, Symbol('s'), 1n])('refuses what cannot travel: %s', (value) => {
    expect(() => encode({ value })).toThrow(TypeError)
  })
})

describe('decode', () => {
  it('gives back typed arrays of every kind', () => {
    const value = {
      bytes: Uint8Array.of(0, 255),
      whole: Int32Array.of(-1),
      single: Float32Array.of(0.5),
      double: Float64Array.of(0.1, -0),
      none: new Float64Array(),
    }
    expect(decode(encode(value))).toStrictEqual(value)
  })

  it('refuses a name that would reach the prototype, at any depth', () => {
    expect(() => decode('{"a":[{"__proto__":{"admin":true}}]}')).toThrow(SyntaxError)
  })

  it.each([
    '{"$bytes":"Uint8Array","base64":"*"}',
    '{"$bytes":"Float64Array","base64":"AAAA"}',
    '{"$bytes":"toString","base64":""}',
    '{"$bytes":"Uint8Array"}',
  ])('refuses the malformed array %s', (text) => {
    expect(() => decode(text)).toThrow(TypeError)
  })
})
