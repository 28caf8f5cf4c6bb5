import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { reactionsAt } from '../../../core/criteria/comfort.ts'
import { floorCurves, floorLimit } from '../../../core/criteria/floor-curves.ts'
import { supportKind } from '../../../core/criteria/machine-groups.ts'
import { InputError } from '../../../core/errors.ts'
import { criteriaChecks } from '../../reference/checks/criteria.ts'

describe('limits agree with an independent write-down', () => {
  it.each(criteriaChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})

describe('floor curves', () => {
  const curve = fc.constantFrom(...floorCurves)

  it('are defined in their band and nowhere else', () => {
    fc.assert(
      fc.property(curve, fc.double({ min: 0, max: 200, noNaN: true }), ({ id, band }, frequency) => {
        const within = frequency >= band[0] && frequency <= band[1]
        expect(floorLimit(id, frequency) === null).toBe(!within)
      }),
    )
    expect(floorLimit('VC-A', NaN)).toBeNull()
  })

  it('have no jump and never rise with frequency', () => {
    fc.assert(
      fc.property(curve, fc.double({ min: 0, max: 0.999, noNaN: true }), ({ id, band }, share) => {
        const at = band[0] * (band[1] / band[0]) ** share
        const [here, next] = [floorLimit(id, at) ?? 0, floorLimit(id, at * 1.0001) ?? 0]
        // a hundredth of a percent of frequency moves no limit by more than 1.5 times that
        expect(next / here).toBeGreaterThan(1 - 1.6e-4)
        expect(next / here).toBeLessThan(1 + 1e-12)
      }),
    )
  })

  it('join where their pieces meet', () => {
    for (const { id } of floorCurves) {
      for (const corner of [2, 4, 8]) {
        const [below, above] = [floorLimit(id, corner * (1 - 1e-9)), floorLimit(id, corner * (1 + 1e-9))]
        if (below !== null && above !== null)
          expect(above / below - 1, `${id} at ${corner} Hz`).toBeCloseTo(0, 7)
      }
    }
  })

  it('go straight between 2 and 8 Hz for any posture', () => {
    // SOURCE ISO 2631-2:1989, combined curve at 4 Hz and 5 Hz: 4.07e-3 and 4.30e-3 m/s², from memory, to its digits
    const acceleration = (frequency: number) =>
      2 * Math.PI * frequency * (floorLimit('iso2631-combined', frequency) ?? 0)
    expect(acceleration(4)).toBeCloseTo(4.07e-3, 5)
    expect(acceleration(5)).toBeCloseTo(4.3e-3, 5)
  })

  it('stand above one another in the order of their list', () => {
    const generic = floorCurves.filter(({ id }) => !id.startsWith('iso'))
    const limits = generic.map(({ id }) => floorLimit(id, 16) ?? 0)
    expect(limits).toEqual(limits.toSorted((a, b) => b - a))
  })

  it('are multiplied for place and time of day', () => {
    expect(floorLimit('iso2631-z', 16, 4)).toBeCloseTo(4 * (floorLimit('iso2631-z', 16) ?? 0), 12)
    expect(() => floorLimit('iso2631-z', 16, 0)).toThrow(InputError)
  })

  it('say where they come from', () => {
    expect(floorCurves.every(({ source, provenance }) => source !== '' && provenance === 'from memory')).toBe(
      true,
    )
  })
})

describe('other criteria', () => {
  it('counts a support as rigid from a quarter above the excitation', () => {
    expect(supportKind(31.25, 25)).toBe('rigid')
    expect(supportKind(31, 25)).toBe('flexible')
  })

  it('names every reaction whose range holds an acceleration', () => {
    expect(reactionsAt(0.1).map(({ words }) => words)).toEqual(['not uncomfortable'])
    expect(reactionsAt(0.55).map(({ words }) => words)).toEqual([
      'a little uncomfortable',
      'fairly uncomfortable',
    ])
    expect(reactionsAt(10).map(({ words }) => words)).toEqual(['extremely uncomfortable'])
  })
})
