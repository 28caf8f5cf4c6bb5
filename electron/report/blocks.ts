import type { Content, TableCell } from 'pdfmake/interfaces'
import type {
  Block,
  Caution,
  Fact,
  Figure,
  MethodNote,
  ReportTable,
  RowMark,
} from '../../core/report/report.ts'
import { figureSvg } from './figure-svg.ts'
import { DANGER, FILL_BAD, FILL_HEAD, FILL_NEAR, INK_SOFT, TABLE_SIZE } from './paper.ts'

/** A block of the report and whether it is too long to be kept on one page. */
export interface DrawnBlock {
  readonly content: Content
  readonly long: boolean
}

/** More rows than this may run over a page's end. */
const SHORT_TABLE = 14

export function drawBlock(block: Block, width: number): DrawnBlock {
  switch (block.kind) {
    case 'heading':
      return { content: { text: breakable(block.text), style: 'subheading' }, long: false }
    case 'paragraph':
      return { content: { text: breakable(block.text), margin: [0, 0, 0, 5] }, long: false }
    case 'facts':
      return { content: factTable(block.rows), long: block.rows.length > 22 }
    case 'table':
      return { content: dataTable(block), long: block.rows.length > SHORT_TABLE }
    case 'figure':
      return { content: drawFigure(block.figure, width), long: false }
    case 'cautions':
      return { content: { stack: block.items.map(drawCaution) }, long: true }
    case 'sources':
      return { content: sourceTable(block.items), long: true }
  }
}

function factTable(rows: readonly Fact[]): Content {
  return {
    table: {
      widths: [205, '*'],
      body: rows.map(({ label, value }) => [{ text: label, color: INK_SOFT }, { text: breakable(value) }]),
      dontBreakRows: true,
    },
    layout: 'facts',
    fontSize: TABLE_SIZE + 0.5,
    margin: [0, 0, 0, 7],
  }
}

/** The caption is the first header row, so that it is repeated with the header on every page. */
function dataTable(table: ReportTable): Content {
  const { columns } = table
  const header: TableCell[] = columns.map(({ label, unit, align }) => ({
    stack: [
      { text: label },
      ...(unit === '' ? [] : [{ text: `[${unit}]`, bold: false, color: INK_SOFT, noWrap: true }]),
    ],
    alignment: align === 'end' ? 'right' : 'left',
    style: 'tableHead',
    fillColor: FILL_HEAD,
  }))
  const caption: TableCell[] = [
    { text: table.caption, colSpan: columns.length, style: 'caption' },
    ...columns.slice(1).map(() => ({})),
  ]
  const body: TableCell[][] = table.rows.map((row, index) => {
    const mark = table.marks?.[index] ?? 'plain'
    return row.map((cell, at): TableCell => {
      const figures = columns[at]?.align === 'end'
      return {
        text: figures ? cell : breakable(cell),
        noWrap: figures, // a number stays with its unit
        alignment: figures ? 'right' : 'left',
        ...markLook(mark, at === row.length - 1),
      }
    })
  })
  return {
    table: {
      headerRows: 2,
      keepWithHeaderRows: 1,
      dontBreakRows: true,
      widths: columnWidths(table),
      body: [caption, header, ...body],
    },
    layout: 'data',
    fontSize: columns.length > 8 ? TABLE_SIZE - 0.7 : TABLE_SIZE,
    margin: [0, 2, 0, 9],
  }
}

/** Long text takes the room that is left, in the measure of what it holds; numbers take what they need. */
function columnWidths(table: ReportTable): (string | number)[] {
  const longest = table.columns.map((_, index) =>
    Math.max(...table.rows.map((row) => row[index]?.length ?? 0), 0),
  )
  return table.columns.map(({ align }, index) =>
    align === 'start' && (longest[index] ?? 0) > 22 ? '*' : 'auto',
  )
}

/** A word longer than this finds its line's end anywhere; ordinary words stay whole. */
const LONGEST_WORD = 24

/** Text in which overlong words may be broken after every `piece` characters. */
export function breakable(text: string, piece = 14): string {
  return text.replace(/\S+/g, (word) =>
    word.length <= LONGEST_WORD ? word : word.replace(new RegExp(`(.{${piece}})(?=.)`, 'gu'), '$1\u200b'),
  )
}

interface CellLook {
  readonly fillColor?: string
  readonly bold?: boolean
  readonly italics?: boolean
  readonly color?: string
}

function markLook(mark: RowMark, last: boolean): CellLook {
  switch (mark) {
    case 'bad':
      return { fillColor: FILL_BAD, ...(last ? { bold: true, color: DANGER } : {}) }
    case 'near':
      return { fillColor: FILL_NEAR, ...(last ? { bold: true } : {}) }
    case 'good':
      return last ? { bold: true } : {}
    case 'unknown':
    case 'off':
      return { italics: true, color: INK_SOFT }
    case 'plain':
      return {}
  }
}

/** Height over width: three figures fill a page. */
const FIGURE_HEIGHT = 0.36

function drawFigure(figure: Figure, width: number): Content {
  return {
    stack: [
      { text: figure.title, style: 'caption', margin: [0, 3, 0, 0] },
      { text: figure.description, color: INK_SOFT, fontSize: TABLE_SIZE, margin: [0, 0, 0, 3] },
      { svg: figureSvg(figure, { width, height: FIGURE_HEIGHT * width }), width },
    ],
    margin: [0, 0, 0, 6],
  }
}

function drawCaution({ heading, text }: Caution): Content {
  return {
    table: {
      widths: [96, '*'],
      body: [[{ text: heading, bold: true }, { text }]],
      dontBreakRows: true,
    },
    layout: 'caution',
    margin: [0, 0, 0, 4],
  }
}

function sourceTable(items: readonly MethodNote[]): Content {
  const head = ['Subject', 'How', 'Source'].map((text) => ({
    text,
    style: 'tableHead',
    fillColor: FILL_HEAD,
  }))
  return {
    table: {
      headerRows: 1,
      dontBreakRows: true,
      widths: [92, '*', 150],
      body: [head, ...items.map(({ what, how, source }) => [{ text: what, bold: true }, how, source])],
    },
    layout: 'data',
    fontSize: TABLE_SIZE,
    margin: [0, 2, 0, 9],
  }
}
