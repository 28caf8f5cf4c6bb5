import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { LateralCase, LateralStatics } from '../../../core/statics-results.ts'
import { CORNERS, sketchProject, type Sketch } from './machine-project.ts'

const WEIGHT = 400 * 9.80665
type Vec = [number, number, number]

function shoved(sketch: Omit<Sketch, 'more'>, factor: number, direction: Vec, gravityStiffness = false) {
  return evaluate(
    sketchProject({
      ...sketch,
      more: { analysis: { gravityStiffness, lateralLoad: { factor, direction } } },
    }),
    { sweepPoints: 100 },
  )
}
function lateral(...given: Parameters<typeof shoved>): LateralStatics {
  const found = shoved(...given).statics?.lateral
  if (!found) throw new Error('no lateral statics')
  return found
}
function along(...given: Parameters<typeof shoved>): LateralCase {
  const [found] = lateral(...given).cases
  if (!found) throw new Error('it does not stand')
  return found
}

describe('a lateral load', () => {
  // four mounts (2e5, 2e5, 3e5 N/m) at (±0.6, ±0.4), the centre of gravity 0.3 m above them
  const HEIGHT = 0.3
  const ROCKING = 4 * 3e5 * 0.6 ** 2 // of the vertical springs about y

  it('sways and rocks the machine as springs and lever arms say', () => {
    const force = 0.3 * WEIGHT
    const result = along({ places: CORNERS }, 0.3, [1, 0, 0])
    // by hand: the mounts shear under F, the machine turns under F h
    const angle = (force * HEIGHT) / ROCKING
    const shear = force / (4 * 2e5)
    result.mounts.forEach(({ load, sway, uplift }, i) => {
      const x = CORNERS[i]?.[0] ?? 0
      // 1e-9: small rotations on both sides
      expect(load / (WEIGHT / 4 + 3e5 * angle * x)).toBeCloseTo(1, 9)
      expect(sway).toBeCloseTo(shear, 12)
      expect(uplift).toBe(0)
    })
    expect(result.bodyDisplacement[0]).toBeCloseTo(shear + HEIGHT * angle, 12)
  })

  it('leans further where the overturning of the weight counts', () => {
    const force = 0.3 * WEIGHT
    const result = along({ places: CORNERS }, 0.3, [1, 0, 0], true)
    // each mount's W/4 at depth h below the centre takes W h from the stiffness against rocking
    const angle = (force * HEIGHT) / (ROCKING - WEIGHT * HEIGHT)
    expect(result.bodyDisplacement[4] / angle).toBeCloseTo(1, 9)
  })

  it('lifts mounts when it is large enough, and says so', () => {
    // a mount is lifted when F h x / (4 x²) exceeds W / 4: at F = W x / h = 2 W
    expect(along({ places: CORNERS }, 1.99, [1, 0, 0]).largestUplift).toBe(0)
    const lifted = shoved({ places: CORNERS }, 2.01, [1, 0, 0])
    expect(lifted.statics?.lateral?.cases[0]?.largestUplift).toBeGreaterThan(0)
    expect(lifted.problems.some(({ message }) => message.includes('lifts M'))).toBe(true)
  })

  it('is computed both ways, which a symmetrical machine bears alike', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 2 * Math.PI, noNaN: true }), (angle) => {
        const { cases } = lateral({ places: CORNERS }, 0.4, [Math.cos(angle), Math.sin(angle), 0])
        expect((cases[0]?.largestLoad ?? 0) / (cases[1]?.largestLoad ?? 1)).toBeCloseTo(1, 9)
        expect(cases[0]?.direction[0]).toBeCloseTo(-(cases[1]?.direction[0] ?? 0), 12)
      }),
    )
  })

  it('is borne by the mounts together, weight and all', () => {
    const direction = fc.tuple(
      fc.double({ min: -1, max: 1, noNaN: true }),
      fc.double({ min: -1, max: 1, noNaN: true }),
      fc.double({ min: 0.1, max: 1, noNaN: true }),
    )
    const curve = {
      law: {
        kind: 'curve' as const,
        points: [
          [0.002, 400],
          [0.004, 1500],
        ] as [number, number][],
      },
    }
    fc.assert(
      fc.property(direction, fc.boolean(), (given, curved) => {
        const sketch = { places: CORNERS, ...(curved ? { type: curve } : {}) }
        const result = along(sketch, 0.5, given)
        const length = Math.hypot(...given)
        for (const axis of [0, 1, 2] as const) {
          const sum = result.mounts.reduce((total, { force }) => total + force[axis], 0)
          const wanted = -(0.5 * WEIGHT * given[axis]) / length + (axis === 2 ? WEIGHT : 0)
          expect(Math.abs(sum - wanted)).toBeLessThan(1e-9 * WEIGHT)
        }
      }),
    )
  })

  it('is compared with the gap of the snubbers and the rating', () => {
    const force = 0.3 * WEIGHT
    const shear = force / (4 * 2e5)
    const close = shoved(
      { places: CORNERS, type: { snubberGap: shear / 1.25, ratedLoad: WEIGHT / 4 } },
      0.3,
      [1, 0, 0],
    )
    expect(close.statics?.lateral?.cases[0]?.largestGapShare).toBeCloseTo(1.25, 9)
    expect(close.problems.some(({ message }) => message.includes('closes the gap'))).toBe(true)
    expect(close.problems.some(({ message }) => message.includes('beyond its rated load'))).toBe(true)
    const wide = shoved({ places: CORNERS, type: { snubberGap: 2 * shear } }, 0.3, [1, 0, 0])
    expect(wide.problems.some(({ message }) => message.includes('closes the gap'))).toBe(false)
  })

  it('always carries the caution that restraint belongs to the code and a licensed engineer', () => {
    const result = shoved({ places: CORNERS }, 0.1, [0, 1, 0])
    expect(result.statics?.lateral?.caution).toContain('licensed engineer')
    expect(result.problems.find(({ field }) => field === 'analysis.lateralLoad')?.message).toContain(
      'local code',
    )
  })

  it('is not computed where nobody asks', () => {
    expect(evaluate(sketchProject({ places: CORNERS }), { sweepPoints: 100 }).statics?.lateral).toBeNull()
  })
})
