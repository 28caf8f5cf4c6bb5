import { describe, expect, it } from 'vitest'
import reference from '../../reference/F_criteria.json' with { type: 'json' }
import { severityLimit, severityScales, severityZone } from '../../../core/criteria/severity.ts'

// SOURCE  ISO 10816-1:1995 Annex B, ISO 10816-3:2009, ISO 14694:2003, each from memory: this guards
//         against slips of transcription between two independent write-downs, not against the standards.
const cases = new Map(reference.cases.map((entry) => [entry.id, entry]))
const MM_PER_S = 1e-3

/** Limits of a class in mm/s as the reference lists them. */
function limits(scale: string, machineClass: string): number[] {
  const found = severityScales
    .find((entry) => entry.id === scale)
    ?.classes.find((entry) => entry.id === machineClass)
  return (found?.zones ?? []).map((zone) => Number((zone.limit / MM_PER_S).toPrecision(10)))
}

describe('severity tables against an independent write-down', () => {
  it('holds the zones of ISO 10816-1 by class', () => {
    const expected = cases.get('F-ISO10816_1-01')?.expected as unknown as Record<string, number[]>
    const byClass = Object.entries(expected).filter(([key]) => key.startsWith('Class '))
    expect(byClass).toHaveLength(4)
    for (const [key, values] of byClass) {
      expect(limits('iso10816-1', key.split(' ')[1] ?? ''), key).toEqual(values)
    }
  })

  it('holds the velocity zones of groups 1 and 2 of ISO 20816-3', () => {
    const { rows } = cases.get('F-ISO10816_3-01')?.expected as unknown as {
      rows: { group: number; support: string; v_mm_s_rms: number[] }[]
    }
    for (const row of rows.filter((entry) => entry.group <= 2)) {
      expect(
        limits('iso20816-3', `${row.group}-${row.support}`),
        `group ${row.group} ${row.support}`,
      ).toEqual(row.v_mm_s_rms)
    }
  })

  it('holds the in-place limits of the fan categories of ISO 14694', () => {
    const { rows } = cases.get('F-ISO14694-01')?.expected as unknown as {
      rows: { cat: string; startup_rms_rigid_flex: number[]; alarm: number[]; shutdown: number[] | null }[]
    }
    expect(rows).toHaveLength(5)
    for (const row of rows) {
      ;['rigid', 'flexible'].forEach((support, column) => {
        const expected = [
          row.startup_rms_rigid_flex[column],
          row.alarm[column],
          ...(row.shutdown ? [row.shutdown[column]] : []),
        ]
        expect(limits('iso14694', `${row.cat} ${support}`), `${row.cat} ${support}`).toEqual(expected)
      })
    }
  })
})

describe('severity zones', () => {
  it('belong to the zone whose upper boundary is not exceeded', () => {
    const zones =
      severityScales
        .find((scale) => scale.id === 'iso20816-3')
        ?.classes.find((entry) => entry.id === '2-flexible')?.zones ?? []
    expect(severityZone(zones, 2.3e-3)).toBe('A')
    expect(severityZone(zones, 2.31e-3)).toBe('B')
    expect(severityZone(zones, 7.1e-3)).toBe('C')
    expect(severityZone(zones, 7.2e-3)).toBe('above C')
  })

  it('gives no limit for a scale, class or zone that does not exist', () => {
    expect(severityLimit('iso20816-3', '2-flexible', 'B')).toBeCloseTo(4.5e-3, 12)
    expect(severityLimit('iso20816-3', '9-flexible', 'B')).toBeNull()
    expect(severityLimit('iso20816-3', '2-flexible', 'D')).toBeNull()
    expect(severityLimit('own', '', '')).toBeNull()
  })

  it('rises from zone to zone in every class', () => {
    for (const scale of severityScales) {
      for (const machineClass of scale.classes) {
        const values = machineClass.zones.map((zone) => zone.limit)
        expect(values, `${scale.id} ${machineClass.id}`).toEqual(values.toSorted((a, b) => a - b))
      }
    }
  })
})
