import { describe, expect, it } from 'vitest'
import { chartRange, sweepSpeeds } from '../../../core/mounts/speeds.ts'
import { evaluate } from '../../../core/evaluate.ts'
import type { Mode } from '../../../core/results.ts'
import { CORNERS, sketchProject } from './machine-project.ts'

const withDuty = (duty: object) =>
  sketchProject({
    places: CORNERS,
    more: {
      machine: {
        massProperties: {
          from: 'typed',
          mass: 400,
          centreOfGravity: [0, 0, 0.3],
          inertia: { xx: 30, yy: 50, zz: 60 },
        },
        duty,
      },
    },
  })
const mode = (speed: number, dampingRatio: number): Mode => ({
  number: 1,
  frequency: speed / (2 * Math.PI),
  dampedFrequency: null,
  dampingRatio,
  shape: [0, 0, 1, 0, 0, 0],
  absorberShape: {},
  energyShare: [0, 0, 1, 0, 0, 0],
  name: 'heave',
  crossings: [{ order: 1, speed }],
})

describe('chartRange', () => {
  it('ends a quarter beyond the highest operating speed, or where the project says', () => {
    expect(chartRange(withDuty({ runningSpeed: 100 }), [])?.highest).toBe(125)
    expect(chartRange(withDuty({ runningSpeed: 100, highestSpeed: 160 }), [])?.highest).toBe(200)
    expect(chartRange(withDuty({ runningSpeed: 100, chartSpeed: 300 }), [])?.highest).toBe(300)
  })

  it('never ends before a speed that the project names', () => {
    expect(chartRange(withDuty({ runningSpeed: 100, chartSpeed: 30 }), [])?.highest).toBe(100)
  })

  it('begins below the slowest resonance', () => {
    expect(chartRange(withDuty({ runningSpeed: 100 }), [mode(0.4, 0.1)])?.lowest).toBeCloseTo(0.2, 12)
    expect(chartRange(withDuty({ runningSpeed: 100 }), [mode(40, 0.1)])?.lowest).toBeCloseTo(1.25, 12)
  })

  it('does not exist without any speed', () => {
    expect(chartRange(withDuty({}), [])).toBeNull()
  })
})

describe('sweepSpeeds', () => {
  const range = { lowest: 1, highest: 200, exact: [100, 37.123456789, 160] }

  it('rises, stays in the range and goes exactly through the given speeds', () => {
    const speeds = sweepSpeeds(range, [mode(40, 0.02), mode(100, 0.05)], 2000)
    speeds.forEach((speed, i) => {
      if (i > 0) expect(speed).toBeGreaterThan(speeds[i - 1] ?? NaN)
    })
    expect([speeds[0], speeds.at(-1)]).toEqual([1, 200])
    for (const exact of range.exact) expect(speeds).toContain(exact)
    expect(speeds.length).toBeGreaterThan(1500)
    expect(speeds.length).toBeLessThan(2100)
  })

  it('gathers about a sharp resonance, closer than a tenth of its half-power width', () => {
    const speeds = sweepSpeeds(range, [mode(40, 0.001)], 2000)
    const near = speeds.filter((speed) => Math.abs(speed / 40 - 1) < 0.001)
    expect(near.length).toBeGreaterThan(20)
    expect(near).toContain(40)
  })

  it('passes by the very resonance of a mode without damping', () => {
    expect(sweepSpeeds(range, [mode(40, 0)], 2000)).not.toContain(40)
  })

  it('leaves enough points between resonances, however many there are', () => {
    const many = Array.from({ length: 200 }, (_, k) => mode(2 + k, 0.01))
    const speeds = sweepSpeeds(range, many, 500)
    let widest = 0
    speeds.forEach((speed, i) => {
      if (i > 0) widest = Math.max(widest, speed - (speeds[i - 1] ?? NaN))
    })
    expect(widest).toBeLessThan(3)
  })
})

describe('the sweep of a project', () => {
  it('shows the peak of a resonance as high as it is', () => {
    const { response, modes } = evaluate(withDuty({ runningSpeed: 200 }))
    const heave = modes?.find(({ name }) => name === 'heave')
    const at = 2 * Math.PI * (heave?.frequency ?? NaN)
    const fine = evaluate(
      withDuty({
        runningSpeed: 200,
        furtherSpeeds: Array.from({ length: 401 }, (_, k) => at * (0.9 + 0.0005 * k)),
      }),
    )
    const exact = Math.max(
      ...(fine.response?.atSpeeds ?? []).slice(1).map(({ supportForce }) => supportForce),
    )
    const sweep = response?.sweep
    const shown = Math.max(
      ...(sweep?.supportForce ?? []).filter((_, k) => Math.abs((sweep?.speed[k] ?? 0) / at - 1) < 0.1),
    )
    // spacing of a twentieth of the half-power width at the peak costs a thousandth of its height
    expect(Math.abs(shown / exact - 1)).toBeLessThan(1e-3)
  })
})
