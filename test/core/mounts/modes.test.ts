import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { Mode } from '../../../core/results.ts'
import { CORNERS, sketchProject, type Sketch } from './machine-project.ts'

const GRAVITY = 9.80665

function modes(sketch: Sketch): readonly Mode[] {
  const result = evaluate(sketchProject(sketch)).modes
  if (result === null) throw new Error('no modes')
  return result
}
const named = (list: readonly Mode[], name: string) => list.find((mode) => mode.name === name)

describe('modes of a machine', () => {
  it('are named by their motion and numbered from the lowest', () => {
    const list = modes({ centre: [0, 0, 0], places: CORNERS, type: { stiffness: [1.5e5, 1e5, 3e5] } })
    expect(list.map(({ number }) => number)).toEqual([1, 2, 3, 4, 5, 6])
    expect(list.map(({ frequency }) => frequency)).toEqual(
      list.map(({ frequency }) => frequency).toSorted((a, b) => a - b),
    )
    expect(list.map(({ name }) => name).toSorted()).toEqual([
      'heave',
      'pitch',
      'roll',
      'surge',
      'sway',
      'yaw',
    ])
    // by hand: each freedom alone, omega² = k / m
    const k = {
      surge: 6e5,
      sway: 4e5,
      heave: 12e5,
      roll: 12e5 * 0.16,
      pitch: 12e5 * 0.36,
      yaw: 6e5 * 0.16 + 4e5 * 0.36,
    }
    const m = { surge: 400, sway: 400, heave: 400, roll: 30, pitch: 50, yaw: 60 }
    for (const name of ['surge', 'sway', 'heave', 'roll', 'pitch', 'yaw'] as const) {
      expect(named(list, name)?.frequency).toBeCloseTo(Math.sqrt(k[name] / m[name]) / (2 * Math.PI), 10)
      expect(named(list, name)?.energyShare.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12)
      expect(named(list, name)?.dampingRatio).toBeCloseTo(0.05, 12)
    }
  })

  it('are called coupled where no motion holds more than 60 %', () => {
    const list = modes({
      centre: [0, 0, 0.5],
      places: CORNERS,
      inertia: [164, 150, 160],
      type: { stiffness: [3e5, 3e5, 3e5] },
    })
    expect(list.filter(({ name }) => name === 'coupled').length).toBeGreaterThan(0)
    for (const mode of list)
      expect(mode.name === 'coupled').toBe(!mode.energyShare.some((share) => share > 0.6))
  })

  it('meet each order at a speed', () => {
    const half = {
      kind: 'harmonic' as const,
      id: 'h',
      order: 2,
      load: { kind: 'force' as const, direction: [0, 0, 1] as [number, number, number], amplitude: 1 },
    }
    const list = modes({ places: CORNERS, more: { sources: [half] } })
    expect(list[0]?.crossings).toEqual([
      { order: 2, speed: expect.closeTo((2 * Math.PI * (list[0]?.frequency ?? NaN)) / 2, 10) as number },
    ])
  })

  it('use the dynamic stiffness', () => {
    const [steel, rubber] = [1, 1.44].map((dynamicRatio) =>
      named(modes({ centre: [0, 0, 0], places: CORNERS, type: { dynamicRatio } }), 'heave'),
    )
    expect((rubber?.frequency ?? NaN) / (steel?.frequency ?? NaN)).toBeCloseTo(1.2, 12)
  })
})

describe('gravity stiffness', () => {
  // SOURCE two-plane-symmetric body: H. Himelblau and S. Rubin, in Harris' Shock and Vibration
  // Handbook; the term - W h of the overturning weight added by hand to the rocking stiffness
  it('lowers the rocking pair by the weight times its height above the mounts', () => {
    const [h, m, j] = [0.3, 400, 50]
    const [kx, kz] = [4 * 2e5, 4 * 3e5]
    const pair = (overturning: number) => {
      const rocking = kx * h * h + kz * 0.36 - overturning
      const [a, b, c] = [m * j, -(m * rocking + j * kx), kx * rocking - (kx * h) ** 2]
      return [-1, 1].map(
        (sign) => Math.sqrt((-b + sign * Math.sqrt(b * b - 4 * a * c)) / (2 * a)) / (2 * Math.PI),
      )
    }
    const within = (gravityStiffness: boolean) =>
      modes({ centre: [0, 0, h], places: CORNERS, more: { analysis: { gravityStiffness } } })
        .filter(({ energyShare }) => energyShare[0] + energyShare[4] > 0.99)
        .map(({ frequency }) => frequency)
    within(true).forEach((frequency, i) => {
      expect(frequency).toBeCloseTo(pair(m * GRAVITY * h)[i] ?? NaN, 10)
    })
    within(false).forEach((frequency, i) => {
      expect(frequency).toBeCloseTo(pair(0)[i] ?? NaN, 10)
    })
  })

  it('raises the frequency of a machine that hangs below its mounts', () => {
    const lowest = (gravityStiffness: boolean) =>
      modes({
        centre: [0, 0, -0.8],
        places: CORNERS,
        type: { stiffness: [5e3, 5e3, 3e5] },
        more: { analysis: { gravityStiffness } },
      })
    const roll = (list: readonly Mode[]) =>
      list.find(({ energyShare }) => energyShare[3] > 0.3)?.frequency ?? NaN
    expect(roll(lowest(true))).toBeGreaterThan(roll(lowest(false)))
  })
})

describe('modes with absorbers', () => {
  it('carry the motion of the absorber and are named after it where it holds the energy', () => {
    const absorber = {
      id: 'a',
      host: {
        kind: 'mode' as const,
        mode: 3,
        position: [0, 0, 0] as [number, number, number],
        direction: [0, 0, 1] as [number, number, number],
      },
      size: { by: 'mass' as const, mass: 4 },
      tuning: { by: 'given' as const, frequency: 2 },
    }
    const { modes: bare, modesWithAbsorbers } = evaluate(
      sketchProject({
        centre: [0, 0, 0],
        places: CORNERS,
        type: { stiffness: [1.5e5, 1e5, 3e5] },
        more: { absorbers: [absorber] },
      }),
    )
    expect(bare).toHaveLength(6)
    expect(modesWithAbsorbers).toHaveLength(7)
    const own = modesWithAbsorbers?.find(({ name }) => name === 'absorber')
    // a light soft mass on a heavy machine swings almost as on a fixed base
    expect(own?.frequency).toBeCloseTo(2, 1)
    expect(own?.absorberShape['a']).toBeCloseTo(1 / Math.sqrt(4), 1)
  })
})
