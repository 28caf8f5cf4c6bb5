import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { machineSchema, type MassProperties } from '../../../core/project/machine.ts'
import { summariseMass } from '../../../core/project/mass.ts'

type Typed = Extract<MassProperties, { from: 'typed' }>

function properties(input: unknown): MassProperties {
  return machineSchema.parse({ massProperties: input }).massProperties
}
function typed(inertia: Partial<Typed['inertia']>, mass: number | null = 100): MassProperties {
  return properties({ from: 'typed', mass, inertia: { xx: 10, yy: 10, zz: 10, ...inertia } })
}
const fieldsOf = (given: MassProperties) =>
  summariseMass(given).problems.map(({ field, kind }) => `${kind} ${field}`)

describe('summariseMass, typed', () => {
  it('names every field that is still empty', () => {
    expect(fieldsOf(properties({ from: 'typed' }))).toEqual([
      'missing machine.massProperties.mass',
      'missing machine.massProperties.inertia.xx',
      'missing machine.massProperties.inertia.yy',
      'missing machine.massProperties.inertia.zz',
    ])
  })

  it('carries products of inertia with their minus sign', () => {
    expect(summariseMass(typed({ xy: 1, xz: 2, yz: 3 })).summary?.inertia).toEqual([
      [10, -1, -2],
      [-1, 10, -3],
      [-2, -3, 10],
    ])
  })

  it.each([
    [{ xx: 25 }, 'inertia.xx'],
    [{ yy: 25 }, 'inertia.yy'],
    [{ zz: 25 }, 'inertia.zz'],
    [{ xy: 6 }, 'inertia.xy'],
    [{ xz: -6 }, 'inertia.xz'],
    [{ yz: 6 }, 'inertia.yz'],
    [{ xy: 4.9, xz: 4.9, yz: -4.9 }, 'inertia'],
  ])('refuses inertias that no solid body has: %o', (inertia, field) => {
    const given = typed(inertia)
    expect(fieldsOf(given)).toEqual([`invalid machine.massProperties.${field}`])
    expect(summariseMass(given).summary).toBeNull()
  })

  it('takes a flat plate, whose moments just meet the triangle inequality', () => {
    expect(fieldsOf(typed({ xx: 4, yy: 6, zz: 10 }))).toEqual([])
  })

  it('takes any real cloud of masses, and only needs rounding for a flat one', () => {
    const cloud = fc.array(fc.tuple(...[0, 1, 2].map(() => fc.double({ min: -1, max: 1, noNaN: true }))), {
      minLength: 4,
      maxLength: 9,
    })
    fc.assert(
      fc.property(cloud, (points) => {
        const sum = (part: (p: readonly number[]) => number) =>
          points.reduce((total, p) => total + part(p), 0)
        const product = (i: number, j: number) => sum((p) => (p[i] ?? 0) * (p[j] ?? 0))
        const inertia = {
          xx: product(1, 1) + product(2, 2),
          yy: product(0, 0) + product(2, 2),
          zz: product(0, 0) + product(1, 1),
        }
        fc.pre(Math.min(inertia.xx, inertia.yy, inertia.zz) > 1e-3)
        const problems = fieldsOf(
          typed({ ...inertia, xy: product(0, 1), xz: product(0, 2), yz: product(1, 2) }),
        )
        // four points on one line have no inertia about it, and no machine is like that
        expect(problems.filter((problem) => !problem.endsWith('inertia'))).toEqual([])
      }),
    )
  })
})

describe('summariseMass, parts', () => {
  it('asks for at least one part', () => {
    expect(fieldsOf(properties({ from: 'parts', parts: [] }))).toEqual([
      'missing machine.massProperties.parts',
    ])
  })

  // SOURCE uniform box m (b² + c²) / 12; uniform cylinder m r² / 2 along, m (3 r² + L²) / 12 across:
  // any handbook of mechanics, common practice, no source
  it('knows the box and the cylinder', () => {
    const box = { shape: 'box', id: 'b', mass: 12, centre: [1, 2, 3], size: [1, 2, 3] }
    expect(summariseMass(properties({ from: 'parts', parts: [box] })).summary).toEqual({
      mass: 12,
      centreOfGravity: [1, 2, 3],
      inertia: [
        [13, 0, 0],
        [0, 10, 0],
        [0, 0, 5],
      ],
    })
    const cylinder = {
      shape: 'cylinder',
      id: 'c',
      mass: 12,
      centre: [0, 0, 0],
      axis: 'y',
      diameter: 2,
      length: 3,
    }
    expect(summariseMass(properties({ from: 'parts', parts: [cylinder] })).summary?.inertia).toEqual([
      [12, 0, 0],
      [0, 6, 0],
      [0, 0, 12],
    ])
  })

  it('puts a box together again from its eight eighths', () => {
    const [a, b, c] = [0.8, 1.2, 0.5]
    const parts = [-1, 1].flatMap((x) =>
      [-1, 1].flatMap((y) =>
        [-1, 1].map((z) => ({
          shape: 'box',
          id: `${x}${y}${z}`,
          mass: 5,
          centre: [0.3 + (x * a) / 4, -0.2 + (y * b) / 4, 0.7 + (z * c) / 4],
          size: [a / 2, b / 2, c / 2],
        })),
      ),
    )
    const whole = { shape: 'box', id: 'w', mass: 40, centre: [0.3, -0.2, 0.7], size: [a, b, c] }
    const one = summariseMass(properties({ from: 'parts', parts: [whole] })).summary
    const eight = summariseMass(properties({ from: 'parts', parts })).summary
    expect(eight?.mass).toBe(40)
    eight?.inertia.flat().forEach((value, i) => {
      expect(value).toBeCloseTo(one?.inertia.flat()[i] ?? NaN, 12)
    })
    eight?.centreOfGravity.forEach((value, i) => {
      expect(value).toBeCloseTo(one?.centreOfGravity[i] ?? NaN, 14)
    })
  })

  it('gives two apart masses a product of inertia with the right sign', () => {
    const at = (id: string, centre: number[]) => ({
      shape: 'box',
      id,
      mass: 2,
      centre,
      size: [0.1, 0.1, 0.1],
    })
    const parts = [at('p', [1, 1, 0]), at('q', [-1, -1, 0])]
    const { summary } = summariseMass(properties({ from: 'parts', parts }))
    // integral of x y dm = 2 · 2 · 1 · 1 = 4, so the tensor carries -4
    expect(summary?.inertia[0][1]).toBeCloseTo(-4, 12)
  })
})
