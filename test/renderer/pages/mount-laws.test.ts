import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { componentDesignSchema } from '../../../core/project/component-designs.ts'
import type { MountType } from '../../../core/project/mounts.ts'
import type { Project } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import type { LateralCase } from '../../../core/statics-results.ts'
import { writeBlock } from '../../../renderer/components/table-columns.ts'
import {
  addPoint,
  curveColumns,
  curveRows,
  curveSeries,
  pointsOf,
  workingMarks,
} from '../../../renderer/pages/mounts/curve-points.ts'
import { findDesigns } from '../../../renderer/pages/mounts/design-search.ts'
import { lateralRows } from '../../../renderer/pages/mounts/lateral-rows.ts'
import { chooseLaw, lawOf, loadOf } from '../../../renderer/pages/mounts/law-edits.ts'
import { keepPacking, largestMiss } from '../../../renderer/pages/mounts/level-edits.ts'
import { CORNERS, sketchProject } from '../../core/mounts/machine-project.ts'

const GRAVITY = 9.80665
const CONDITIONS = { gravity: GRAVITY, temperature: null }
const WEIGHT = 400 * GRAVITY

const level = () => sketchProject({ places: CORNERS })
/** The centre of gravity 0.1 m off the middle of mounts 1.2 m apart. */
const leaning = () => sketchProject({ places: CORNERS, centre: [0.1, 0, 0.3] })

function typeOf(project: Project): MountType {
  const type = project.mounting.types[0]
  if (!type) throw new Error('one type was given')
  return type
}

/** Statics of a project that stands. */
function staticsOf(project: Project) {
  const { statics } = evaluate(project, { sweepPoints: 10 })
  if (statics === null) throw new Error('it stands')
  return statics
}

describe('how a mount type is described', () => {
  it('begins a curve with the stiffness, so that the machine stands as before', () => {
    const project = level()
    const before = staticsOf(project)
    chooseLaw(typeOf(project), 'curve', CONDITIONS, WEIGHT / 4)
    expect(lawOf(typeOf(project))).toBe('curve')
    const after = staticsOf(readProject(project))
    // points are rounded to four digits
    after.mounts.forEach(({ deflection }, index) =>
      expect(deflection / (before.mounts[index]?.deflection ?? 0) - 1).toBeCloseTo(0, 3),
    )
  })

  it('takes what a design came to as stiffness, to four digits', () => {
    const type = typeOf(level())
    chooseLaw(type, 'design', CONDITIONS, 1000)
    expect(lawOf(type)).toBe('design')
    expect(type.design?.load).toBe(1000)
    type.design = componentDesignSchema.parse({
      component: 'helicalSpring',
      load: 1000,
      wireDiameter: 0.008,
      coilDiameter: 0.06,
      activeCoils: 6,
      freeLength: 0.12,
    })
    chooseLaw(type, 'linear', CONDITIONS, null)
    expect(type.design).toBeNull()
    // SOURCE R = G d⁴ / (8 D³ n), A. M. Wahl, Mechanical Springs, by hand
    const rate = (79.3e9 * 0.008 ** 4) / (8 * 0.06 ** 3 * 6)
    expect(type.stiffness[2] / rate - 1).toBeCloseTo(0, 3)
    expect(String(type.stiffness[2]).replace(/0+$/, '').length).toBeLessThanOrEqual(4)
  })

  it('keeps the stiffness while a design cannot carry anything yet', () => {
    const type = typeOf(level())
    const stiffness = [...type.stiffness]
    chooseLaw(type, 'design', CONDITIONS, null)
    chooseLaw(type, 'linear', CONDITIONS, null)
    expect(type.stiffness).toEqual(stiffness)
  })
})

describe('the load for which a type is designed', () => {
  it('is the largest on its mounts', () => {
    const project = leaning()
    const evaluation = evaluate(project, { sweepPoints: 10 })
    // SOURCE equilibrium by hand: two mounts at 0.6 m carry half the weight times (1 + 0.1 / 0.6)
    const largest = (WEIGHT / 4) * (1 + 0.1 / 0.6)
    const found = loadOf(project, evaluation, 'spring')
    expect(found?.from).toBe('rest')
    // the drift of the tilted machine moves the loads by less than this
    expect((found?.load ?? 0) / largest - 1).toBeCloseTo(0, 2)
  })

  it('is an even share while nothing stands, and not known without a mass', () => {
    const project = level()
    typeOf(project).design = componentDesignSchema.parse({ component: 'helicalSpring' })
    const evaluation = evaluate(project, { sweepPoints: 10 })
    expect(evaluation.statics).toBeNull()
    expect(loadOf(project, evaluation, 'spring')).toEqual({ load: WEIGHT / 4, from: 'even' })
    expect(loadOf(project, null, 'spring')).toBeNull()
  })
})

describe('points of a curve', () => {
  const curved = () => {
    const project = level()
    chooseLaw(typeOf(project), 'curve', CONDITIONS, WEIGHT / 4)
    return project
  }

  it('are pasted as two columns from a spreadsheet, in the units of the project', () => {
    const project = curved()
    const rows = curveRows(pointsOf(project, 0) ?? [])
    const cells = [
      ['0.1', '50'],
      ['0.2', '120'],
      ['0.3', '260'],
    ]
    const refused = writeBlock(project, rows, curveColumns(0), cells, { row: 0, column: 0 }, 'US', (draft) =>
      addPoint(draft, 0),
    )
    expect(refused).toEqual([])
    const points = pointsOf(readProject(project), 0) ?? []
    expect(points).toHaveLength(3)
    // SOURCE the inch is 25.4 mm exactly, the pound-force 4.4482216152605 N (NIST SP 811)
    expect(points[2]?.[0]).toBeCloseTo(0.3 * 0.0254, 12)
    expect(points[2]?.[1]).toBeCloseTo(260 * 4.4482216152605, 9)
  })

  it('go on straight when one is added', () => {
    const project = curved()
    const [first, second] = pointsOf(project, 0) ?? []
    addPoint(project, 0)
    const third = pointsOf(project, 0)?.[2]
    expect(third?.[0]).toBeCloseTo(2 * (second?.[0] ?? 0) - (first?.[0] ?? 0), 12)
    expect(() => readProject(project)).not.toThrow()
  })

  it('are drawn with the curve through them, as far as the mounts stand', () => {
    const project = curved()
    const points = pointsOf(project, 0) ?? []
    const { mounts } = staticsOf(readProject(project))
    const far = mounts.map((mount, index) => ({
      ...mount,
      deflection: index === 3 ? 0.05 : mount.deflection,
    }))
    const [curve, given] = curveSeries(points, far)
    expect(curve?.x.at(-1)).toBe(0.05)
    expect(given?.y.at(-1)).toBe(points.at(-1)?.[1])
    const names = new Map(mounts.map(({ id }) => [id, id.toUpperCase()]))
    expect(workingMarks(points, far, names).map(({ label }) => label)).toEqual(['M1, M2, M3', 'M4'])
  })
})

describe('a design for a wanted rate', () => {
  const spring = componentDesignSchema.parse({
    component: 'helicalSpring',
    load: 1000,
    material: { strength: 1400e6 },
  })

  it('offers springs of that rate in wires of half a millimetre', () => {
    const { choices, reason } = findDesigns(spring, { value: 5e4, pressure: null }, GRAVITY, 'SI')
    expect(reason).toBe('')
    expect(choices.length).toBeGreaterThan(0)
    for (const { design, text } of choices) {
      if (design.component !== 'helicalSpring') throw new Error('a spring was asked for')
      const { wireDiameter: d, coilDiameter: D, activeCoils: n } = design
      // SOURCE R = G d⁴ / (8 D³ n), A. M. Wahl, Mechanical Springs, by hand; sizes hold six digits
      expect((79.3e9 * (d ?? 0) ** 4) / (8 * (D ?? 0) ** 3 * (n ?? 0)) / 5e4).toBeCloseTo(1, 5)
      expect(((d ?? 0) * 2000) % 1).toBeCloseTo(0, 9)
      expect(text).toMatch(/^wire [\d.]+ mm, coil/)
    }
  })

  it('says in words what it lacks', () => {
    const nameless = componentDesignSchema.parse({ component: 'helicalSpring', load: 1000 })
    const idle = componentDesignSchema.parse({ component: 'rubberPad' })
    const wish = { value: 5e4, pressure: null }
    expect(findDesigns(nameless, wish, GRAVITY, 'SI').reason).toBe('Give the tensile strength of the wire.')
    expect(findDesigns(idle, wish, GRAVITY, 'SI').reason).toBe(
      'Give the load for which it is designed first.',
    )
  })

  it('fills an air spring for a frequency at a pressure', () => {
    const air = componentDesignSchema.parse({ component: 'airSpring', load: 3000, lateralStiffness: 4e4 })
    const { choices } = findDesigns(air, { value: 2, pressure: 5e5 }, GRAVITY, 'SI')
    const design = choices[0]?.design
    if (design?.component !== 'airSpring') throw new Error('an air spring was asked for')
    expect(design.effectiveArea).toBeCloseTo(3000 / 5e5, 12)
    // SOURCE k = n p A² / V for a constant area (C. M. Harris, Shock and Vibration Handbook), by hand
    const stiffness = (1.4 * (101325 + 5e5) * (3000 / 5e5) ** 2) / (design.bellowsVolume ?? 0)
    expect(Math.sqrt((stiffness * GRAVITY) / 3000) / (2 * Math.PI)).toBeCloseTo(2, 9)
  })
})

describe('levelling', () => {
  it('says how far loads stay off what is aimed at, and its packing can be kept', () => {
    const project = leaning()
    project.mounting.setting = { kind: 'levelled', by: 'equalLoads' }
    const statics = staticsOf(project)
    // SOURCE equilibrium by hand: the loads cannot be equal, they differ by 0.1 / 0.6
    expect(largestMiss(statics)).toBeCloseTo(0.1 / 0.6, 9)
    keepPacking(project, statics)
    expect(project.mounting.setting.kind).toBe('asBuilt')
    const kept = staticsOf(readProject(project))
    expect(largestMiss(kept)).toBeNull()
    // as level on the kept packing as the solution of the equations is exact [rad]
    expect(Math.hypot(...kept.tilt)).toBeLessThan(1e-10)
  })
})

describe('the load sideways', () => {
  const mount = (load: number, uplift: number, sway: number, gapShare: number | null) => ({
    id: 'm1',
    load,
    force: [0, 0, load] as const,
    uplift,
    sway,
    gapShare,
    ratedShare: null,
  })
  const one = (mounts: ReturnType<typeof mount>[]): LateralCase => ({
    direction: [0, 1, 0],
    bodyDisplacement: [0, 0, 0, 0, 0, 0],
    mounts: mounts.map((each) => ({ ...each, force: [...each.force] })),
    largestLoad: 0,
    largestUplift: 0,
    largestSway: 0,
    largestGapShare: null,
  })
  const both = { factor: 0.3, load: 1, caution: '' }

  it('shows the worse of along and against for every mount', () => {
    const cases = [one([mount(-50, 50, 0.002, 0.4)]), one([mount(300, 0, 0.003, 0.6)])] as const
    expect(lateralRows({ ...both, cases })).toEqual([
      { id: 'm1', load: 300, uplift: 50, sway: 0.003, gapShare: 0.6, ratedShare: null },
    ])
  })

  it('shows nothing where the machine would tip over', () => {
    expect(lateralRows({ ...both, cases: [one([mount(1, 0, 0, null)]), null] })).toEqual([])
  })
})
