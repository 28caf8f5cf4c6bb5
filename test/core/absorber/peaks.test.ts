import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { kindOf, unboundedAt, type Shape } from '../../../core/absorber/kinds.ts'
import { logShape, logShapeJet, magnitudeAt } from '../../../core/absorber/log-shape.ts'
import { barePeak, worstPeak } from '../../../core/absorber/peaks.ts'
import { bareMagnitude, shapeMagnitude } from '../../../core/absorber/response.ts'

// one seed for all, so that a failure here is a change of the code
fc.configureGlobal({ seed: 1928 })

const shapes: Shape[] = (['absolute', 'relative', 'travel'] as const).flatMap((numerator) =>
  [0, 1, 2].flatMap((power) => [false, true].map((suspension) => ({ power, numerator, suspension }))),
)
const anyShape = fc.constantFrom(...shapes)
const logarithmic = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp)
const anySystem = fc.record({
  massRatio: logarithmic(1e-3, 3),
  hostDamping: fc.oneof(fc.constant(0), logarithmic(1e-4, 2)),
  frequencyRatio: logarithmic(0.2, 4),
  dampingRatio: logarithmic(3e-3, 2),
})

describe('exact peaks', () => {
  it('no sample of the curve stands above the worst peak, and one comes near it', () => {
    fc.assert(
      fc.property(anyShape, anySystem, (shape, system) => {
        if (unboundedAt(shape, system.hostDamping) !== null) return
        const { height, peaks } = worstPeak(shape, system)
        expect(height).not.toBeNull()
        const samples = Array.from({ length: 4001 }, (_, k) => 1e-4 * 1e9 ** (k / 4000))
        let most = 0
        for (const g of [...samples, ...peaks.map(({ at }) => at)]) {
          most = Math.max(most, shapeMagnitude(shape, system, g))
        }
        // rounding only above; below, an end value is approached but not reached by the samples
        expect(most).toBeLessThanOrEqual((height ?? 0) * (1 + 1e-10))
        expect(most).toBeGreaterThan((height ?? 0) * (1 - 1e-3))
      }),
      { numRuns: 300 },
    )
  })

  it('every peak is a local maximum of the plain formula', () => {
    fc.assert(
      fc.property(anyShape, anySystem, (shape, system) => {
        for (const { at, height } of worstPeak(shape, system).peaks) {
          expect(shapeMagnitude(shape, system, at) / height).toBeCloseTo(1, 9)
          // close by: a peak may have a dip and a higher one at its side, or be flat where the two merge
          for (const beside of [at * (1 - 1e-6), at * (1 + 1e-6)]) {
            expect(shapeMagnitude(shape, system, beside)).toBeLessThanOrEqual(height * (1 + 1e-8))
          }
        }
      }),
      { numRuns: 300 },
    )
  })

  it('finds resonances as sharp as they come', () => {
    const system = { massRatio: 1e-3, hostDamping: 1e-7, frequencyRatio: 1, dampingRatio: 1e-7 }
    const { peaks } = worstPeak({ power: 0, numerator: 'absolute', suspension: false }, system)
    expect(peaks).toHaveLength(2)
    // split by 1 -+ sqrt(mu)/2 to first order
    expect(peaks[0]?.at).toBeCloseTo(1 - Math.sqrt(1e-3) / 2, 3)
    expect(peaks[0]?.height).toBeGreaterThan(1e6)
  })

  it('knows an undamped resonance as unbounded', () => {
    const system = { massRatio: 0.1, hostDamping: 0, frequencyRatio: 1, dampingRatio: 0 }
    expect(worstPeak({ power: 0, numerator: 'absolute', suspension: false }, system).height).toBeNull()
    expect(barePeak({ power: 0, numerator: 'absolute', suspension: false }, 0)).toBeNull()
  })

  it('names the end that governs', () => {
    const system = { massRatio: 0.1, hostDamping: 2, frequencyRatio: 0.9, dampingRatio: 0.2 }
    const worst = worstPeak({ power: 0, numerator: 'absolute', suspension: false }, system)
    expect(worst).toMatchObject({ height: 1, atEnd: true })
  })

  it('stays finite for absurd parameters', () => {
    const absurd = logarithmic(1e-9, 1e9)
    fc.assert(
      fc.property(
        anyShape,
        absurd,
        absurd,
        absurd,
        absurd,
        (shape, massRatio, hostDamping, frequencyRatio, dampingRatio) => {
          const { height, peaks } = worstPeak(shape, { massRatio, hostDamping, frequencyRatio, dampingRatio })
          for (const value of [height ?? 0, ...peaks.flatMap((peak) => [peak.at, peak.height])]) {
            expect(Number.isFinite(value)).toBe(true)
          }
        },
      ),
    )
  })
})

describe('the bare host', () => {
  // SOURCE  handbook forms: |X| k/F peaks at sqrt(1 - 2 zeta²) with 1 / (2 zeta sqrt(1 - zeta²)); the
  // velocity peaks at resonance with 1 / (2 zeta).
  it.each([0.01, 0.1, 0.5])('peaks as the textbook says at zeta = %d', (zeta) => {
    const displacement = barePeak({ power: 0, numerator: 'absolute', suspension: false }, zeta)
    expect(displacement?.height).toBeCloseTo(1 / (2 * zeta * Math.sqrt(1 - zeta * zeta)), 11)
    expect(displacement?.at).toBeCloseTo(Math.sqrt(1 - 2 * zeta * zeta), 11)
    const velocity = barePeak({ power: 1, numerator: 'absolute', suspension: false }, zeta)
    expect(velocity?.height).toBeCloseTo(1 / (2 * zeta), 11)
    expect(velocity?.at).toBeCloseTo(1, 11)
  })

  it('has its transmissibility peak where the curve is highest', () => {
    const shape = { power: 0, numerator: 'absolute', suspension: true } as const
    const peak = barePeak(shape, 0.1)
    const samples = Array.from({ length: 20_001 }, (_, k) => bareMagnitude(shape, 0.1, 0.5 + k * 5e-5))
    expect((peak?.height ?? 0) / Math.max(...samples)).toBeCloseTo(1, 6) // a step of 5e-5 misses by its square
  })
})

describe('the logarithm of the curve', () => {
  it('has the derivatives that differences give', () => {
    fc.assert(
      fc.property(
        anyShape,
        fc.tuple(logarithmic(0.01, 1), fc.constantFrom(0, 0.05, 0.4)),
        fc.tuple(
          fc.double({ min: -0.5, max: 1, noNaN: true }),
          fc.double({ min: -0.5, max: 0.5, noNaN: true }),
          logarithmic(0.1, 1),
        ),
        (shape, [mu, zeta], point) => {
          const curve = logShape(shape, mu, zeta)
          const at = (k: number, step: number) => {
            const [d, a, b] = point.map((value, index) => value + (index === k ? step : 0)) as [
              number,
              number,
              number,
            ] // of three
            return { jet: logShapeJet(curve, d, a, b), level: 2 * Math.log(magnitudeAt(curve, d, a, b)) }
          }
          const jet = at(0, 0).jet
          const slope = (k: number, read: (p: ReturnType<typeof at>) => number) =>
            (read(at(k, 1e-5)) - read(at(k, -1e-5))) / 2e-5
          const pairs: readonly (readonly [number, number])[] = [
            [jet.value, at(0, 0).level],
            [jet.d, slope(0, (p) => p.level)],
            [jet.a, slope(1, (p) => p.level)],
            [jet.b, slope(2, (p) => p.level)],
            [jet.dd, slope(0, (p) => p.jet.d)],
            [jet.da, slope(1, (p) => p.jet.d)],
            [jet.db, slope(2, (p) => p.jet.d)],
            [jet.aa, slope(1, (p) => p.jet.a)],
            [jet.ab, slope(2, (p) => p.jet.a)],
            [jet.bb, slope(2, (p) => p.jet.b)],
          ]
          // central differences of step 1e-5 leave third derivatives times 2e-11 and rounding of 1e-10
          const size = 1 + Math.abs(jet.dd) + Math.abs(jet.aa) + Math.abs(jet.bb)
          for (const [exact, near] of pairs) expect(Math.abs(exact - near)).toBeLessThan(1e-5 * size ** 1.5)
        },
      ),
      { numRuns: 200 },
    )
  })
})

it('travel under the same excitation follows from the motion of the host', () => {
  // equations of motion: X_rel = g² / (A - g²) X
  const system = { massRatio: 0.1, hostDamping: 0.05, frequencyRatio: 0.9, dampingRatio: 0.15 }
  const g = 0.97
  const host = shapeMagnitude(kindOf({ excitation: 'force', response: 'displacement' }, 0.05), system, g)
  const travel = shapeMagnitude({ power: 2, numerator: 'travel', suspension: false }, system, g)
  const absorber = Math.hypot(0.9 ** 2 - g * g, 2 * 0.15 * 0.9 * g)
  expect(travel).toBeCloseTo((host * g * g) / absorber, 12)
})
