import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { InputError } from '../../../core/errors.ts'
import type { Evaluation } from '../../../core/results.ts'
import type { Statics } from '../../../core/statics-results.ts'
import { CORNERS, sketchProject, type Sketch } from './machine-project.ts'

function evaluated(sketch: Sketch): Evaluation {
  return evaluate(sketchProject(sketch), { sweepPoints: 100 })
}
function statics(sketch: Sketch): Statics {
  const result = evaluated(sketch).statics
  if (result === null) throw new Error('no statics')
  return result
}
const fields = ({ problems }: Evaluation) => problems.map(({ kind, field }) => [kind, field])

/** Rising points whose slopes differ by up to ten times from one to the next. */
const points = fc
  .array(
    fc.tuple(fc.double({ min: 0.5, max: 3, noNaN: true }), fc.double({ min: 0.1, max: 1, noNaN: true })),
    { minLength: 1, maxLength: 6 },
  )
  .map((steps) => {
    let [x, load] = [0, 0]
    return steps.map(([dx, dy]): [number, number] => [(x += dx * 1e-3), (load += dy * 1000)])
  })
const place = fc.tuple(
  fc.double({ min: -0.5, max: 0.5, noNaN: true }),
  fc.double({ min: -0.35, max: 0.35, noNaN: true }),
  fc.double({ min: -0.2, max: 0.5, noNaN: true }),
)
const curve = (given: [number, number][]) => ({ law: { kind: 'curve' as const, points: given } })

describe('a machine on curved mounts', () => {
  it('rests in balance wherever its weight is and however its mounts curve', () => {
    fc.assert(
      fc.property(points, place, fc.double({ min: 50, max: 2000, noNaN: true }), (given, centre, mass) => {
        const state = statics({ mass, centre, places: CORNERS, type: curve(given) })
        expect(state.loadSumError).toBeLessThan(1e-9)
        const [x, y] = [0, 1].map((axis) =>
          state.mounts.reduce(
            (sum, { load }, i) => sum + load * ((CORNERS[i]?.[axis] ?? 0) - (centre[axis] ?? 0)),
            0,
          ),
        )
        // moments of the loads about the centre of gravity, with the lateral forces' part zero: nothing
        // pulls sideways, but where the machine tilts its mounts shear, at their depth below the centre
        const shear = [0, 1].map((axis) =>
          state.mounts.reduce((sum, { force }) => sum + (force[axis] ?? 0), 0),
        )
        expect(Math.abs(shear[0] ?? 1)).toBeLessThan(1e-8 * state.weight)
        expect(Math.abs(x ?? 1)).toBeLessThan(1e-8 * state.weight)
        expect(Math.abs(y ?? 1)).toBeLessThan(1e-8 * state.weight)
      }),
    )
  })

  it('is the linear machine where the points lie on a line', () => {
    const stiffness = 3e5
    const straight = [0.001, 0.002, 0.005].map((x): [number, number] => [x, stiffness * x])
    const sketch = { centre: [0.1, -0.05, 0.3] as [number, number, number], places: CORNERS }
    const [line, plain] = [evaluated({ ...sketch, type: curve(straight) }), evaluated(sketch)]
    // 1e-9: one goes by Newton's steps, the other by one solution
    plain.statics?.mounts.forEach(({ load, deflection }, i) => {
      expect((line.statics?.mounts[i]?.load ?? 0) / load).toBeCloseTo(1, 9)
      expect((line.statics?.mounts[i]?.deflection ?? 0) / deflection).toBeCloseTo(1, 9)
    })
    plain.modes?.forEach(({ frequency }, r) => {
      expect((line.modes?.[r]?.frequency ?? 0) / frequency).toBeCloseTo(1, 9)
    })
  })

  it('vibrates on the tangent at its load, times the dynamic ratio', () => {
    // one point beyond the rest: parabola-like, W/4 = 980.665 N between the last two
    const given: [number, number][] = [
      [0.002, 300],
      [0.004, 900],
      [0.006, 1800],
    ]
    const centre: [number, number, number] = [0, 0, 0]
    const result = evaluated({ centre, places: CORNERS, type: { ...curve(given), dynamicRatio: 1.5 } })
    const mount = result.statics?.mounts[0]
    const heave = result.modes?.find(({ name }) => name === 'heave')?.frequency ?? 0
    // one freedom: 4 k / m
    expect(heave).toBeCloseTo(Math.sqrt((4 * 1.5 * (mount?.staticStiffness ?? 0)) / 400) / (2 * Math.PI), 8)
    expect(mount?.dynamicStiffness[2]).toBeCloseTo(1.5 * (mount?.staticStiffness ?? 0), 6)
    // the mean stiffness to the rest position would give another frequency altogether
    expect(mount?.frequencyOnLoad).toBeCloseTo(heave, 8)
    expect((mount?.frequencyByDeflection ?? 0) / heave).toBeLessThan(0.75)
  })

  it('is told where its mounts stand beyond their points', () => {
    const beyond = evaluated({ mass: 4000, places: CORNERS, type: curve([[0.002, 300]]) })
    expect(fields(beyond)).toContainEqual(['caution', 'mounting.placed[0].type'])
    expect(beyond.statics?.mounts[0]?.beyondLaw).toBe(true)
  })

  it.each([
    [
      'falling loads',
      [
        [0.001, 100],
        [0.002, 90],
      ],
    ],
    [
      'a deflection twice',
      [
        [0.001, 100],
        [0.001, 200],
      ],
    ],
    ['a single point at no load', [[0.001, 0]]],
    ['no point', []],
  ])('is refused with %s', (_, given) => {
    expect(
      () => sketchProject({ places: CORNERS, type: curve(given as [number, number][]) }), // a bad curve on purpose
    ).toThrow(InputError)
  })
})

describe('packing', () => {
  it('raises the machine and nothing else where it is the same under all mounts', () => {
    const all = { shim: 0.002 }
    const plain = statics({ places: CORNERS })
    const packed = statics({ places: CORNERS, mounts: { 0: all, 1: all, 2: all, 3: all } })
    packed.mounts.forEach(({ load }, i) => {
      expect(load / (plain.mounts[i]?.load ?? 0)).toBeCloseTo(1, 9)
    })
    expect(packed.bodyDisplacement[2] - plain.bodyDisplacement[2]).toBeCloseTo(0.002, 12)
  })

  it('takes load from the neighbours of a mount that stands higher', () => {
    const packed = statics({ places: CORNERS, mounts: { 0: { shim: 0.001 } } })
    const [first, ...others] = packed.mounts.map(({ load }) => load)
    // a rectangle twists: the packed corner and the one across it gain what the other two lose
    expect(first).toBeGreaterThan(400 * 9.80665 * 0.25)
    expect(others[0]).toBeLessThan(400 * 9.80665 * 0.25)
    expect(others[2]).toBeCloseTo(first ?? 0, 6)
  })
})

describe('levelling', () => {
  const levelled = (
    by: 'equalLoads' | 'ratedLoads' | 'equalDeflections' | 'givenShares',
    sketch: Sketch,
  ) => ({
    ...sketch,
    setting: { kind: 'levelled' as const, by },
  })
  function run({ setting, ...sketch }: ReturnType<typeof levelled>): Evaluation {
    const project = sketchProject(sketch)
    return evaluate({ ...project, mounting: { ...project.mounting, setting } }, { sweepPoints: 100 })
  }

  it('leaves no tilt, and the packing that it finds gives the same rest as built', () => {
    fc.assert(
      fc.property(points, place, (given, centre) => {
        const sketch = { centre, places: CORNERS, type: curve(given) }
        const level = run(levelled('equalLoads', sketch)).statics
        expect(level?.tilt).toEqual([0, 0])
        expect(Math.min(...(level?.mounts.map(({ shim }) => shim) ?? [-1]))).toBe(0)
        expect(level?.loadSumError).toBeLessThan(1e-9)
        const mounts = Object.fromEntries(level?.mounts.map(({ shim }, i) => [i, { shim }]) ?? [])
        // packing of more than a metre is no packing; steep curves ask for it at times
        if (level?.mounts.some(({ shim }) => shim > 1)) return
        const built = statics({ ...sketch, mounts })
        built.mounts.forEach(({ load }, i) => {
          // 1e-7: a soft mount turns a rounding of its packing into load
          expect(Math.abs(load - (level?.mounts[i]?.load ?? 0))).toBeLessThan(1e-7 * built.weight)
        })
        expect(Math.hypot(...built.tilt)).toBeLessThan(1e-8)
      }),
    )
  })

  it('gives every mount the same load where the weight is in their middle', () => {
    const { statics: level } = run(
      levelled('equalLoads', { places: CORNERS, mounts: { 1: { shim: 0.003 } } }),
    )
    for (const { load, wishedLoad } of level?.mounts ?? []) {
      expect(load).toBeCloseTo(100 * 9.80665, 8)
      expect(wishedLoad).toBeCloseTo(100 * 9.80665, 8)
    }
  })

  it('shares by rating, by equal deflection and as asked', () => {
    const project = sketchProject({ places: CORNERS, type: { ratedLoad: 2000 } })
    const [type] = project.mounting.types
    if (!type) throw new Error('no type')
    // a second type, twice as stiff and twice as strong, under both mounts of one diagonal: balance holds
    const strong = {
      ...type,
      id: 'strong',
      ratedLoad: 4000,
      stiffness: [2e5, 2e5, 6e5] as [number, number, number],
    }
    const placed = project.mounting.placed.map((mount, i) =>
      i === 0 || i === 3 ? { ...mount, type: 'strong' } : mount,
    )
    const loads = (by: 'ratedLoads' | 'equalDeflections' | 'givenShares', shares: (number | null)[] = []) =>
      evaluate({
        ...project,
        mounting: {
          types: [type, strong],
          placed: placed.map((mount, i) => ({ ...mount, share: shares[i] ?? null })),
          setting: { kind: 'levelled', by },
        },
      }).statics?.mounts.map(({ load }) => load / (400 * 9.80665)) ?? []
    const thirds = [1 / 3, 1 / 6, 1 / 6, 1 / 3]
    const close = (found: number[], expected: number[]) => {
      expected.forEach((share, i) => {
        expect(found[i]).toBeCloseTo(share, 9)
      })
    }
    close(loads('ratedLoads'), thirds)
    close(loads('equalDeflections'), thirds)
    close(loads('givenShares', [0.4, null, null, 0.4]), [0.4, 0.1, 0.1, 0.4])
  })

  it('says what it lacks', () => {
    const unrated = run(levelled('ratedLoads', { places: CORNERS }))
    expect(fields(unrated)).toContainEqual(['missing', 'mounting.setting.by'])
    expect(unrated.statics).toBeNull()
    const full = run(
      levelled('givenShares', { places: CORNERS, mounts: { 0: { share: 0.7 }, 1: { share: 0.3 } } }),
    )
    expect(fields(full)).toContainEqual(['invalid', 'mounting.setting.by'])
    const line: [number, number, number][] = [
      [-0.5, 0, 0],
      [0.5, 0, 0],
      [0, 0, 0.4],
    ]
    const inLine = run(levelled('equalLoads', { places: line }))
    expect(fields(inLine)).toContainEqual(['invalid', 'mounting.setting'])
  })
})
