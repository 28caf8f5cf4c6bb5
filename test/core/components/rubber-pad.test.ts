import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { padSection, idealPressureCoefficient } from '../../../core/components/pad-geometry.ts'
import { searchPad } from '../../../core/components/pad-search.ts'
import { analysePad } from '../../../core/components/rubber-pad.ts'
import { rubberModuli, rubberTable, youngsModulusFromShore } from '../../../core/components/rubber.ts'
import { InputError } from '../../../core/errors.ts'
import { padDesignSchema, type PadDesign } from '../../../core/project/component-designs.ts'

function pad(changes: object = {}): PadDesign {
  return padDesignSchema.parse({
    component: 'rubberPad',
    shape: { kind: 'rectangle', length: 0.1, width: 0.08 },
    thickness: 0.025,
    rubber: { from: 'hardness', hardness: 50 },
    load: 2500,
    creepPerDecade: 0.02,
    ...changes,
  })
}

const figures = (design: PadDesign) => {
  const found = analysePad(design).figures
  if (found === null) throw new Error('no figures')
  return found
}
const fields = (design: PadDesign) => analysePad(design).problems.map(({ kind, field }) => [kind, field])

describe('rubber by hardness', () => {
  it('rises with hardness, row by row and between rows', () => {
    const hardness = fc.double({ min: 30, max: 74.9, noNaN: true })
    fc.assert(
      fc.property(hardness, (value) => {
        const [soft, hard] = [rubberModuli(value), rubberModuli(value + 0.1)]
        expect(hard?.youngsModulus).toBeGreaterThan(soft?.youngsModulus ?? Infinity)
        expect(hard?.shearModulus).toBeGreaterThan(soft?.shearModulus ?? Infinity)
      }),
    )
  })

  it('is straight between rows and exact on them', () => {
    for (const [hardness, youngs] of rubberTable) {
      expect(rubberModuli(hardness)?.youngsModulus).toBeCloseTo(youngs * 1e6, 3)
    }
    expect(rubberModuli(52.5)?.shearModulus).toBeCloseTo(0.725e6, 3)
  })

  it.each([29.9, 75.1, NaN, Infinity])('is not known at %d', (hardness) => {
    expect(rubberModuli(hardness)).toBeNull()
  })

  it("stays within a third of Gent's relation, as different sources do", () => {
    for (const [hardness, youngs] of rubberTable) {
      expect(Math.abs(youngsModulusFromShore(hardness) / 1e6 / youngs - 1)).toBeLessThan(0.35)
    }
  })
})

describe('a rubber pad', () => {
  const pads = fc
    .record({
      length: fc.double({ min: 0.03, max: 0.3, noNaN: true }),
      aspect: fc.double({ min: 0.4, max: 2.5, noNaN: true }),
      slimness: fc.double({ min: 3, max: 12, noNaN: true }),
      hardness: fc.double({ min: 35, max: 70, noNaN: true }),
      layers: fc.integer({ min: 1, max: 4 }),
    })
    .map(({ length, aspect, slimness, hardness, layers }) =>
      pad({
        shape: { kind: 'rectangle', length, width: aspect * length },
        thickness: length / slimness,
        rubber: { from: 'hardness', hardness },
        layers,
        load: 1,
      }),
    )

  it('is softer in more layers, in proportion', () => {
    fc.assert(
      fc.property(pads, (design) => {
        const [one, many] = [figures({ ...design, layers: 1 }), figures(design)]
        // 1e-12: one division
        expect((many.rate * design.layers) / one.rate).toBeCloseTo(1, 12)
        expect((many.shearRate * design.layers) / one.shearRate).toBeCloseTo(1, 12)
      }),
    )
  })

  it('shears a little softer with bending than without, and softer still under load', () => {
    fc.assert(
      fc.property(pads, fc.double({ min: 0.05, max: 0.7, noNaN: true }), (design, share) => {
        const light = figures(design)
        const heavy = figures({ ...design, load: share * light.bucklingLoad })
        for (const direction of [0, 1] as const) {
          expect(light.lateralRate[direction] ?? Infinity).toBeLessThan(light.shearRate)
          expect(heavy.lateralRate[direction] ?? Infinity).toBeLessThan(light.lateralRate[direction] ?? 0)
        }
      }),
    )
  })

  it('gives way sideways just above its buckling load', () => {
    fc.assert(
      fc.property(pads, (design) => {
        const { bucklingLoad } = figures(design)
        expect(figures({ ...design, load: 0.999 * bucklingLoad }).lateralRate).not.toContain(null)
        expect(figures({ ...design, load: 1.001 * bucklingLoad }).lateralRate).toContain(null)
      }),
    )
  })

  it('is rated by compression where it is flat and by stability where it is tall', () => {
    const [flat, tall] = [figures(pad()), figures(pad({ layers: 8, load: 100 }))]
    expect(flat.ratedBy).toBe('compression')
    expect(flat.ratedLoad).toBeCloseTo(flat.rate * 0.15 * 0.025, 8)
    expect(tall.ratedBy).toBe('stability')
    expect(tall.ratedLoad).toBeCloseTo(0.8 * tall.bucklingLoad, 8)
  })

  it('is at most as stiff as incompressible rubber would be, and nearly that where layers are thick', () => {
    const without = (design: PadDesign) => figures({ ...design, volumeCompressibility: false }).rate
    fc.assert(
      fc.property(pads, (design) => {
        expect(figures(design).rate).toBeLessThan(without(design))
      }),
    )
    // shape factor 0.89: E_c is under a hundredth of the bulk modulus
    expect(figures(pad()).rate / without(pad())).toBeGreaterThan(0.99)
  })

  it('has a hole in it', () => {
    const section = padSection({ kind: 'disc', diameter: 0.06, bore: 0.02 })
    // area pi/4 (D² - d²) and edge pi (D + d) by hand: 8 pi/4 · 4e-4, 0.08 pi
    expect(section?.area).toBeCloseTo(8 * Math.PI * 1e-4, 12)
    expect(section?.edge).toBeCloseTo(0.08 * Math.PI, 12)
    // second moment pi/64 (D⁴ - d⁴), in mm⁴: pi/64 (12.96e6 - 0.16e6) = pi 2e5
    expect((section?.secondMoment[0] ?? 0) * 1e12).toBeCloseTo(2e5 * Math.PI, 3)
    expect(padSection({ kind: 'disc', diameter: 0.02, bore: 0.02 })).toBeNull()
  })

  it('creeps by its share in each tenfold of time', () => {
    const { creep, deflection } = figures(pad())
    // one minute to ten years is 5 259 600 times
    expect((creep ?? 0) / deflection).toBeCloseTo(0.02 * Math.log10(5_259_600), 9)
  })

  it('tends to the long strip', () => {
    // a strip of aspect a has 4 (1 + 1.37/a + ...): 4.003 at 2000
    expect(idealPressureCoefficient(2000)).toBeCloseTo(4, 2)
  })

  it('has no remark when it is sound', () => {
    expect(analysePad(pad()).problems).toEqual([])
  })

  it.each<[string, object, [string, string]]>([
    ['compressed beyond its limit', { load: 1e4 }, ['caution', 'load']],
    ['near buckling', { thickness: 0.06, load: 6000 }, ['caution', 'thickness']],
    ['buckled', { thickness: 0.1, load: 1e4 }, ['invalid', 'thickness']],
    ['very thin', { thickness: 0.001 }, ['caution', 'thickness']],
    ['very long', { shape: { kind: 'rectangle', length: 1, width: 0.08 }, load: 2e4 }, ['caution', 'shape']],
    ['of unknown creep', { creepPerDecade: null }, ['caution', 'creepPerDecade']],
    [
      'too hard for the table',
      { rubber: { from: 'hardness', hardness: 90 } },
      ['invalid', 'rubber.hardness'],
    ],
    ['of no hardness', { rubber: { from: 'hardness' } }, ['missing', 'rubber.hardness']],
    ['of no moduli', { rubber: { from: 'typed' } }, ['missing', 'rubber.youngsModulus']],
    ['of no size', { shape: { kind: 'disc' } }, ['missing', 'shape.diameter']],
    ['all hole', { shape: { kind: 'disc', diameter: 0.05, bore: 0.05 } }, ['invalid', 'shape.bore']],
    ['without load', { load: null }, ['missing', 'load']],
  ])('remarks on a pad %s', (_, changes, expected) => {
    expect(fields(pad(changes))).toContainEqual(expected)
  })
})

describe('the search for a pad', () => {
  const like = padDesignSchema.parse({ component: 'rubberPad' })
  const aims = fc.record({
    load: fc.double({ min: 200, max: 3e4, noNaN: true }),
    deflection: fc.double({ min: 0.0005, max: 0.006, noNaN: true }),
  })

  it('finds pads of the wanted rate that stay within compression and stability', () => {
    let pads = 0
    fc.assert(
      fc.property(aims, ({ load, deflection }) => {
        const rate = load / deflection
        const { candidates, reason } = searchPad({ rate, load, like })
        expect(candidates.length > 0).toBe(reason === '')
        for (const candidate of candidates) {
          pads += 1
          // the search halves to the last bit of the size, and the rate goes with its fourth power
          expect(candidate.figures.rate / rate).toBeCloseTo(1, 9)
          expect(candidate.figures.strain).toBeLessThan(candidate.design.compressionLimit)
          expect(candidate.figures.ratedLoad).toBeGreaterThan(load)
        }
      }),
    )
    expect(pads).toBeGreaterThan(100)
  })

  it('keeps proportions and the rubbers that can be had', () => {
    const rectangular = padDesignSchema.parse({
      component: 'rubberPad',
      shape: { kind: 'rectangle', length: 1, width: 0.5 },
    })
    const { candidates } = searchPad({ rate: 1e6, load: 2000, like: rectangular, hardnesses: [45, 60] })
    expect(candidates.length).toBeGreaterThan(0)
    for (const { design } of candidates) {
      const { shape, rubber } = design
      expect(shape.kind === 'rectangle' && (shape.width ?? 0) / (shape.length ?? 1)).toBeCloseTo(0.5, 12)
      expect(rubber.from === 'hardness' && [45, 60].includes(rubber.hardness ?? 0)).toBe(true)
    }
  })

  it('says why there is none, and refuses an aim that is no aim', () => {
    // 300 mm of deflection under 200 N asks for a tower of rubber
    expect(searchPad({ rate: 200 / 0.3, load: 200, like }).reason).not.toBe('')
    expect(() => searchPad({ rate: -1, load: 200, like })).toThrow(InputError)
  })
})
