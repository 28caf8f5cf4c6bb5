import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fixedPointTuning } from '../../../core/absorber/fixed-points.ts'
import type { Kind } from '../../../core/absorber/kinds.ts'
import { shapeMagnitude } from '../../../core/absorber/response.ts'
import { InputError } from '../../../core/errors.ts'

// one seed for all, so that a failure here is a change of the code
fc.configureGlobal({ seed: 1928 })

const kind = (numerator: Kind['numerator'], power: number): Kind => ({
  name: `${numerator === 'absolute' ? 'F' : 'R'}${power}`,
  numerator,
  power,
  suspension: false,
})
const KINDS = [
  ...[-2, -1, 0, 1, 2, 3, 4].map((power) => kind('absolute', power)),
  kind('relative', 0),
  kind('relative', 2),
]

describe('closed forms at the fixed points', () => {
  // SOURCE  F0: Den Hartog 1956, damping by Brock 1946; F1, F2, R0: Warburton 1982 (all from memory, each
  // confirmed by the tables of the reference file). Damping ratio over the absorber's own frequency.
  const published: readonly (readonly [Kind, (mu: number) => number, (mu: number) => number])[] = [
    [kind('absolute', 0), (mu) => 1 / (1 + mu), (mu) => (3 * mu) / (8 * (1 + mu))],
    [
      kind('absolute', 1),
      (mu) => Math.sqrt(1 + mu / 2) / (1 + mu),
      (mu) => (3 * mu * (1 + mu + (5 * mu * mu) / 24)) / (8 * (1 + mu) * (1 + mu / 2) ** 2),
    ],
    [kind('absolute', 2), (mu) => 1 / Math.sqrt(1 + mu), (mu) => (3 * mu) / (8 * (1 + mu / 2))],
    [
      kind('relative', 0),
      (mu) => Math.sqrt(1 - mu / 2) / (1 + mu),
      (mu) => (3 * mu) / (8 * (1 + mu) * (1 - mu / 2)),
    ],
  ]
  it.each(published)('%o as published', (of, frequencyRatio, dampingSquared) => {
    for (const mu of [1e-6, 0.01, 0.1, 0.5]) {
      const tuning = fixedPointTuning(of, mu)
      // the same formula rearranged: rounding only
      expect(tuning?.frequencyRatio).toBeCloseTo(frequencyRatio(mu), 13)
      expect((tuning?.dampingRatio ?? NaN) ** 2 / dampingSquared(mu)).toBeCloseTo(1, 9)
    }
  })

  it.each(KINDS)('$name: every damping passes through both points, at one height', (of) => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-4, max: 0.2, noNaN: true }),
        fc.double({ min: 0.01, max: 2, noNaN: true }),
        (mu, zeta) => {
          const tuning = fixedPointTuning(of, mu)
          if (tuning === null) throw new Error('every kind has a closed form for small absorbers')
          const system = {
            massRatio: mu,
            hostDamping: 0,
            frequencyRatio: tuning.frequencyRatio,
            dampingRatio: zeta,
          }
          for (const g of tuning.fixedPointsAt) {
            // the curve is steep there for odd dampings: slope over height grows like 1/sqrt(mu)
            expect(shapeMagnitude(of, system, g) / tuning.height).toBeCloseTo(1, 8)
          }
        },
      ),
    )
  })

  it.each(KINDS)('$name: the level tangent is level', (of) => {
    const tuning = fixedPointTuning(of, 0.05)
    tuning?.levelDampingSquared.forEach((squared, index) => {
      const system = {
        massRatio: 0.05,
        hostDamping: 0,
        frequencyRatio: tuning.frequencyRatio,
        dampingRatio: Math.sqrt(squared),
      }
      const g = tuning.fixedPointsAt[index] ?? NaN
      const slope = (shapeMagnitude(of, system, g + 1e-5) - shapeMagnitude(of, system, g - 1e-5)) / 2e-5
      // the central difference leaves the third derivative times 1e-10 / 6
      expect(Math.abs(slope)).toBeLessThan(1e-5 * tuning.height)
    })
  })

  it('keeps its digits for the smallest absorbers', () => {
    const tuning = fixedPointTuning(kind('absolute', 0), 1e-12)
    // g_P and g_Q stand at 1 -+ sqrt(mu / 2) / 2 to first order
    expect(((1 - (tuning?.fixedPointsAt[0] ?? NaN)) * 2) / Math.sqrt(5e-13)).toBeCloseTo(1, 5)
  })

  it('says that there is none for mass ratios beyond its range', () => {
    expect(fixedPointTuning(kind('relative', 0), 2)).toBeNull() // f² = (1 - mu/2) / (1 + mu)²
    expect(fixedPointTuning(kind('absolute', -1), 1)).toBeNull() // needs mu <= 2/3
    expect(fixedPointTuning(kind('absolute', -2), 0.5)).toBeNull()
    expect(fixedPointTuning(kind('absolute', 7), 0.1)).toBeNull()
    expect(fixedPointTuning(kind('absolute', 0), 10)).not.toBeNull()
  })

  it.each([0, -0.1, NaN, Infinity])('refuses a mass ratio of %d', (mu) => {
    expect(() => fixedPointTuning(kind('absolute', 0), mu)).toThrow(InputError)
  })
})
