import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { searchAir } from '../../../core/components/air-search.ts'
import { analyseAir, followedTravel, gasColumn, travelUnder } from '../../../core/components/air-spring.ts'
import { emptyTravel, gasState, type GasColumn } from '../../../core/components/gas-column.ts'
import { InputError } from '../../../core/errors.ts'
import { airDesignSchema, type AirDesign } from '../../../core/project/component-designs.ts'

function air(changes: object = {}): AirDesign {
  return airDesignSchema.parse({
    component: 'airSpring',
    load: 5000,
    effectiveArea: 0.012,
    bellowsVolume: 0.0015,
    lateralStiffness: 4e4,
    ...changes,
  })
}

const columns = fc.record({
  pressure: fc.double({ min: 2e5, max: 9e5, noNaN: true }),
  atmosphere: fc.constant(101325),
  area: fc.double({ min: 0.003, max: 0.06, noNaN: true }),
  areaSlope: fc.double({ min: -0.02, max: 0.05, noNaN: true }),
  volume: fc.double({ min: 0.0005, max: 0.02, noNaN: true }),
}) satisfies fc.Arbitrary<GasColumn>

describe('a gas column', () => {
  it('has the slope of its force as stiffness, wherever it stands', () => {
    const place = fc.double({ min: -0.4, max: 0.4, noNaN: true })
    fc.assert(
      fc.property(columns, place, fc.constantFrom(1, 1.2, 1.4), (column, share, exponent) => {
        const way = emptyTravel({ ...column, areaSlope: Math.max(0, column.areaSlope) })
        const [at, step] = [share * way, 1e-5 * way]
        const difference =
          (gasState(column, at + step, exponent).force - gasState(column, at - step, exponent).force) /
          (2 * step)
        // 1e-6: a central difference over 1e-5 of the height leaves 1e-10 of third-order terms and
        // 1e-11 of rounding; measured against the gas part, since the two parts may nearly cancel
        const scale = (exponent * column.pressure * column.area ** 2) / column.volume
        expect(Math.abs(gasState(column, at, exponent).stiffness - difference) / scale).toBeLessThan(1e-6)
      }),
    )
  })

  it('is empty where its volume ends', () => {
    fc.assert(
      fc.property(columns, (column) => {
        const x = emptyTravel(column)
        if (!Number.isFinite(x)) return
        const left = column.volume - column.area * x - (column.areaSlope * x ** 2) / 2
        // 1e-9 of the volume: one square root
        expect(Math.abs(left) / column.volume).toBeLessThan(1e-9)
      }),
    )
  })
})

describe('an air spring', () => {
  it('sinks by as much as the load that it then carries says', () => {
    const column = gasColumn(air()) as GasColumn // every input of air() is there
    fc.assert(
      fc.property(fc.double({ min: 0.7, max: 1.4, noNaN: true }), (share) => {
        const travel = travelUnder(column, share * 5000, 1)
        // 1e-12: the search goes on to the last bit
        expect(gasState(column, travel ?? NaN, 1).force / (share * 5000)).toBeCloseTo(1, 11)
      }),
    )
  })

  it('sinks under an isothermal load change as the gas law says in closed form', () => {
    const column = gasColumn(air()) as GasColumn // every input of air() is there
    const share = 1.1
    const after = 101325 + (share * 5000) / 0.012
    // p V constant: x = V/A (1 - p0 / p1); 1e-12 for rounding
    const expected = (0.0015 / 0.012) * (1 - column.pressure / after)
    const { figures } = analyseAir(air())
    expect(figures?.heightChange.find(({ loadShare }) => loadShare === share)?.travel).toBeCloseTo(
      expected,
      12,
    )
  })

  it('has no remark when it is sound', () => {
    expect(analyseAir(air()).problems).toEqual([])
  })

  it.each<[string, object, [string, string]]>([
    ['under too much pressure', { highestPressure: 3e5 }, ['caution', 'load']],
    ['under too little pressure', { load: 900 }, ['caution', 'load']],
    ['of unknown stiffness sideways', { lateralStiffness: null }, ['missing', 'lateralStiffness']],
    ['that gives way sideways', { lateralStiffness: -2000 }, ['invalid', 'lateralStiffness']],
    ['whose area shrinks away', { areaSlope: -0.3 }, ['invalid', 'areaSlope']],
    ['with a stop out of reach', { bumpTravel: 0.2 }, ['caution', 'bumpTravel']],
    ['without volume', { bellowsVolume: null }, ['missing', 'bellowsVolume']],
    ['without load', { load: null }, ['missing', 'load']],
  ])('remarks on a spring %s', (_, changes, expected) => {
    expect(analyseAir(air(changes)).problems.map(({ kind, field }) => [kind, field])).toContainEqual(expected)
  })

  it('follows its law no further than it has gas', () => {
    fc.assert(
      fc.property(columns, (column) => {
        const [up, down] = followedTravel(column)
        expect(down).toBeLessThan(emptyTravel(column))
        expect(gasState(column, down, 1).pressure).toBeGreaterThan(gasState(column, up, 1).pressure)
      }),
    )
  })
})

describe('the search for an air spring', () => {
  const like = airDesignSchema.parse({ component: 'airSpring', lateralStiffness: 1e4 })

  it('finds the volume for a wanted frequency', () => {
    const aims = fc.record({
      frequency: fc.double({ min: 0.8, max: 4, noNaN: true }),
      load: fc.double({ min: 500, max: 5e4, noNaN: true }),
      gaugePressure: fc.double({ min: 2e5, max: 8e5, noNaN: true }),
    })
    fc.assert(
      fc.property(aims, (aim) => {
        const { figures } = searchAir({ ...aim, like })
        // 1e-12: the inverse of the same formula
        expect((figures?.frequency ?? 0) / aim.frequency).toBeCloseTo(1, 11)
        expect((figures?.gaugePressure ?? 0) / aim.gaugePressure).toBeCloseTo(1, 11)
      }),
    )
  })

  it('gives the rest of the volume to an auxiliary vessel, or says that the bellows hold too much', () => {
    const bellows = { ...like, bellowsVolume: 0.002 }
    const soft = searchAir({ frequency: 1, load: 5000, gaugePressure: 4e5, like: bellows })
    expect(soft.design?.bellowsVolume).toBe(0.002)
    expect(soft.design?.auxiliaryVolume).toBeGreaterThan(0)
    expect(soft.figures?.frequency).toBeCloseTo(1, 11)
    const stiff = searchAir({ frequency: 4, load: 5000, gaugePressure: 4e5, like: bellows })
    expect(stiff.design).toBeNull()
    expect(stiff.reason).toContain('softer')
  })

  it('says what is missing or cannot be, and refuses an aim that is no aim', () => {
    expect(searchAir({ frequency: 2, load: 5000, like }).reason).toContain('effective area')
    expect(
      searchAir({ frequency: 1, load: 5000, gaugePressure: 4e5, like: { ...like, areaSlope: 1 } }).reason,
    ).toContain('growth of the effective area')
    expect(() => searchAir({ frequency: 0, load: 1, like })).toThrow(InputError)
    expect(() => searchAir({ frequency: 1, load: 1, gaugePressure: 0, like })).toThrow(InputError)
  })
})
