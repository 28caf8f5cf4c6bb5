import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { readProject } from '../../../core/project/read.ts'
import { trimSteps } from '../../../core/report/sections/trim.ts'
import type { AbsorberResult } from '../../../core/results.ts'

const HOST = { kind: 'single', mass: 100, frequency: 10, dampingRatio: 0.01 } as const
const MASS = 5
// SOURCE  Den Hartog 1956, damped vibration absorber: f = 1/(1 + mu), zeta² = 3 mu / (8 (1 + mu)) at mu = 1/20.
const OPTIMUM = 10 / 1.05
const DAMPING = Math.sqrt(0.15 / 8.4)

function absorber(frequency: number): AbsorberResult {
  const project = readProject({
    format: 'stillbed-project',
    version: 1,
    absorbers: [
      {
        id: 'a',
        host: HOST,
        size: { by: 'mass', mass: MASS },
        tuning: { by: 'given', frequency, dampingRatio: DAMPING },
      },
    ],
  })
  const result = evaluate(project).absorbers[0]
  if (!result) throw new Error('the absorber is computed')
  return result
}

/** Heights of the peaks below and above the middle of the two. */
function peaks({ curve }: AbsorberResult): readonly [lower: number, upper: number] {
  const tops = [...curve.with].flatMap((value, index) => {
    const before = curve.with[index - 1] ?? Infinity
    const after = curve.with[index + 1] ?? Infinity
    return value > before && value >= after ? [value] : []
  })
  const [lower, upper] = tops
  if (lower === undefined || upper === undefined || tops.length !== 2) throw new Error('two peaks stand')
  return [lower, upper]
}

describe('trim of an absorber', () => {
  it('gives the mass, or the spring, that moves the own frequency by the share', () => {
    const tuned = absorber(OPTIMUM)
    for (const { share, addedMass, stiffness } of trimSteps(tuned, [-0.05, -0.01, 0.02, 0.05])) {
      const wanted = OPTIMUM * (1 + share)
      // omega² = k / m, written out; 1e-12: a few roundings
      expect(Math.sqrt(tuned.stiffness / (MASS + addedMass)) / (2 * Math.PI) / wanted).toBeCloseTo(1, 12)
      expect(Math.sqrt(stiffness / MASS) / (2 * Math.PI) / wanted).toBeCloseTo(1, 12)
    }
  })

  it('goes the way that the sheet advises: a higher lower peak asks for more moving mass', () => {
    const [lowerWhenFast, upperWhenFast] = peaks(absorber(OPTIMUM * 1.04))
    expect(lowerWhenFast).toBeGreaterThan(upperWhenFast)
    const [lowerWhenSlow, upperWhenSlow] = peaks(absorber(OPTIMUM * 0.96))
    expect(upperWhenSlow).toBeGreaterThan(lowerWhenSlow)
  })
})
