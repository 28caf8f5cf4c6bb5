import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bracketedRoot } from '../../../core/numerics/bracketed-root.ts'
import { curveAt, monotoneCurve } from '../../../core/numerics/monotone-curve.ts'

/** Points with rising x and y, some intervals a thousand times as long or steep as others. */
const steps = fc.array(
  fc.tuple(fc.double({ min: -3, max: 0, noNaN: true }), fc.double({ min: -3, max: 0, noNaN: true })),
  { minLength: 1, maxLength: 8 },
)
const risingPoints = steps.map((exponents) => {
  let [x, y] = [0, 0]
  const points: [number, number][] = [[0, 0]]
  for (const [a, b] of exponents) points.push([(x += 10 ** a), (y += 10 ** b)])
  return points
})
const share = fc.double({ min: 0, max: 1, noNaN: true })

describe('a monotone curve', () => {
  it('passes through its points and never overshoots between them', () => {
    fc.assert(
      fc.property(risingPoints, share, (points, at) => {
        const curve = monotoneCurve(points)
        for (const [x, y] of points) expect(curveAt(curve, x).value).toBeCloseTo(y, 12)
        points.slice(1).forEach(([x1, y1], k) => {
          const [x0, y0] = points[k] ?? [0, 0]
          const { value, slope, outside } = curveAt(curve, x0 + at * (x1 - x0))
          // 1e-12 of the largest value: rounding of the cubic
          expect(value).toBeGreaterThan(y0 - 1e-11)
          expect(value).toBeLessThan(y1 + 1e-11)
          expect(slope).toBeGreaterThan((-1e-9 * (y1 - y0)) / (x1 - x0))
          expect(outside).toBe(false)
        })
      }),
    )
  })

  it('has the slope that it says', () => {
    fc.assert(
      fc.property(risingPoints, fc.double({ min: 0.05, max: 0.95, noNaN: true }), (points, at) => {
        const curve = monotoneCurve(points)
        points.slice(1).forEach(([x1, y1], k) => {
          const [x0, y0] = points[k] ?? [0, 0]
          const [x, h] = [x0 + at * (x1 - x0), 1e-4 * (x1 - x0)]
          const difference = (curveAt(curve, x + h).value - curveAt(curve, x - h).value) / (2 * h)
          // 1e-6 of the secant: third derivative of the cubic times h²; the rest is rounding of y over h
          const secant = (y1 - y0) / (x1 - x0)
          expect(Math.abs(curveAt(curve, x).slope - difference)).toBeLessThan(1e-6 * secant + 1e-11 / h)
        })
      }),
    )
  })

  it('is a straight line through points on one', () => {
    const curve = monotoneCurve([0, 1, 2.5, 7].map((x) => [x, 3 * x]))
    for (const x of [-2, 0.3, 1, 2, 6.9, 11]) {
      expect(curveAt(curve, x).value).toBeCloseTo(3 * x, 12)
      expect(curveAt(curve, x).slope).toBeCloseTo(3, 12)
    }
  })

  it('goes on straight beyond its ends, and says so', () => {
    const curve = monotoneCurve([
      [0, 0],
      [1, 1],
      [2, 4],
    ])
    const end = curve.slope[2] ?? 0
    expect(curveAt(curve, 3)).toEqual({ value: 4 + end, slope: end, outside: true })
    expect(curveAt(curve, -1).outside).toBe(true)
  })

  it('does not go slack before its first point where the end slope is zero', () => {
    // three-point formula at the left: ((2+1)·0.1 - 1)/2 < 0, held at 0; straight on with the secant
    const curve = monotoneCurve([
      [0, 0],
      [1, 0.1],
      [2, 1.1],
    ])
    expect(curve.slope[0]).toBe(0)
    expect(curveAt(curve, -1).slope).toBeCloseTo(0.1, 12)
  })
})

describe('the root between two ends', () => {
  it('is found to the last bits', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (root) => {
        const found = bracketedRoot((x) => x ** 3 - root ** 3, 0, 1e7)
        // two units in the last place
        expect(Math.abs((found ?? 0) / root - 1)).toBeLessThan(5e-16)
      }),
    )
  })

  it('is null where both ends lie on one side, or the function is not known', () => {
    expect(bracketedRoot((x) => x * x + 1, -1, 1)).toBeNull()
    expect(bracketedRoot(() => Number.NaN, -1, 1)).toBeNull()
    expect(bracketedRoot((x) => x, 0, 1)).toBe(0)
    expect(bracketedRoot((x) => x - 1, 0, 1)).toBe(1)
  })
})
