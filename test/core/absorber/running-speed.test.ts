import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { shapeMagnitude } from '../../../core/absorber/response.ts'
import {
  hostMassFromTrial,
  massForStroke,
  massRatioForSplit,
  splitFrequencyRatios,
} from '../../../core/absorber/running-speed.ts'
import { InputError } from '../../../core/errors.ts'

// one seed for all, so that a failure here is a change of the code
fc.configureGlobal({ seed: 1928 })

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })

describe('tuned to one running speed', () => {
  it('splits the resonance as the frequency equation demands', () => {
    fc.assert(
      fc.property(between(1e-6, 10), between(0.05, 20), (mu, f) => {
        for (const g of splitFrequencyRatios(mu, f)) {
          const x = g * g
          const balance = x * x - x * (1 + f * f * (1 + mu)) + f * f
          expect(Math.abs(balance)).toBeLessThan(1e-11 * (x * x + f * f))
        }
      }),
    )
  })

  it('splits symmetrically about a host tuned to: product 1', () => {
    const [low, high] = splitFrequencyRatios(0.2, 1)
    expect(low * high).toBeCloseTo(1, 14)
    expect(massRatioForSplit(low)).toBeCloseTo(0.2, 13)
    expect(massRatioForSplit(high)).toBeCloseTo(0.2, 13)
  })

  it('finds the host mass from a trial', () => {
    const [low] = splitFrequencyRatios(2 / 30, 1)
    expect(hostMassFromTrial(2, low)).toBeCloseTo(30, 11)
  })

  it.each([0, NaN, -1, Infinity])('refuses a split at %d', (g) => {
    expect(() => massRatioForSplit(g)).toThrow(InputError)
  })

  it('sizes the mass so that the travel is exactly the limit, damped or not', () => {
    fc.assert(
      fc.property(
        between(1, 1000),
        between(0, 0.5),
        between(0, 0.3),
        between(0.3, 3),
        between(1e-6, 1e-3),
        (hostMass, hostDamping, zeta, g, limit) => {
          const omega = 2 * Math.PI * 20
          const omegaHost = omega / g
          const [force, stiffness] = [50, hostMass * omegaHost * omegaHost]
          const mass = massForStroke(
            force,
            limit,
            omega,
            [stiffness - hostMass * omega * omega, 2 * hostDamping * hostMass * omegaHost * omega],
            zeta,
          )
          if (mass === 0) return
          const system = { massRatio: mass / hostMass, hostDamping, frequencyRatio: g, dampingRatio: zeta }
          const travel = shapeMagnitude({ power: 2, numerator: 'travel', suspension: false }, system, g)
          expect(((force / stiffness) * travel) / limit).toBeCloseTo(1, 6)
        },
      ),
    )
  })

  it('needs F / X_a whatever the host when nothing is damped', () => {
    expect(massForStroke(200, 0.002, 150, [12_345, 0], 0) * 150 ** 2).toBeCloseTo(100_000, 6)
  })
})
