import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { lowerBound, thin } from '../../../renderer/charts/thin.ts'

const N = 20_000
const x = Float64Array.from({ length: N }, (_, index) => index / 100)
const WHOLE = { from: 0, to: 199.99 }

describe('thin', () => {
  it('keeps a peak that is one point wide', () => {
    const y = new Float64Array(N)
    y[7777] = 42
    const kept = thin(x, y, 100, WHOLE)
    expect(kept.length).toBeLessThanOrEqual(4 * 102)
    expect(Array.from(kept)).toContain(7777)
  })

  it('keeps a notch that is one point wide', () => {
    const y = new Float64Array(N).fill(1)
    y[12_345] = 0.001
    expect(Array.from(thin(x, y, 100, WHOLE))).toContain(12_345)
  })

  it('keeps the extremes of any curve, in rising order and without repeats', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 2, maxLength: 3000 }),
        fc.integer({ min: 1, max: 60 }),
        (values, buckets) => {
          const places = Float64Array.from(values, (_, index) => index)
          const y = Float64Array.from(values)
          const kept = Array.from(thin(places, y, buckets, { from: 0, to: values.length - 1 }))
          const seen = kept.map((index) => y[index] ?? NaN)
          expect(Math.max(...seen)).toBe(Math.max(...values))
          expect(Math.min(...seen)).toBe(Math.min(...values))
          expect(kept[0]).toBe(0)
          expect(kept.at(-1)).toBe(values.length - 1)
          expect(kept.every((index, at) => at === 0 || index > (kept[at - 1] ?? -1))).toBe(true)
        },
      ),
      { numRuns: 200, seed: 11 },
    )
  })

  it('returns a short curve whole', () => {
    const short = Float64Array.of(0, 1, 2)
    expect(Array.from(thin(short, short, 10, { from: 0, to: 2 }))).toEqual([0, 1, 2])
  })

  it('keeps one neighbour on each side of a zoomed span, so that the line runs off the edge', () => {
    const kept = Array.from(thin(x, x, 10_000, { from: 50, to: 60 }))
    expect(kept[0]).toBe(4999)
    expect(kept.at(-1)).toBe(6001)
  })

  it('cuts a logarithmic axis into equal ratios: low places keep as many points as high ones', () => {
    const places = Float64Array.from({ length: N }, (_, index) => 10 ** (index / (N / 4)))
    const kept = thin(places, places, 40, { from: 1, to: 1e4 }, 'log')
    const low = Array.from(kept).filter((index) => (places[index] ?? 0) < 100).length
    // one bucket of four points is all that the joint of the halves can shift
    expect(Math.abs(low - kept.length / 2)).toBeLessThanOrEqual(4)
  })

  it('takes an empty curve', () => {
    expect(thin(new Float64Array(), new Float64Array(), 10, { from: 0, to: 1 }).length).toBe(0)
  })
})

describe('lowerBound', () => {
  it('finds the first place not below the value', () => {
    const places = Float64Array.of(1, 2, 2, 3)
    expect([0, 1, 2, 2.5, 3, 4].map((value) => lowerBound(places, value))).toEqual([0, 0, 1, 3, 3, 4])
  })
})
