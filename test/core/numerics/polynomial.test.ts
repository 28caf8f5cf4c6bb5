import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  polynomialDerivative,
  polynomialProduct,
  polynomialValue,
  realRoots,
} from '../../../core/numerics/polynomial.ts'

// one seed for all, so that a failure here is a change of the code
fc.configureGlobal({ seed: 1928 })

const withRoots = (roots: readonly number[]) =>
  roots.reduce<Float64Array>((product, root) => polynomialProduct(product, [-root, 1]), Float64Array.of(1))

describe('real roots of a polynomial', () => {
  it('come rising, all of them', () => {
    expect(realRoots(withRoots([3, -2, 0.5]), -10, 10)).toEqual([
      expect.closeTo(-2, 14),
      expect.closeTo(0.5, 14),
      expect.closeTo(3, 14),
    ])
  })

  it('leave out those outside the interval and those that are not real', () => {
    const pair = polynomialProduct([1, 0, 1], withRoots([1, 5]))
    expect(realRoots(pair, 0, 2)).toEqual([expect.closeTo(1, 14)])
    expect(realRoots([1, 0, 1], -5, 5)).toEqual([])
  })

  it('keep relative precision when they crowd at zero', () => {
    const roots = [-3e-9, -1e-9, 2e-9, 5e-9]
    const found = realRoots(withRoots(roots), -1, 1e6)
    // coefficients carry rounding of their own size: a dozen digits of each root remain
    found.forEach((root, k) => expect(root / (roots[k] ?? NaN)).toBeCloseTo(1, 12))
    expect(found).toHaveLength(4)
  })

  it('are found across twelve orders of magnitude', () => {
    const found = realRoots(withRoots([1e-3, 1, 1e9]), -1, 1e15)
    expect(found.map((root) => Math.log10(root))).toEqual([
      expect.closeTo(-3, 10),
      expect.closeTo(0, 12),
      expect.closeTo(9, 12),
    ])
  })

  it('ignore leading zeros, and a constant has none', () => {
    expect(realRoots([-4, 2, 0, 0], 0, 9)).toEqual([2])
    expect(realRoots([5], -1, 1)).toEqual([])
    expect(realRoots([-1, 1], 2, 2)).toEqual([])
  })

  it('refuse a degree that the work space does not hold', () => {
    expect(() => realRoots(new Float64Array(20).fill(1), -1, 1)).toThrow(RangeError)
  })

  it('are those the polynomial was made of', () => {
    const spread = fc
      .uniqueArray(fc.integer({ min: -20, max: 20 }), { minLength: 1, maxLength: 7 })
      .map((list) => list.toSorted((a, b) => a - b))
    fc.assert(
      fc.property(spread, (roots) => {
        const found = realRoots(withRoots(roots), -25, 25)
        expect(found).toHaveLength(roots.length)
        // whole numbers up to 20 to the 7th power: coefficients are exact, seven roots lose six digits at most
        found.forEach((root, k) => expect(Math.abs(root - (roots[k] ?? NaN))).toBeLessThan(1e-8))
      }),
    )
  })
})

describe('polynomial arithmetic', () => {
  it('multiplies, derives and evaluates', () => {
    expect(Array.from(polynomialProduct([1, 2], [3, 0, 1]))).toEqual([3, 6, 1, 2])
    expect(Array.from(polynomialDerivative([5, 4, 3, 2]))).toEqual([4, 6, 6])
    expect(Array.from(polynomialDerivative([5]))).toEqual([0])
    expect(polynomialValue([1, -3, 2], 4)).toBe(21)
  })
})
