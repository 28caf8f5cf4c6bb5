import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { blankProject } from '../../../core/project/create.ts'
import type { Project } from '../../../core/project/project.ts'
import { buildReport } from '../../../core/report/build-report.ts'
import { drawPages, drawReport } from '../../../electron/report/draw-report.ts'
import { demoProjects, withAbsorbers } from '../../core/demo/demo-files.ts'
import { NONSENSE, reportTexts } from '../../core/report/report-text.ts'
import { pdfPages, squeezed } from './pdf-text.ts'

const MADE_AT = new Date('2031-05-04T09:30:00Z')
const A4 = [595.28, 841.89] // ISO 216, in points of 1/72 in
const LETTER = [612, 792]

const demos = demoProjects()

describe.each(demos)('printed report of $file', ({ project }) => {
  it('carries every word and number of the report, and no nonsense', async () => {
    const complete = withAbsorbers(project)
    const pages = await pdfPages(await drawReport(complete, { madeAt: MADE_AT }))
    const printed = squeezed(pages.map((page) => page.text).join(' '))
    const report = buildReport(complete, evaluate(complete), { madeAt: '2031-05-04 09:30 UTC' })
    const words = reportTexts(report).flatMap((text) => text.split(/\s+/))
    expect(words.filter((word) => !printed.includes(squeezed(word)))).toEqual([])
    expect(NONSENSE.exec(printed)?.[0]).toBeUndefined()
    expect(printed.includes('\ufffd')).toBe(false)
  })

  it('numbers its pages on the paper of its units', async () => {
    const pages = await pdfPages(await drawReport(project, { madeAt: MADE_AT }))
    const [width, height] = project.units === 'US' ? LETTER : A4
    pages.forEach((page, index) => {
      expect(page.text).toContain(`Page ${index + 1} of ${pages.length}`)
      expect(page.width).toBeCloseTo(width ?? NaN, 1)
      expect(page.height).toBeCloseTo(height ?? NaN, 1)
      expect(page.text.length, `page ${index + 1} is all but empty`).toBeGreaterThan(150)
    })
  })
})

describe('printed report', () => {
  const [first] = demos
  if (!first) throw new Error('there is a demonstration')
  const { project } = first

  it('is the same, byte for byte, for one project and time', async () => {
    const once = await drawReport(project, { madeAt: MADE_AT })
    const again = await drawReport(structuredClone(project), { madeAt: MADE_AT })
    expect(Buffer.compare(once, again)).toBe(0)
    const later = await drawReport(project, { madeAt: new Date('2031-05-05T09:30:00Z') })
    expect(Buffer.compare(once, later)).not.toBe(0)
  })

  it('says that nothing is known of a blank project', async () => {
    const pages = await pdfPages(await drawReport(blankProject(), { madeAt: MADE_AT }))
    const printed = pages.map((page) => page.text).join(' ')
    expect(printed.includes('not known')).toBe(true)
    expect(NONSENSE.exec(printed)?.[0]).toBeUndefined()
  })

  it('repeats the head of a table that runs over pages and leaves no heading alone at a page’s end', async () => {
    const [type] = project.mounting.types
    const many: Project = {
      ...project,
      mounting: {
        ...project.mounting,
        placed: Array.from({ length: 120 }, (_, index) => ({
          id: `m${index}`,
          name: `M${index + 1}`,
          type: type?.id ?? '',
          position: [0.01 * index, index % 2 === 0 ? -0.3 : 0.3, 0],
          tilt: null,
          shim: 0,
          share: null,
        })),
      },
    }
    const report = buildReport(many, evaluate(many, { sweepPoints: 60 }))
    const pages = await pdfPages(await drawPages(report, MADE_AT))
    expect(
      pages.filter((page) => page.text.includes('Mount schedule') && page.text.includes('M1')).length,
    ).toBeGreaterThan(1)
    for (const { heading } of report.sections) {
      for (const page of pages) {
        const body = page.text.replace(/ Inputs [0-9a-f]{16}….*$/, '')
        expect(body.trimEnd().endsWith(heading), `${heading} ends a page`).toBe(false)
      }
    }
  })

  it('keeps a crowded project on its pages', async () => {
    const long = 'W'.repeat(180)
    const crowded: Project = {
      ...withAbsorbers(project),
      job: { ...project.job, name: long, notes: `${long}${long}`, site: long },
      sources: Array.from({ length: 30 }, (_, index) => ({
        kind: 'harmonic',
        id: `s${index}`,
        name: long,
        enabled: true,
        position: null,
        load: { kind: 'force', direction: [0, 0, 1], amplitude: 10 },
        order: 0.5 * (index + 1),
        dependence: { on: 'constant' },
        phase: 0,
      })),
      absorbers: Array.from({ length: 4 }, (_, index) => ({
        ...(withAbsorbers(project).absorbers[0] as Project['absorbers'][number]), // it has one
        id: `a${index}`,
        name: `${index} ${long}`,
      })),
    }
    const report = buildReport(crowded, evaluate(crowded, { sweepPoints: 60 }))
    const pages = await pdfPages(await drawPages(report, MADE_AT))
    for (const page of pages) expect(page.rightmost).toBeLessThanOrEqual(page.width - 30)
  })

  it('takes names in other alphabets and markup as plain words', async () => {
    const odd: Project = {
      ...project,
      job: { ...project.job, name: 'Łódź <b>Ω</b> & "Жар" {page}' },
      machine: {
        ...project.machine,
        points: project.machine.points.map((point) => ({ ...point, name: `${point.name} </text> & <svg>` })),
      },
    }
    const pages = await pdfPages(await drawReport(odd, { madeAt: MADE_AT }))
    const printed = squeezed(pages.map((page) => page.text).join(' '))
    expect(printed.includes(squeezed('Łódź <b>Ω</b> & "Жар" {page}'))).toBe(true)
    expect(printed.includes('</text>&<svg>')).toBe(true)
  })
})
