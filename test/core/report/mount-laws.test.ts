import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { Project } from '../../../core/project/project.ts'
import { buildReport } from '../../../core/report/build-report.ts'
import { CORNERS, sketchProject } from '../mounts/machine-project.ts'
import { NONSENSE, reportTexts, tableOf } from './report-text.ts'

const SPRING = {
  component: 'helicalSpring' as const,
  load: 1000,
  wireDiameter: 0.008,
  coilDiameter: 0.06,
  activeCoils: 6,
  freeLength: 0.12,
  material: { name: 'EN 10270-1 SH', strength: 1500e6 },
}
const CURVE = {
  kind: 'curve' as const,
  points: [
    [0.004, 400],
    [0.008, 1200],
    [0.012, 2600],
  ] as [number, number][],
}

function reportOf(project: Project) {
  const evaluation = evaluate(project, { sweepPoints: 20 })
  const report = buildReport(project, evaluation)
  const texts = reportTexts(report)
  for (const text of texts) expect(text).not.toMatch(NONSENSE)
  return { evaluation, report, text: texts.join('\n') }
}

describe('the report of mounts with a law', () => {
  it('gives a measured curve with its points and the working point of every mount', () => {
    const project = sketchProject({ places: CORNERS, type: { name: 'Cable C', law: CURVE } })
    const { evaluation, report, text } = reportOf(project)
    expect(tableOf(report, 'Measured curve of Cable C').rows).toEqual([
      ['4', '400'],
      ['8', '1200'],
      ['12', '2600'],
    ])
    const { rows } = tableOf(report, 'Mounts at their working points')
    expect(rows.map(([mark]) => mark)).toEqual(['M1', 'M2', 'M3', 'M4'])
    const stiffness = evaluation.statics?.mounts[0]?.staticStiffness ?? NaN
    // four digits are written
    expect(Number(rows[0]?.[2]) / (stiffness / 1000) - 1).toBeCloseTo(0, 3)
    expect(text).toContain('F. N. Fritsch and R. E. Carlson')
  })

  it('gives a designed component with sizes, figures and where they come from', () => {
    const { report, text } = reportOf(sketchProject({ places: CORNERS, type: { name: 'S', design: SPRING } }))
    const facts = report.sections.flatMap(({ blocks }) =>
      blocks.flatMap((block) => (block.kind === 'facts' ? block.rows : [])),
    )
    const fact = (label: string) => facts.find((row) => row.label === label)?.value
    expect(fact('Wire diameter')).toBe('8 mm')
    // SOURCE R = G d⁴ / (8 D³ n), A. M. Wahl, Mechanical Springs, by hand: 31.33 N/mm
    expect(fact('Rate along, across')).toMatch(/^31\.33 N\/mm, /)
    // SOURCE 8 F D K / (π d³) with K = (4w - 1)/(4w - 4) + 0.615/w (the same): w = 7.5, K = 1.19738
    expect(fact('Shear stress, corrected (Wahl)')).toBe('357.3 MPa of 840 MPa')
    expect(text).toContain('EN 13906-1 (formulas from memory: check the standard)')
    expect(text).toContain('dimensions of a helical spring')
  })

  it('marks a figure beyond its limit, and says when the component cannot serve', () => {
    const thin = { ...SPRING, material: { strength: 500e6 } }
    expect(reportOf(sketchProject({ places: CORNERS, type: { design: thin } })).text).toMatch(
      /MPa of 280 MPa \(beyond what is allowed\)/,
    )
    const pressed = { ...SPRING, load: 1e4 }
    expect(reportOf(sketchProject({ places: CORNERS, type: { design: pressed } })).text).toContain(
      'It cannot carry the machine',
    )
    const bare = { component: 'airSpring' as const }
    expect(reportOf(sketchProject({ places: CORNERS, type: { design: bare } })).text).toContain(
      'Its figures are not known',
    )
  })

  it('gives pads and air springs their sizes in the units of the project', () => {
    const pad = {
      component: 'rubberPad' as const,
      load: 1000,
      shape: { kind: 'disc' as const, diameter: 0.0762 },
      thickness: 0.0254,
      rubber: { from: 'hardness' as const, hardness: 45 },
    }
    const inches = reportOf(sketchProject({ places: CORNERS, type: { design: pad }, more: { units: 'US' } }))
    // SOURCE the inch is 25.4 mm exactly
    expect(inches.text).toContain('disc of 3 in')
    expect(inches.text).toContain('P. B. Lindley')
    const air = {
      component: 'airSpring' as const,
      load: 1000,
      effectiveArea: 0.004,
      bellowsVolume: 0.001,
      lateralStiffness: 2e4,
    }
    const { text } = reportOf(sketchProject({ places: CORNERS, type: { design: air } }))
    expect(text).toContain('1 L')
    expect(text).toContain('Gauge pressure')
  })

  it('gives packing that levels, temperature, and the load sideways with its caution', () => {
    const project = sketchProject({
      places: CORNERS,
      centre: [0.1, 0, 0.3],
      type: {
        name: 'T',
        ratedLoad: 1200,
        snubberGap: 0.001,
        stiffnessAtTemperature: [
          ['20 °C', 1],
          ['60 °C', 0.8],
        ],
      },
      more: { analysis: { temperature: '40 °C', lateralLoad: { factor: 0.4, direction: [0, 1, 0] } } },
    })
    project.mounting.setting = { kind: 'levelled', by: 'equalLoads' }
    const { evaluation, report, text } = reportOf(project)
    const packing = tableOf(report, 'Packing that sets the machine level').rows
    const shims = evaluation.statics?.mounts.map(({ shim }) => shim) ?? []
    packing.forEach((row, index) => expect(Number(row[1])).toBeCloseTo(1000 * (shims[index] ?? NaN), 3))
    expect(text).toContain('level, aimed at equal loads')
    expect(text).not.toContain('working points')
    expect(text).toContain('40 °C')
    const { rows, marks } = tableOf(report, 'Mounts under the load along its direction')
    expect(rows).toHaveLength(4)
    expect(marks).toContain('near')
    // 400 kg times 9.80665 m/s² times 0.4
    expect(text).toContain('1569 N')
    expect(text).toContain('a matter for the local code and a licensed engineer')
  })

  it('says nothing of laws where every mount is a plain spring', () => {
    const { text } = reportOf(sketchProject({ places: CORNERS }))
    expect(text).not.toMatch(/Measured curve|Component of|Packing|load sideways:|working points/)
    expect(text).toContain('mounts vibrate linearly about their static position')
  })
})
