import type { Dimension } from '../units/dimensions.ts'
import { editableNumber, unitLabel } from '../units/format.ts'
import type { ReportTable, RowMark } from './report.ts'
import type { Writer } from './writer.ts'

/** Text as it stands, an SI number in the dimension of its column, or null: not known. */
export type Cell = string | number | null

export interface RawColumn {
  readonly label: string
  /** null for text */
  readonly dimension: Dimension | null
  readonly digits?: number
  /** text that holds a number and its unit is set to the right, like a number */
  readonly figures?: true
}

/** A table before it is formatted: the page, the CSV file and the tests read the same numbers. */
export interface RawTable {
  readonly caption: string
  readonly columns: readonly RawColumn[]
  readonly rows: readonly (readonly Cell[])[]
  readonly marks?: readonly RowMark[]
}

export const textColumn = (label: string): RawColumn => ({ label, dimension: null })
export const figuresColumn = (label: string): RawColumn => ({ label, dimension: null, figures: true })
export const column = (label: string, dimension: Dimension, digits = 4): RawColumn => ({
  label,
  dimension,
  digits,
})

export function writeTable(raw: RawTable, writer: Writer): ReportTable {
  return {
    kind: 'table',
    caption: raw.caption,
    columns: raw.columns.map(({ label, dimension, figures }) => ({
      label,
      unit: dimension === null ? '' : writer.unit(dimension),
      align: dimension === null && !figures ? 'start' : 'end',
    })),
    rows: raw.rows.map((row) =>
      row.map((cell, index) => {
        const { dimension, digits } = raw.columns[index] ?? textColumn('')
        return typeof cell === 'string' ? cell : writer.number(cell, dimension ?? 'ratio', digits ?? 4)
      }),
    ),
    ...(raw.marks ? { marks: raw.marks } : {}),
  }
}

/**
 * The table as comma-separated values (RFC 4180): a header with units, numbers to twelve digits,
 * an empty field where a value is not known.
 */
export function writeCsv(raw: RawTable, writer: Writer): string {
  const header = raw.columns.map(({ label, dimension }) => {
    const unit = dimension === null ? '' : unitLabel(dimension, writer.system)
    return csvText(unit === '' ? label : `${label} [${unit}]`)
  })
  const rows = raw.rows.map((row) =>
    row.map((cell, index) => {
      if (typeof cell === 'string') return csvText(cell)
      const dimension = raw.columns[index]?.dimension ?? 'ratio'
      return cell === null ? '' : editableNumber(cell, dimension, writer.system)
    }),
  )
  return [header, ...rows].map((fields) => `${fields.join(',')}\r\n`).join('')
}

/** Quoted where it must be. A text that a spreadsheet would run as a formula gets an apostrophe first. */
function csvText(text: string): string {
  const safe = /^(?:[=+@\t\r]|-(?![\d.]))/.test(text) ? `'${text}` : text
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe
}
