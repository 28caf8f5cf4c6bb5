import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { Project } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import { buildReport } from '../../../core/report/build-report.ts'
import { formatNumber } from '../../../core/units/format.ts'
import { NONSENSE, reportTexts, tableOf } from './report-text.ts'

const MACHINE = {
  format: 'stillbed-project',
  version: 1,
  machine: {
    massProperties: { from: 'typed', mass: '400 kg', inertia: { xx: 40, yy: 60, zz: 60 } },
    duty: { runningSpeed: '1500 rpm' },
    points: [{ id: 'p', name: 'Bearing', position: ['300 mm', '0 mm', '200 mm'] }],
  },
  sources: [{ kind: 'unbalance', id: 's', amount: { by: 'unbalance', unbalance: '5000 g mm' } }],
  mounting: {
    types: [{ id: 't', name: 'T', stiffness: ['80 N/mm', '80 N/mm', '80 N/mm'], lossFactor: 0.1 }],
    placed: [
      [-0.5, -0.4],
      [-0.5, 0.4],
      [0.5, -0.4],
      [0.5, 0.4],
    ].map(([x, y], at) => ({ id: `m${at}`, name: `M${at + 1}`, type: 't', position: [x, y, 0] })),
  },
}

function report(runUp: object, units: Project['units'] = 'SI') {
  const project = readProject({
    ...MACHINE,
    units,
    runUp,
    requirements: [
      { kind: 'runUpMotion', id: 'gap', limit: '2 mm', place: 'point', point: 'p', source: 'duct' },
    ],
  })
  const evaluation = evaluate(project)
  return { project, evaluation, report: buildReport(project, evaluation) }
}

const UP = { law: { by: 'ramp', time: '6 s' }, hold: '2 s' }
const DOWN = {
  law: { by: 'torque', torque: '4 N m', inertia: '1.5 kg m^2', loadTorque: '20 N m', to: '60 rpm' },
}

describe.each(['SI', 'US'] as const)('report of a run-up in %s units', (units) => {
  const { evaluation, report: made, project } = report({ enabled: true, up: UP, down: DOWN }, units)
  const up = evaluation.runUp?.up
  const down = evaluation.runUp?.down

  it('tells both laws as they were put in', () => {
    const { rows } = tableOf(made, 'Run-up and coast-down as given')
    expect(rows[0]).toEqual(['Run-up', 'steady ramp from 0 rpm to the running speed within 6 s', '2', 'on'])
    const torque = units === 'SI' ? '4 N m' : '2.95 lbf ft'
    const inertia = units === 'SI' ? '1.5 kg m²' : '35.6 lb ft²'
    expect(rows[1]?.[1]).toContain(`friction and brake ${torque} on an inertia of ${inertia}`)
    expect(rows[1]?.[1]).toContain('at the running speed, growing with the square of speed; from the running')
  })

  it('lists the peaks of both passages beside each other', () => {
    const { rows, columns } = tableOf(made, 'Displacement in passing')
    expect(columns.map(({ unit }) => unit).slice(1, 5)).toEqual([
      units === 'SI' ? 'mm' : 'in',
      'rpm',
      's',
      '%',
    ])
    const cells = (peak: NonNullable<typeof up>['points'][number]['peaks']['x'] | undefined) => [
      formatNumber(peak?.value, 'deflection', units),
      formatNumber(peak?.speed, 'shaftSpeed', units),
      formatNumber(peak?.time, 'time', units),
      formatNumber(peak?.ratio, 'share', units, 3),
    ]
    expect(rows).toEqual([
      ['Bearing', ...cells(up?.points[0]?.peaks.resultant), ...cells(down?.points[0]?.peaks.resultant)],
    ])
    expect(reportTexts(made).join()).toMatch(/(Run-up|Coast-down) governs: Bearing moves/)
    expect(tableOf(made, 'Force on the support in passing').rows).toHaveLength(4)
  })

  it('draws both envelopes under the clearance, up to the peak that the table names', () => {
    const figures = made.sections.flatMap(({ blocks }) =>
      blocks.flatMap((block) => (block.kind === 'figure' ? [block.figure] : [])),
    )
    for (const [id, pass] of [
      ['run-up-up', up],
      ['run-up-down', down],
    ] as const) {
      const figure = figures.find((candidate) => candidate.id === id)
      const factor = units === 'SI' ? 1e-3 : 0.0254
      const top = Math.max(...(figure?.series[0]?.y ?? []).map((value) => value ?? 0)) * factor
      // the thinned envelope keeps its peak; 1e-9: a conversion of units
      expect(top / (pass?.points[0]?.peaks.resultant.value ?? NaN)).toBeCloseTo(1, 9)
      expect(figure?.limits.map(({ value }) => value * factor)).toEqual([expect.closeTo(2e-3, 12)])
    }
  })

  it('names method, source and the caution that goes with it', () => {
    const text = reportTexts(made).join('\n')
    expect(text).toContain('Lewis')
    expect(text).toContain('computed for the given run-up and coast-down alone')
    expect(text).not.toMatch(NONSENSE)
    expect(project.runUp.enabled).toBe(true)
  })
})

it('shows a single passage alone, and the lines of a recorded speed', () => {
  const entries = [
    { time: 0, speed: 0 },
    { time: '5 s', speed: '1500 rpm' },
  ]
  const { report: made } = report({
    enabled: true,
    up: { law: { by: 'table', entries } },
    down: { enabled: false },
  })
  expect(tableOf(made, 'Displacement in passing').columns).toHaveLength(5)
  expect(tableOf(made, 'Run-up: speed against time').rows).toEqual([
    ['0', '0'],
    ['5', '1500'],
  ])
  expect(tableOf(made, 'Run-up and coast-down as given').marks).toEqual(['plain', 'off'])
})

it('says that passing a resonance was not looked at where run-up is off', () => {
  const { report: made } = report({ enabled: false })
  const text = reportTexts(made).join('\n')
  expect(text).toContain('was not asked for and is not computed here')
  expect(text).not.toContain('Lewis')
  expect(() => tableOf(made, 'Run-up and coast-down as given')).toThrow('no table')
})

it('says that the peaks are not known while a law is incomplete', () => {
  const { report: made } = report({ enabled: true, up: { law: { by: 'ramp' } }, down: { enabled: false } })
  expect(reportTexts(made)).toContain('Run-up and coast-down are not known.')
})
