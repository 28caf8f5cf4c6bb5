import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { writeCsv, writeTable, column, textColumn } from '../../../core/report/raw-table.ts'
import { absorberSheetCsv } from '../../../core/report/sections/absorber-sheet.ts'
import { mountScheduleCsv } from '../../../core/report/sections/mount-schedule.ts'
import { writerFor } from '../../../core/report/writer.ts'
import { demoProjects, withAbsorbers } from '../demo/demo-files.ts'

const SI = writerFor('SI')
const table = {
  caption: 'Loads',
  columns: [textColumn('Mark'), column('Load', 'force'), column('Length', 'length')],
  rows: [
    ['M1', 2345.678, 0.123456],
    ['a, "b"', null, 0],
  ],
} as const

describe('a table on the page', () => {
  it('shows four digits, the unit in the head, and a dash for what is not known', () => {
    const page = writeTable(table, SI)
    expect(page.columns.map(({ label, unit }) => [label, unit])).toEqual([
      ['Mark', ''],
      ['Load', 'N'],
      ['Length', 'mm'],
    ])
    expect(page.rows).toEqual([
      ['M1', '2346', '123.5'],
      ['a, "b"', '–', '0'],
    ])
  })
})

describe('a table as comma-separated values', () => {
  it('keeps twelve digits, quotes as RFC 4180 asks, and leaves unknown fields empty', () => {
    expect(writeCsv(table, SI)).toBe('Mark,Load [N],Length [mm]\r\nM1,2345.678,123.456\r\n"a, ""b""",,0\r\n')
  })

  it('hands no text to a spreadsheet as a formula', () => {
    const hostile = ['=1+1', '+1', '@x', '-x', '\tx'].map((text) => [text])
    const lines = writeCsv({ caption: '', columns: [textColumn('Mark')], rows: hostile }, SI).split('\r\n')
    for (const line of lines.slice(1, -1)) expect(line).toMatch(/^"?'/)
    expect(writeCsv({ caption: '', columns: [textColumn('v')], rows: [['-1.5']] }, SI)).toBe('v\r\n-1.5\r\n')
  })
})

describe.each(demoProjects())('files of $file', ({ project }) => {
  const complete = withAbsorbers(project)
  const evaluation = evaluate(complete)

  it('give every mount with the load of the evaluation', () => {
    const [head, ...lines] = mountScheduleCsv(complete, evaluation).trimEnd().split('\r\n')
    const at = head?.split(',').findIndex((label) => label.startsWith('Static load')) ?? -1
    const unit = complete.units === 'US' ? 4.4482216152605 : 1 // newtons in a pound-force, NIST SP 811
    expect(lines).toHaveLength(complete.mounting.placed.length)
    lines.forEach((line, index) => {
      const load = evaluation.statics?.mounts[index]?.load ?? NaN
      // twelve digits are written: half a unit of the last one
      expect(Math.abs((Number(line.split(',')[at]) * unit) / load - 1)).toBeLessThan(5e-12)
    })
  })

  it('give mass, spring and damper of every absorber', () => {
    const lines = absorberSheetCsv(complete, evaluation).split('\r\n')
    for (const { name } of complete.absorbers) {
      for (const quantity of [
        'Moving mass',
        'Spring stiffness along the line',
        'Damping coefficient along the line',
      ]) {
        const line = lines.find((candidate) => candidate.startsWith(`${name},in place,${quantity},`))
        expect(Number(line?.split(',')[3])).toBeGreaterThan(0)
      }
    }
  })
})
