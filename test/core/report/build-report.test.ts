import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { blankProject } from '../../../core/project/create.ts'
import type { Project } from '../../../core/project/project.ts'
import { buildReport } from '../../../core/report/build-report.ts'
import { formatNumber, formatQuantity } from '../../../core/units/format.ts'
import { demoProjects, withAbsorbers } from '../demo/demo-files.ts'
import { NONSENSE, reportTexts, tableOf } from './report-text.ts'

const demos = demoProjects().flatMap(({ file, project }) => [
  { name: `${file} as delivered`, project },
  { name: `${file} with absorbers`, project: withAbsorbers(project) },
  {
    name: `${file} in the other units`,
    project: { ...project, units: project.units === 'SI' ? 'US' : 'SI' } as Project,
  }, // one of the two systems
])

describe.each(demos)('report of $name', ({ project }) => {
  const evaluation = evaluate(project)
  const report = buildReport(project, evaluation, { madeAt: '2031-05-04' })
  const number = (
    value: number | null | undefined,
    dimension: Parameters<typeof formatNumber>[1],
    digits = 4,
  ) => formatNumber(value, dimension, project.units, digits)

  it('reads without nonsense', () => {
    for (const text of reportTexts(report)) expect(text).not.toMatch(NONSENSE)
    for (const section of report.sections) expect(section.blocks.length).toBeGreaterThan(0)
  })

  it('holds every verdict with its value, limit and margin', () => {
    const { rows, marks } = tableOf(report, 'Requirements')
    expect(rows).toHaveLength(evaluation.verdicts.length)
    evaluation.verdicts.forEach((verdict, index) => {
      const row = rows[index] ?? []
      const quantity = (value: number | null) =>
        value === null ? 'not known' : formatQuantity(value, verdict.dimension, project.units)
      expect(row[0]).toBe(verdict.title)
      expect(row[1]).toBe(quantity(verdict.value))
      expect(row[2]?.replace(/^at (most|least) /, '')).toBe(quantity(verdict.limit))
      expect(row[5]).toBe(
        { pass: 'met', near: 'met, near the limit', fail: 'FAILS', unknown: 'not known' }[verdict.status],
      )
      expect(marks?.[index]).toBe(
        { pass: 'good', near: 'near', fail: 'bad', unknown: 'unknown' }[verdict.status],
      )
    })
  })

  it('lists every mount with its load and deflection', () => {
    const { rows } = tableOf(report, 'Mount schedule')
    expect(rows).toEqual(
      project.mounting.placed.map((mount, index) => {
        const at = evaluation.statics?.mounts[index]
        return [
          mount.name,
          project.mounting.types.find((type) => type.id === mount.type)?.name,
          ...mount.position.map((value) => number(value, 'length')),
          number(at?.load, 'force'),
          number(at?.deflection, 'deflection'),
          number(at?.ratedShare, 'share', 3),
          number(at?.limitShare, 'share', 3),
          number(evaluation.response?.atSpeeds[0]?.mountForces[index], 'force'),
        ]
      }),
    )
  })

  it('lists the modes and the response at every speed', () => {
    const modes = tableOf(report, 'Natural modes of the machine').rows
    expect(modes.map((row) => row.slice(0, 5))).toEqual(
      evaluation.modes?.map((mode) => [
        String(mode.number),
        mode.name,
        number(mode.frequency, 'frequency'),
        number(mode.dampedFrequency, 'frequency'),
        number(mode.dampingRatio, 'ratio', 3),
      ]),
    )
    const speeds = tableOf(report, 'Force into the support').rows
    expect(speeds).toEqual(
      evaluation.response?.atSpeeds.map((at) => [
        number(at.speed, 'shaftSpeed'),
        number(at.forceRatio, 'ratio'),
        number(at.isolationEfficiency, 'share'),
        number(at.supportForce, 'force'),
        number(Math.max(...at.mountForces), 'force'),
      ]),
    )
  })

  it('names every input: sources, types, points, absorbers, requirements', () => {
    const texts = reportTexts(report).join('\n')
    const named = [
      ...project.sources,
      ...project.mounting.types,
      ...project.machine.points,
      ...project.absorbers,
    ].map((item) => item.name)
    for (const name of named) expect(texts).toContain(name)
    expect(tableOf(report, 'Requirements as given').rows).toHaveLength(project.requirements.length)
  })

  it('draws curves of one length with numbers, and each limit where it counts', () => {
    const figures = report.sections
      .flatMap((section) => section.blocks)
      .flatMap((block) => (block.kind === 'figure' ? [block.figure] : []))
    expect(figures.length).toBeGreaterThan(3)
    for (const { series } of figures) {
      expect(series.length).toBeGreaterThan(0)
      for (const { x, y } of series) {
        expect(y).toHaveLength(x.length)
        expect(x.every((value) => Number.isFinite(value))).toBe(true)
        expect(y.every((value) => value === null || Number.isFinite(value))).toBe(true)
      }
    }
    const againstSpeed = figures.filter((figure) => !figure.id.startsWith('run-up'))
    expect(againstSpeed.flatMap((figure) => figure.limits).length).toBe(
      project.requirements.filter((requirement) =>
        ['isolation', 'transmittedForce', 'vibrationVelocity'].includes(requirement.kind),
      ).length,
    )
  })

  it('is the same whenever it is built', () => {
    expect(buildReport(project, evaluate(project), { madeAt: '2031-05-04' })).toEqual(report)
  })
})

describe('report of an unfinished project', () => {
  it('says of a blank project that nothing is known', () => {
    const project = blankProject()
    const report = buildReport(project, evaluate(project))
    const texts = reportTexts(report)
    for (const text of texts) expect(text).not.toMatch(NONSENSE)
    expect(texts.join('\n')).toContain('not known')
    expect(report.sections.map((section) => section.id)).toEqual(
      expect.arrayContaining(['job', 'verdicts', 'inputs', 'results', 'methods', 'cautions', 'checksum']),
    )
  })

  it('survives the loss of any one input', () => {
    const places = demoProjects().flatMap(({ project }) =>
      nullablePlaces(project).map((path) => ({ project, path })),
    )
    expect(places.length).toBeGreaterThan(40)
    fc.assert(
      fc.property(fc.constantFrom(...places), ({ project, path }) => {
        const poorer = without(project, path)
        for (const text of reportTexts(buildReport(poorer, evaluate(poorer, { sweepPoints: 60 })))) {
          expect(text, path.join('.')).not.toMatch(NONSENSE)
        }
      }),
      { numRuns: 60 },
    )
  })
})

/** Keys whose value the schema lets a draft lack. */
const NULLABLE = new Set([
  'runningSpeed',
  'lowestSpeed',
  'highestSpeed',
  'chartSpeed',
  'unbalance',
  'rotorMass',
  'eccentricity',
  'grade',
  'serviceSpeed',
  'amplitude',
  'referenceSpeed',
  'ratedLoad',
  'leastLoad',
  'deflectionLimit',
  'height',
  'price',
  'limit',
  'point',
  'mass',
  'lowest',
  'highest',
  'strokeLimit',
])
type Path = readonly (string | number)[]

function nullablePlaces(value: unknown, path: Path = []): readonly Path[] {
  if (typeof value !== 'object' || value === null) return []
  const isPart = 'shape' in value // a part of the machine always has its mass
  return Object.entries(value).flatMap(([key, member]): readonly Path[] => {
    const here = [...path, Array.isArray(value) ? Number(key) : key]
    const lost = NULLABLE.has(key) && member !== null && !(isPart && key === 'mass') ? [here] : []
    return [...lost, ...nullablePlaces(member, here)]
  })
}

function without(project: Project, path: Path): Project {
  const copy = structuredClone(project)
  let at = copy as unknown as Record<string | number, unknown> // walked by the path found in it
  for (const key of path.slice(0, -1)) at = at[key] as Record<string | number, unknown>
  at[path.at(-1) ?? ''] = null
  return copy
}
