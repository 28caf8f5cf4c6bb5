import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { evaluate } from '../../../core/evaluate.ts'
import { dampingNeed, type Clearance } from '../../../core/feasibility/damping-need.ts'
import { heavingMachine, HEAVE } from './machine.ts'

const SAG = 80 / (HEAVE.mass * HEAVE.omega ** 2)
const at = (limit: number, more: Partial<Clearance> = {}): Clearance => ({
  place: 'mounts',
  point: null,
  direction: 'z',
  during: 'steady',
  limit,
  ...more,
})

/** Damping ratio at which a force of constant size gives a peak of `height` times its static deflection: 1 / (2 z sqrt(1 - z²)). */
function ratioFor(height: number): number {
  return Math.sqrt((1 - Math.sqrt(1 - 1 / height ** 2)) / 2)
}

describe('the damping need', () => {
  it.each([3, 8, 30])(
    'is the closed form of a single freedom in the steady state, peak %d times',
    (height) => {
      const { need } = dampingNeed(heavingMachine({ viscous: 500 }), at(height * SAG), [])
      expect(need?.outcome).toBe('found')
      expect(need?.converged).toBe(true)
      // 2e-4: the peak is brought to within 1e-4 of the clearance, and falls as 1 / ratio
      expect(Math.abs((need?.needed.dampingRatio ?? NaN) / ratioFor(height) - 1)).toBeLessThan(2e-4)
      const coefficient = (2 * ratioFor(height) * HEAVE.mass * HEAVE.omega) / 4
      expect(Math.abs((need?.needed.types[0]?.viscous[2] ?? NaN) / coefficient - 1)).toBeLessThan(2e-4)
    },
  )

  it('costs the isolation that the closed form of transmissibility says', () => {
    const { need } = dampingNeed(heavingMachine({ viscous: 100 }), at(4 * SAG), [])
    const r = 150 / HEAVE.omega
    const zeta = need?.needed.dampingRatio ?? NaN
    const ratio = Math.hypot(1, 2 * zeta * r) / Math.hypot(1 - r * r, 2 * zeta * r)
    // 1e-9: one closed form, in two ways
    expect(need?.needed.isolationEfficiency).toBeCloseTo(1 - ratio, 9)
    expect(need?.needed.supportForce).toBeCloseTo(80 * ratio, 7)
    expect(need?.needed.isolationEfficiency ?? NaN).toBeLessThan(need?.present.isolationEfficiency ?? NaN)
  })

  it('of a run-up is just enough: evaluated with it the peak meets the clearance', () => {
    const project = heavingMachine({ lossFactor: 0.02 })
    const limit = 5 * SAG
    const { need } = dampingNeed(project, at(limit, { during: 'up', place: 'point', point: 'P' }), [])
    const type = need?.needed.types[0]
    if (!type) throw new Error('no need')
    const damped = heavingMachine({ lossFactor: type.lossFactor })
    const peak = evaluate(damped).runUp?.up?.points[0]?.peaks.z.value ?? NaN
    // 3e-4: how near the search goes, and how exactly it looks
    expect(Math.abs(peak / limit - 1)).toBeLessThan(3e-4)
    expect(need?.present.peak ?? NaN).toBeGreaterThan(limit)
    // half the ratio is a loss factor's share of critical: eta = 2 zeta
    expect(need?.needed.dampingRatio).toBeCloseTo(type.lossFactor / 2, 9)
    expect(type.equivalentViscous[2]).toBeCloseTo((type.lossFactor * HEAVE.mass * HEAVE.omega) / 4, 6)
  })

  it('gives mounts without any damping one loss factor for all', () => {
    const { need } = dampingNeed(heavingMachine({}), at(6 * SAG), [])
    expect(need?.present).toMatchObject({ factor: 0, dampingRatio: 0, peak: null })
    expect(need?.needed.types[0]?.lossFactor).toBeCloseTo(2 * ratioFor(6), 4)
  })

  it('is none where the clearance holds without, and out of reach where not even critical damping is enough', () => {
    const project = heavingMachine({ viscous: 500 })
    expect(dampingNeed(project, at(50 * SAG, { during: 'up' }), []).need?.outcome).toBe('none')
    const { need } = dampingNeed(project, at(0.5 * SAG), [])
    expect(need?.outcome).toBe('outOfReach')
    expect(need?.residual).toBeGreaterThan(0)
  })

  it('asks for what is missing, and refuses what cannot be', () => {
    const open = heavingMachine({ viscous: 500 }, { runUp: { enabled: true, down: { enabled: false } } })
    const { need, problems } = dampingNeed(open, at(SAG, { during: 'up' }), [])
    expect(need).toBeNull()
    expect(problems.map(({ field }) => field)).toEqual(['runUp.up.law.time'])
    expect(() => dampingNeed(open, at(0), [])).toThrow(InputError)
    expect(() => dampingNeed(open, at(SAG, { place: 'point', point: 'nowhere' }), [])).toThrow(InputError)
  })
})
