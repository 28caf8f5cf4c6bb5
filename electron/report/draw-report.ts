import { createRequire } from 'node:module'
import type * as PdfMakeModule from 'pdfmake'
import type { Content, CustomTableLayout, TDocumentDefinitions } from 'pdfmake/interfaces'
import { evaluate } from '../../core/evaluate.ts'
import type { Project } from '../../core/project/project.ts'
import { buildReport } from '../../core/report/build-report.ts'
import type { Report, ReportSection } from '../../core/report/report.ts'
import { breakable, drawBlock } from './blocks.ts'
import { DANGER, FONT, INK, INK_SOFT, MARGIN, RULE, RULE_STRONG, TEXT_SIZE } from './paper.ts'

const require = createRequire(import.meta.url)

export interface DrawOptions {
  /** when the report is made; the same project and time give the same bytes */
  readonly madeAt?: Date
}

/** Evaluates a project and draws its calculation report. @returns the bytes of a PDF file */
export async function drawReport(project: Project, options: DrawOptions = {}): Promise<Uint8Array> {
  const madeAt = options.madeAt ?? new Date()
  const stamp = `${madeAt.toISOString().slice(0, 16).replace('T', ' ')} UTC`
  return drawPages(buildReport(project, evaluate(project), { madeAt: stamp }), madeAt)
}

const PAPER_WIDTHS = { A4: 595.28, Letter: 612 } as const

/** Draws a report as it stands. @param createdAt goes into the file's properties */
export async function drawPages(report: Report, createdAt: Date): Promise<Uint8Array> {
  const width = PAPER_WIDTHS[report.paper] - MARGIN.left - MARGIN.right
  const definition: TDocumentDefinitions = {
    pageSize: report.paper === 'A4' ? 'A4' : 'LETTER',
    pageMargins: [MARGIN.left, MARGIN.top, MARGIN.right, MARGIN.bottom],
    language: 'en',
    displayTitle: true,
    info: {
      title: `${report.title}: calculation report`,
      creator: 'Stillbed',
      producer: 'Stillbed',
      creationDate: createdAt,
    },
    defaultStyle: { font: FONT, fontSize: TEXT_SIZE, color: INK, lineHeight: 1.12 },
    styles: {
      title: { fontSize: 17, bold: true },
      heading: { fontSize: 12.5, bold: true },
      subheading: { fontSize: 10, bold: true, margin: [0, 6, 0, 3] },
      caption: { fontSize: 8.5, bold: true, margin: [0, 1, 0, 1] },
      tableHead: { bold: true },
    },
    header: (page) => (page === 1 ? null : pageHead(report)),
    footer: (page, pages) => pageFoot(report, page, pages),
    content: [
      titleBlock(report),
      ...report.sections.flatMap((section, index) => drawSection(section, index + 1, width)),
    ],
    // a heading at a page's end goes over with what it heads
    pageBreakBefore: (node, { getFollowingNodesOnPage }) =>
      node.headlineLevel !== undefined && getFollowingNodesOnPage().length === 0,
  }
  return new Uint8Array(await pdfmake().createPdf(definition).getBuffer())
}

type PdfMake = typeof PdfMakeModule

/** The library keeps one set of settings; it may read its fonts and nothing else. */
function pdfmake(): PdfMake {
  const library = require('pdfmake') as PdfMake // its types describe this very export
  const fonts = require('pdfmake/fonts/Roboto.js') as Record<string, Record<string, string>> // by weight, paths
  const files = new Set(Object.values(fonts).flatMap((weights) => Object.values(weights)))
  library.setFonts(fonts)
  library.setTableLayouts(LAYOUTS)
  library.setUrlAccessPolicy(() => false)
  library.setLocalAccessPolicy((path) => files.has(path))
  return library
}

const LAYOUTS: Record<string, CustomTableLayout> = {
  facts: {
    hLineWidth: (row, { table }) => (row === 0 || row === table.body.length ? 0.6 : 0.3),
    vLineWidth: () => 0,
    hLineColor: () => RULE,
    paddingLeft: () => 2,
    paddingRight: () => 2,
    paddingTop: () => 1.6,
    paddingBottom: () => 1.2,
  },
  data: {
    hLineWidth: (row, { table }) => (row <= 2 || row === table.body.length ? 0.7 : 0.3),
    vLineWidth: () => 0,
    hLineColor: (row, { table }) => (row <= 2 || row === table.body.length ? RULE_STRONG : RULE),
    paddingLeft: () => 3,
    paddingRight: () => 3,
    paddingTop: () => 1.6,
    paddingBottom: () => 1.2,
  },
  caution: {
    hLineWidth: () => 0,
    vLineWidth: (column) => (column === 0 ? 2.2 : 0),
    vLineColor: () => DANGER,
    paddingLeft: () => 7,
    paddingRight: () => 4,
    paddingTop: () => 1.5,
    paddingBottom: () => 1.5,
  },
  titleBlock: {
    hLineWidth: () => 0.8,
    vLineWidth: () => 0.8,
    hLineColor: () => RULE_STRONG,
    vLineColor: () => RULE_STRONG,
    paddingLeft: () => 8,
    paddingRight: () => 8,
    paddingTop: () => 6,
    paddingBottom: () => 6,
  },
  plain: {
    hLineWidth: () => 0,
    vLineWidth: () => 0,
    paddingLeft: () => 0,
    paddingRight: () => 8,
    paddingTop: () => 0.8,
    paddingBottom: () => 0.8,
  },
}

function titleBlock(report: Report): Content {
  return {
    table: {
      widths: ['*', 250],
      body: [
        [
          {
            stack: [
              { text: 'Calculation report', color: INK_SOFT },
              { text: breakable(report.title, 8), style: 'title', margin: [0, 4, 0, 4] },
              { text: 'Mounting and absorbers of a machine', color: INK_SOFT },
            ],
          },
          {
            table: {
              widths: [92, '*'],
              body: report.titleBlock.map(({ label, value }) => [
                { text: label, color: INK_SOFT },
                { text: breakable(value) },
              ]),
            },
            layout: 'plain',
            fontSize: 8,
          },
        ],
      ],
    },
    layout: 'titleBlock',
    margin: [0, -14, 0, 12],
  }
}

const LONGEST_HEAD = 70

function shortened(text: string): string {
  return text.length > LONGEST_HEAD ? `${text.slice(0, LONGEST_HEAD - 1)}…` : text
}

function pageHead(report: Report): Content {
  return {
    margin: [MARGIN.left, 26, MARGIN.right, 0],
    columns: [
      { text: shortened(report.title), bold: true, fontSize: 8 },
      { text: 'Calculation report', alignment: 'right', color: INK_SOFT, fontSize: 8 },
    ],
  }
}

function pageFoot(report: Report, page: number, pages: number): Content {
  return {
    margin: [MARGIN.left, 14, MARGIN.right, 0],
    columns: [
      {
        text: `Inputs ${report.checksum.slice(0, 16)}…${report.madeAt === null ? '' : `   made ${report.madeAt}`}`,
        color: INK_SOFT,
        fontSize: 7.5,
      },
      { text: `Page ${page} of ${pages}`, alignment: 'right', fontSize: 8 },
    ],
  }
}

/** Headings stay with the first block below them; short blocks stay whole. */
function drawSection(section: ReportSection, number: number, width: number): readonly Content[] {
  const heading: Content = {
    text: `${number}  ${section.heading}`,
    style: 'heading',
    headlineLevel: 1,
    margin: [0, 10, 0, 5],
  }
  const content: Content[] = []
  let waiting: Content[] = [heading]
  for (const block of section.blocks) {
    const drawn = drawBlock(block, width)
    if (block.kind === 'heading') {
      waiting.push(drawn.content)
    } else if (drawn.long) {
      content.push(...waiting, drawn.content)
      waiting = []
    } else {
      content.push({ stack: [...waiting, drawn.content], unbreakable: true })
      waiting = []
    }
  }
  return [...content, ...waiting]
}
