import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { Statics } from '../../../core/statics-results.ts'
import { CORNERS, sketchProject, type Sketch } from './machine-project.ts'

const GRAVITY = 9.80665

function statics(sketch: Sketch): Statics {
  const result = evaluate(sketchProject(sketch)).statics
  if (result === null) throw new Error('no statics')
  return result
}

describe('static loads', () => {
  // SOURCE lever rule: with equal mounts at the corners and the centre of gravity level with them,
  // load = W / 4 (1 ± x / a)(…): for a rectangle and small offsets W (1/4 ± x/(4a) ± y/(4b))
  it('follow the lever rule under an off-centre weight', () => {
    const { mounts, weight } = statics({ centre: [0.12, -0.1, 0], places: CORNERS })
    const share = (x: number, y: number) => (weight / 4) * (1 + (x * 0.12) / 0.6 + (y * -0.1) / 0.4)
    const expected = [share(1, 1), share(1, -1), share(-1, 1), share(-1, -1)]
    mounts.forEach(({ load }, i) => {
      expect(load).toBeCloseTo(expected[i] ?? NaN, 8)
    })
  })

  it('add up to the weight, with the gravity of the project', () => {
    const { loadSum, weight, loadSumError } = statics({
      centre: [0.12, -0.1, 0.4],
      places: CORNERS,
      more: { analysis: { gravity: 1.62 } },
    })
    expect(weight).toBeCloseTo(400 * 1.62, 12)
    expect(loadSum).toBeCloseTo(weight, 9)
    expect(loadSumError).toBeLessThan(1e-12)
  })

  it('are shares of the rating and of the limit where there are such, and null elsewhere', () => {
    const rated = statics({
      centre: [0, 0, 0],
      places: CORNERS,
      type: { ratedLoad: 2000, deflectionLimit: 0.01 },
    })
    const load = 100 * GRAVITY
    expect(rated.mounts[0]?.ratedShare).toBeCloseTo(load / 2000, 12)
    expect(rated.mounts[0]?.limitShare).toBeCloseTo(load / 3e5 / 0.01, 12)
    const plain = statics({ places: CORNERS })
    expect([plain.mounts[0]?.ratedShare, plain.mounts[0]?.limitShare]).toEqual([null, null])
  })

  it('rest on the static stiffness, not on the dynamic one', () => {
    const steel = statics({ places: CORNERS })
    const rubber = statics({ places: CORNERS, type: { dynamicRatio: 2 } })
    expect(rubber.mounts[0]?.deflection).toBe(steel.mounts[0]?.deflection)
  })

  it('compress a tilted mount along its own axis', () => {
    const angle = Math.PI / 6
    const tilt = (sign: number) => ({
      tilt: { axis: [1, 0, 0] as [number, number, number], angle: sign * angle },
    })
    const { mounts, weight } = statics({
      centre: [0, 0, 0],
      places: CORNERS,
      type: { stiffness: [1e5, 1e5, 3e5] },
      mounts: { 0: tilt(1), 1: tilt(-1), 2: tilt(1), 3: tilt(-1) },
    })
    // by hand: k_z = 3e5 cos² + 1e5 sin² = 2.5e5; sink W / (4 k_z); its part along the axis cos 30°
    const sink = weight / 4 / 2.5e5
    expect(mounts[0]?.displacement[2]).toBeCloseTo(-sink, 12)
    expect(mounts[0]?.deflection).toBeCloseTo(sink * Math.cos(angle), 12)
  })

  it('tilt the machine towards the heavy side', () => {
    const { tilt } = statics({ centre: [0, 0.1, 0], places: CORNERS })
    // heavy at +y: the +y side sinks, a rotation about x of negative sign
    expect(tilt[0]).toBeLessThan(0)
    expect(Math.abs(tilt[1])).toBeLessThan(1e-15)
  })
})

describe('elastic centre', () => {
  it('stands in the middle of equal mounts, at their height', () => {
    const { elasticCentre } = statics({ centre: [0.1, 0.05, 0.3], places: CORNERS })
    ;[0, 0, 0].forEach((value, i) => {
      expect(elasticCentre?.[i]).toBeCloseTo(value, 12)
    })
  })

  it('moves towards the stiffer mounts, where a weight sinks the machine without tilting it', () => {
    const places = CORNERS.map(([x, y]): [number, number, number] => [x, y, 0])
    const stiffer = {
      more: {
        mounting: {
          types: [
            { id: 'soft', stiffness: [1e5, 1e5, 2e5] as [number, number, number] },
            { id: 'stiff', stiffness: [1e5, 1e5, 6e5] as [number, number, number] },
          ],
          placed: places.map((position, i) => ({ id: `m${i}`, type: i < 2 ? 'stiff' : 'soft', position })),
        },
      },
    }
    const { elasticCentre } = statics({ places, ...stiffer })
    // by hand: (6e5 · 0.6 - 2e5 · 0.6) / 8e5 = 0.3
    expect(elasticCentre?.[0]).toBeCloseTo(0.3, 12)
    const above = statics({ places, centre: [0.3, 0, 0], ...stiffer })
    expect(Math.abs(above.tilt[0])).toBeLessThan(1e-15)
    expect(Math.abs(above.tilt[1])).toBeLessThan(1e-15)
  })
})

describe('absorbers', () => {
  it('hang their weight on the mounts', () => {
    const absorber = {
      id: 'a',
      host: {
        kind: 'mode' as const,
        mode: 3,
        position: [0.6, 0.4, 0.2] as [number, number, number],
        direction: [0, 0, 1] as [number, number, number],
      },
      size: { by: 'mass' as const, mass: 12 },
      tuning: { by: 'given' as const, frequency: 6 },
    }
    const alone = statics({ places: CORNERS })
    const together = statics({ places: CORNERS, more: { absorbers: [absorber] } })
    expect(alone.absorberWeight).toBe(0)
    expect(together.absorberWeight).toBeCloseTo(12 * GRAVITY, 12)
    expect(together.weight).toBeCloseTo(412 * GRAVITY, 9)
    expect(together.loadSum).toBeCloseTo(together.weight, 9)
    // by the lever rule a weight above a corner rests on it with (1 + 1 + 1) / 4 of itself
    expect(together.mounts[0]?.load).toBeCloseTo((alone.mounts[0]?.load ?? NaN) + 9 * GRAVITY, 9)
  })
})
