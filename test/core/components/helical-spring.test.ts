import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { transverseStiffness } from '../../../core/components/haringx-column.ts'
import {
  bucklingDeflection,
  leastClearance,
  solidLength,
  springLateralRate,
  springRate,
  type SpringGeometry,
} from '../../../core/components/helical-spring.ts'
import { analyseSpring } from '../../../core/components/spring-analysis.ts'
import { searchSpring } from '../../../core/components/spring-search.ts'
import { InputError } from '../../../core/errors.ts'
import { springDesignSchema, type SpringDesign } from '../../../core/project/component-designs.ts'

const GEOMETRY: SpringGeometry = {
  wireDiameter: 0.008,
  coilDiameter: 0.06,
  activeCoils: 6.5,
  shearModulus: 79.3e9,
  youngsModulus: 206e9,
}

function spring(changes: object = {}): SpringDesign {
  return springDesignSchema.parse({
    component: 'helicalSpring',
    wireDiameter: 0.008,
    coilDiameter: 0.06,
    activeCoils: 6.5,
    freeLength: 0.14,
    load: 700,
    material: { strength: 1500e6 },
    ...changes,
  })
}

const fields = (design: SpringDesign) =>
  analyseSpring(design).problems.map(({ kind, field }) => [kind, field])

describe('a helical spring', () => {
  const geometries = fc.record({
    wireDiameter: fc.double({ min: 0.002, max: 0.02, noNaN: true }),
    index: fc.double({ min: 4, max: 16, noNaN: true }),
    activeCoils: fc.double({ min: 2, max: 15, noNaN: true }),
    slenderness: fc.double({ min: 0.5, max: 5, noNaN: true }),
  })
  const geometryOf = (given: { wireDiameter: number; index: number; activeCoils: number }) => ({
    ...GEOMETRY,
    wireDiameter: given.wireDiameter,
    coilDiameter: given.index * given.wireDiameter,
    activeCoils: given.activeCoils,
  })

  it('loses stiffness across as it is pressed, and has none left where it buckles sideways', () => {
    fc.assert(
      fc.property(geometries, (given) => {
        const geometry = geometryOf(given)
        const free = given.slenderness * geometry.coilDiameter
        // one end free to shift but kept parallel is the very motion that the lateral rate resists
        const end = bucklingDeflection(geometry, free, 1)
        const reach = end ?? 0.4 * free
        // rates rise again only where the spring has grown short; up to buckling they fall
        const rates = [0, 0.25, 0.5, 0.75, 0.999].map((share) =>
          springLateralRate(geometry, free, share * reach),
        )
        expect(rates.every((rate) => rate !== null && rate > 0)).toBe(true)
        if (end !== null) {
          expect(springLateralRate(geometry, free, end * 1.001)).toBeNull()
          expect(rates[4] ?? 1).toBeLessThan(0.05 * (rates[0] ?? 0))
        }
      }),
    )
  })

  it('is a plain beam with shear when nothing presses it', () => {
    // 1e-12: the same sum of two compliances, in another order
    const column = { length: 0.2, bendingRigidity: 3, shearRigidity: 900 }
    const beam =
      1 / (column.length / column.shearRigidity + column.length ** 3 / (12 * column.bendingRigidity))
    expect((transverseStiffness(column, 0) ?? 0) / beam - 1).toBeCloseTo(0, 12)
    // 1e-8: a millionth of the buckling load takes about a millionth of the stiffness, no more
    expect((transverseStiffness(column, 1e-6) ?? 0) / beam - 1).toBeCloseTo(0, 7)
  })

  it('agrees across the switch between series and closed form in the column', () => {
    const [length, bendingRigidity, shearRigidity] = [0.2, 3, 900]
    const at = (force: number) => transverseStiffness({ length, bendingRigidity, shearRigidity }, force) ?? 0
    // the switch stands at z = 0.02, P (1 + P/S) = 4 B z² / L²
    const right = (4 * bendingRigidity * 0.02 ** 2) / length ** 2
    const force = (shearRigidity * (Math.sqrt(1 + (4 * right) / shearRigidity) - 1)) / 2
    // both forms are good to about 1e-12 there
    expect(at(force * (1 - 1e-12)) / at(force * (1 + 1e-12)) - 1).toBeCloseTo(0, 10)
  })

  it('is as stiff along and across, in proportion, in every size', () => {
    fc.assert(
      fc.property(geometries, fc.double({ min: 0.1, max: 10, noNaN: true }), (given, size) => {
        const small = geometryOf(given)
        const large = {
          ...small,
          wireDiameter: size * small.wireDiameter,
          coilDiameter: size * small.coilDiameter,
        }
        const free = given.slenderness * small.coilDiameter
        // rates are E times a length times pure numbers; 1e-9 for the rounding of the powers
        expect(springRate(large) / (size * springRate(small))).toBeCloseTo(1, 9)
        const [a, b] = [
          springLateralRate(small, free, 0.1 * free),
          springLateralRate(large, size * free, 0.1 * size * free),
        ]
        if (a !== null) expect((b ?? 0) / (size * a)).toBeCloseTo(1, 9)
      }),
    )
  })

  it('lies solid as long as its coils are thick', () => {
    expect(solidLength(0.01, 8, 'closedGround')).toBeCloseTo(0.08, 12)
    expect(solidLength(0.01, 8, 'closed')).toBeCloseTo(0.095, 12)
  })

  it('keeps the clearance between its coils that its forming asks for', () => {
    // SOURCE EN 13906-1 (from memory), by hand: 6.5 (0.0015 · 60² / 8 + 0.8) mm and 0.02 · 6.5 (60 + 8) mm
    expect(leastClearance(GEOMETRY, 'cold')).toBeCloseTo(9.5875e-3, 12)
    expect(leastClearance(GEOMETRY, 'hot')).toBeCloseTo(8.84e-3, 12)
    const { figures } = analyseSpring(spring())
    expect((figures?.solidTravel ?? 0) - (figures?.workingTravel ?? 0)).toBeCloseTo(9.5875e-3, 12)
  })
})

describe('the analysis of a spring', () => {
  it('has no remark on a sound spring', () => {
    const { figures, problems } = analyseSpring(spring())
    expect(problems).toEqual([])
    expect(figures?.ratedLoad).toBeGreaterThan(700)
  })

  it.each<[string, object, [string, string]]>([
    ['solid under its load', { load: 2500 }, ['invalid', 'load']],
    ['close to solid', { load: 1850 }, ['caution', 'load']],
    ['slender enough to buckle', { freeLength: 0.6, load: 7000 }, ['invalid', 'freeLength']],
    ['overstressed', { material: { strength: 700e6 } }, ['caution', 'material.strength']],
    ['without strength', { material: {} }, ['caution', 'material.strength']],
    ['tightly coiled', { coilDiameter: 0.03 }, ['caution', 'coilDiameter']],
    ['of one coil', { activeCoils: 1.5 }, ['caution', 'activeCoils']],
    ['steep', { activeCoils: 2.5, freeLength: 0.16, load: 100 }, ['caution', 'freeLength']],
    ['without travel', { freeLength: 0.07 }, ['invalid', 'freeLength']],
    ['narrower than its wire', { coilDiameter: 0.008 }, ['invalid', 'coilDiameter']],
    ['without length', { freeLength: null }, ['missing', 'freeLength']],
  ])('remarks on a spring %s', (_, changes, expected) => {
    expect(fields(spring(changes))).toContainEqual(expected)
  })

  it('gives no lateral rate where the spring gives way', () => {
    const { figures } = analyseSpring(spring({ freeLength: 0.6, load: 7000 }))
    expect(figures?.lateralRate).toBeNull()
    expect(figures?.ratedBy).toBe('stability')
    // a fifth is kept from buckling
    expect(figures?.ratedLoad).toBeCloseTo(0.8 * (figures?.rate ?? 0) * (figures?.bucklingDeflection ?? 0), 8)
  })

  it('takes a measured rate as it is', () => {
    const plain = analyseSpring(spring()).figures
    const measured = analyseSpring(spring({ correction: 1.1 })).figures
    // 12 digits: one factor
    expect((measured?.rate ?? 0) / (plain?.rate ?? 1)).toBeCloseTo(1.1, 12)
  })
})

describe('the search for a spring', () => {
  const like = springDesignSchema.parse({ component: 'helicalSpring', material: { strength: 1400e6 } })
  const aims = fc.record({
    // deflections from 5 to 60 mm
    load: fc.double({ min: 50, max: 2e4, noNaN: true }),
    deflection: fc.double({ min: 0.005, max: 0.06, noNaN: true }),
  })

  it('finds springs of the wanted rate that stay within stress, travel and stability', () => {
    let springs = 0
    fc.assert(
      fc.property(aims, ({ load, deflection }) => {
        const rate = load / deflection
        const { candidates, reason } = searchSpring({ rate, load, like })
        expect(candidates.length > 0).toBe(reason === '')
        for (const { design, figures } of candidates) {
          springs += 1
          // 1e-9: the inverse of the same formula, powers rounded
          expect(figures.rate / rate).toBeCloseTo(1, 9)
          expect(figures.wahlStress).toBeLessThan(figures.permissibleStress ?? 0)
          expect(figures.ratedLoad).toBeGreaterThanOrEqual(load)
          expect(analyseSpring(design).problems).toEqual([])
        }
      }),
    )
    expect(springs).toBeGreaterThan(100)
  })

  it('keeps to the wires that can be had', () => {
    const wires = [0.004, 0.005, 0.0063, 0.008, 0.01]
    const { candidates } = searchSpring({ rate: 3e4, load: 600, like, wireDiameters: wires })
    expect(candidates.length).toBeGreaterThan(0)
    expect(candidates.every(({ design }) => wires.includes(design.wireDiameter ?? 0))).toBe(true)
  })

  it('says why there is none', () => {
    expect(searchSpring({ rate: 3e4, load: 600, like, wireDiameters: [0.001] }).reason).toContain(
      'thick enough',
    )
  })

  it('refuses an aim that is no aim', () => {
    expect(() => searchSpring({ rate: 0, load: 1, like })).toThrow(InputError)
    expect(() => searchSpring({ rate: 1, load: -1, like })).toThrow(InputError)
    const nameless = springDesignSchema.parse({ component: 'helicalSpring' })
    expect(() => searchSpring({ rate: 1, load: 1, like: nameless })).toThrow(/tensile strength/)
  })
})
