import type { Report, ReportTable } from '../../../core/report/report.ts'

/** Every word and number of a report that a person reads; curves are left out. */
export function reportTexts(report: Report): readonly string[] {
  const blocks = report.sections.flatMap((section) => section.blocks)
  return [
    report.title,
    ...report.titleBlock.flatMap((fact) => [fact.label, fact.value]),
    ...report.sections.map((section) => section.heading),
    ...blocks.flatMap((block): readonly string[] => {
      switch (block.kind) {
        case 'heading':
        case 'paragraph':
          return [block.text]
        case 'facts':
          return block.rows.flatMap((fact) => [fact.label, fact.value])
        case 'table':
          return [block.caption, ...block.columns.flatMap((at) => [at.label, at.unit]), ...block.rows.flat()]
        case 'figure': {
          const { title, description, x, y, series, limits, marks } = block.figure
          const labels = [...series, ...limits, ...marks].map((item) => item.label)
          return [title, description, x.label, x.unit, y.label, y.unit, ...labels]
        }
        case 'cautions':
          return block.items.flatMap((item) => [item.heading, item.text])
        case 'sources':
          return block.items.flatMap((item) => [item.what, item.how, item.source])
      }
    }),
  ]
}

export function tableOf(report: Report, caption: string): ReportTable {
  const table = report.sections
    .flatMap((section) => section.blocks)
    .find((block) => block.kind === 'table' && block.caption.startsWith(caption))
  if (table?.kind !== 'table') throw new Error(`no table ${caption}`)
  return table
}

/** What must never be read in a report. */
export const NONSENSE = /NaN|undefined|null|Infinity|\[object/
