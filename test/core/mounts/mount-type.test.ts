import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { emptyTravel } from '../../../core/components/gas-column.ts'
import { evaluate } from '../../../core/evaluate.ts'
import { gasLaw } from '../../../core/mounts/axial-law.ts'
import { effectiveMountType, withStiffnessTimes } from '../../../core/mounts/mount-type.ts'
import type { MountType } from '../../../core/project/mounts.ts'
import type { Evaluation } from '../../../core/results.ts'
import { CORNERS, sketchProject, type Sketch } from './machine-project.ts'

type TypeInput = NonNullable<Sketch['type']>
const CONDITIONS = { gravity: 9.80665, temperature: null }
const SPRING: TypeInput = {
  design: {
    component: 'helicalSpring',
    wireDiameter: 0.01,
    coilDiameter: 0.08,
    activeCoils: 5,
    freeLength: 0.16,
    load: 980,
    material: { strength: 1400e6 },
  },
}
const PAD: TypeInput = {
  design: {
    component: 'rubberPad',
    shape: { kind: 'disc', diameter: 0.06 },
    thickness: 0.02,
    rubber: { from: 'hardness', hardness: 50 },
    load: 980,
  },
}
const AIR: TypeInput = {
  design: {
    component: 'airSpring',
    load: 980.665,
    effectiveArea: 0.0025,
    bellowsVolume: 0.0004,
    lateralStiffness: 3e4,
  },
}
const CURVE: TypeInput = {
  law: {
    kind: 'curve',
    points: [
      [0.002, 400],
      ['4 mm', '1.5 kN'],
    ],
  },
}

function typeOf(type: TypeInput): MountType {
  const [found] = sketchProject({ places: CORNERS, type }).mounting.types
  if (!found) throw new Error('no type')
  return found
}
function evaluated(type: TypeInput, more: Sketch['more'] = {}): Evaluation {
  return evaluate(sketchProject({ centre: [0, 0, 0], places: CORNERS, type, more }), { sweepPoints: 100 })
}
const heave = (result: Evaluation) => result.modes?.find(({ name }) => name === 'heave')?.frequency ?? NaN
const fields = ({ problems }: Evaluation) => problems.map(({ kind, field }) => [kind, field])

describe('a mount type', () => {
  it('comes back as it is where it has neither design nor curve', () => {
    const type = typeOf({ dynamicRatio: 1.3 })
    const effective = effectiveMountType(type, CONDITIONS)
    expect(effective.type).toBe(type)
    expect(effective.dynamicStiffness).toEqual([2e5 * 1.3, 2e5 * 1.3, 3e5 * 1.3])
  })

  it('takes stiffness, limits and height from its design', () => {
    const { type } = effectiveMountType(typeOf(SPRING), CONDITIONS)
    // G d⁴ / (8 D³ n) with the default modulus
    expect(type.stiffness[2] / ((79.3e9 * 0.01 ** 4) / (8 * 0.08 ** 3 * 5))).toBeCloseTo(1, 12)
    expect(type.ratedLoad).toBeGreaterThan(980)
    expect(type.deflectionLimit).toBeCloseTo((type.ratedLoad ?? 0) / type.stiffness[2], 12)
    expect(type.height).toBeCloseTo(0.16, 12)
  })

  it('is only narrowed by limits typed beside the design', () => {
    const limit = (ratedLoad: number) =>
      effectiveMountType(typeOf({ ...SPRING, ratedLoad }), CONDITIONS).type.ratedLoad
    const own = effectiveMountType(typeOf(SPRING), CONDITIONS).type.ratedLoad ?? 0
    expect(limit(500)).toBe(500)
    expect(limit(1e6)).toBe(own)
  })

  it.each<[string, TypeInput]>([
    ['a spring', SPRING],
    ['a pad', PAD],
    ['an air spring', AIR],
  ])('carries a machine as %s at once', (_, type) => {
    const result = evaluated(type)
    expect(result.statics?.loadSumError).toBeLessThan(1e-9)
    expect(result.modes).toHaveLength(6)
    expect(result.response).not.toBeNull()
    expect(result.components[0]).toMatchObject({ type: 'spring', usable: true })
  })

  it('does not carry a machine while its design lacks something, and says what', () => {
    const result = evaluated({ design: { component: 'helicalSpring' } })
    expect(result.statics).toBeNull()
    expect(fields(result)).toContainEqual(['missing', 'mounting.types[0].design.wireDiameter'])
    expect(result.components[0]).toMatchObject({ figures: null, usable: false })
  })

  it('does not carry a machine on a spring that gives way sideways', () => {
    const slender = { ...SPRING.design, component: 'helicalSpring' as const, freeLength: 0.6, load: 9000 }
    const result = evaluated({ design: slender })
    expect(result.statics).toBeNull()
    expect(fields(result)).toContainEqual(['invalid', 'mounting.types[0].design.freeLength'])
  })

  it('is described as a component even where no mount of it is placed', () => {
    const project = sketchProject({ places: [], type: PAD })
    expect(evaluate(project, { sweepPoints: 100 }).components[0]?.figures?.component).toBe('rubberPad')
  })

  it('stands at its design height under its design load as an air spring, and is stiffer in vibration', () => {
    const mount = evaluated(AIR).statics?.mounts[0]
    expect(mount?.deflection).toBeCloseTo(0, 12)
    expect((mount?.dynamicStiffness[2] ?? 0) / (mount?.staticStiffness ?? 1)).toBeCloseTo(1.4, 9)
    expect(mount?.dynamicStiffness[0]).toBe(3e4)
    expect(mount?.frequencyByDeflection).toBeNull()
  })

  describe('in heat and cold', () => {
    const rubber: TypeInput = {
      stiffnessAtTemperature: [
        ['0 °C', 1.44],
        [20, 1],
        ['104 °F', 0.8],
      ],
    }
    const at = (temperature: string | number | null) => evaluated(rubber, { analysis: { temperature } })

    it('vibrates as its reference curve says, and rests as before', () => {
      expect(heave(at('0 °C')) / heave(at(20))).toBeCloseTo(1.2, 9)
      expect((heave(at(30)) / heave(at(20))) ** 2).toBeCloseTo(0.9, 9)
      expect(heave(at(null))).toBe(heave(at(20)))
      expect(at('0 °C').statics?.mounts[0]?.deflection).toBe(at(null).statics?.mounts[0]?.deflection)
    })

    it('keeps the end of the curve beyond it, with a word', () => {
      expect(heave(at(-30))).toBe(heave(at(0)))
      expect(fields(at(-30))).toContainEqual(['caution', 'mounting.types[0].stiffnessAtTemperature'])
      expect(fields(at(0))).not.toContainEqual(['caution', 'mounting.types[0].stiffnessAtTemperature'])
    })

    it('has a curve that rises in temperature or none', () => {
      expect(() =>
        typeOf({
          stiffnessAtTemperature: [
            [20, 1],
            [20, 2],
          ],
        }),
      ).toThrow(/temperatures must rise/)
    })
  })

  it.each<[string, TypeInput]>([
    ['plain', {}],
    ['curved', CURVE],
    ['designed as a spring', SPRING],
    ['designed as a pad', PAD],
  ])('made stiffer by a factor vibrates faster by its root, %s', (_, type) => {
    fc.assert(
      fc.property(fc.double({ min: 0.8, max: 1.25, noNaN: true }), (factor) => {
        const own = typeOf(type)
        const stiffer = withStiffnessTimes(own, factor)
        const conditions = { gravity: 9.80665, temperature: null }
        const [a, b] = [effectiveMountType(own, conditions), effectiveMountType(stiffer, conditions)]
        for (const direction of [0, 1, 2] as const) {
          const [before, after] = [a.dynamicStiffness[direction], b.dynamicStiffness[direction]]
          // sideways a stiffer spring or pad also feels its load less, so that it gains a little more
          const gain = after / before / factor
          if (direction === 2 || type.design === undefined) expect(gain).toBeCloseTo(1, 9)
          else expect(Math.abs(gain - 1)).toBeLessThan(0.1)
        }
      }),
    )
  })

  it('keeps its load at the design height when an air spring is measured stiffer', () => {
    const { law } = effectiveMountType(withStiffnessTimes(typeOf(AIR), 1.2), CONDITIONS)
    const plain = effectiveMountType(typeOf(AIR), CONDITIONS).law
    expect(law.at(0).force).toBeCloseTo(980.665, 9)
    expect(law.at(0).dynamic / plain.at(0).dynamic).toBeCloseTo(1.2, 12)
  })
})

describe('the law of an air spring', () => {
  const column = { pressure: 5e5, atmosphere: 101325, area: 0.012, areaSlope: 0.01, volume: 0.0015 }
  const law = gasLaw({ column, exponent: 1.4, slowExponent: 1, correction: 1 })

  it('rises everywhere, without a step where it goes on straight', () => {
    fc.assert(
      fc.property(fc.double({ min: -0.2, max: 0.2, noNaN: true }), (x) => {
        const [here, next] = [law.at(x), law.at(x + 1e-7)]
        expect(next.force).toBeGreaterThan(here.force)
        expect(next.force - here.force).toBeLessThan(1e-7 * Math.max(here.tangent, next.tangent) * 1.001)
        // it is followed for half of the 119 mm that would leave no volume
        expect(here.outside).toBe(Math.abs(x) > emptyTravel(column) / 2)
      }),
    )
    expect(law.at(0.1).outside).toBe(true)
    expect(law.at(0.1).tangent).toBe(law.at(0.2).tangent)
  })
})
