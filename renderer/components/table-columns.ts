import { InputError } from '../../core/errors.ts'
import type { Project } from '../../core/project/project.ts'
import type { Dimension, UnitSystem } from '../../core/units/dimensions.ts'
import { editableNumber } from '../../core/units/format.ts'
import { parseQuantity } from '../../core/units/parse.ts'

interface Heading {
  readonly key: string
  readonly title: string
  /** said in full where the title is short */
  readonly hint?: string
  /** heading over this column and its neighbours of the same group */
  readonly group?: string
  /** smallest width of the column, such as `5rem` */
  readonly width?: string
  /** path of the cell's value within its row, such as `position[0]` */
  readonly path?: string
}
export interface QuantityColumn<R> extends Heading {
  readonly kind: 'quantity'
  readonly dimension: Dimension
  /** null: not given; undefined: the row has no such value */
  readonly get: (row: R) => number | null | undefined
  readonly set: (draft: Project, index: number, value: number | null) => void
  readonly optional?: boolean
  readonly placeholder?: string
}
export interface TextColumn<R> extends Heading {
  readonly kind: 'text'
  readonly get: (row: R) => string
  readonly set: (draft: Project, index: number, value: string) => void
}
export interface ChoiceColumn<R> extends Heading {
  readonly kind: 'choice'
  readonly options: readonly { readonly value: string; readonly label: string }[]
  /** undefined: the row has no such value */
  readonly get: (row: R) => string | undefined
  readonly set: (draft: Project, index: number, value: string) => void
}
/** Computed, to be read only. */
export interface ValueColumn<R> extends Heading {
  readonly kind: 'value'
  readonly text: (row: R) => string
  readonly numeric?: boolean
  readonly dimension?: Dimension
  /** hatched: beyond what is allowed */
  readonly refused?: (row: R) => boolean
}
export type Column<R> = QuantityColumn<R> | TextColumn<R> | ChoiceColumn<R> | ValueColumn<R>

export interface Block {
  readonly top: number
  readonly left: number
  readonly bottom: number
  readonly right: number
}

/** The cells as text with tabs and line ends, as spreadsheets exchange them. */
export function copyBlock<R>(
  rows: readonly R[],
  columns: readonly Column<R>[],
  block: Block,
  units: UnitSystem,
): string {
  return rows
    .slice(block.top, block.bottom + 1)
    .map((row) =>
      columns
        .slice(block.left, block.right + 1)
        .map((column) => cellText(row, column, units).replace(/[\t\r\n]+/g, ' '))
        .join('\t'),
    )
    .join('\n')
}

function cellText<R>(row: R, column: Column<R>, units: UnitSystem): string {
  if (column.kind === 'text') return column.get(row)
  if (column.kind === 'value') return column.text(row)
  if (column.kind === 'choice') {
    const value = column.get(row)
    return column.options.find((option) => option.value === value)?.label ?? ''
  }
  const value = column.get(row)
  return value === null || value === undefined ? '' : editableNumber(value, column.dimension, units)
}

/** A block as it was copied from a spreadsheet; null when it is a single value. */
export function parseBlock(text: string): readonly (readonly string[])[] | null {
  const lines = text.replace(/\r\n?/g, '\n').replace(/\n$/, '').split('\n')
  const cells = lines.map((line) => line.split('\t').map((cell) => cell.trim()))
  return cells.length === 1 && cells[0]?.length === 1 ? null : cells
}

/**
 * Writes one pasted text into a cell of the draft.
 * @returns whether the cell took it; computed cells and cells without a value take nothing
 * @throws InputError when it cannot be read as the column's quantity or choice
 */
export function writeCell<R>(
  draft: Project,
  index: number,
  row: R | undefined,
  column: Column<R>,
  text: string,
  units: UnitSystem,
): boolean {
  if (column.kind === 'value') return false
  if (column.kind === 'text') {
    column.set(draft, index, text)
    return true
  }
  if (row !== undefined && column.get(row) === undefined) return false
  if (column.kind === 'choice') {
    const wanted = text.toLowerCase()
    const option = column.options.find(({ value, label }) => [value, label.toLowerCase()].includes(wanted))
    if (option) column.set(draft, index, option.value)
    return option !== undefined
  }
  if (text === '') {
    if (column.optional) column.set(draft, index, null)
    return column.optional === true
  }
  column.set(draft, index, parseQuantity(text, column.dimension, units, column.title))
  return true
}

/**
 * Writes a pasted block into the draft from one cell on.
 * @param add appends a row for lines beyond the last; without it they are cut off
 * @returns what was not taken and why, in words
 */
export function writeBlock<R>(
  draft: Project,
  rows: readonly R[],
  columns: readonly Column<R>[],
  cells: readonly (readonly string[])[],
  from: { readonly row: number; readonly column: number },
  units: UnitSystem,
  add?: (draft: Project) => void,
): readonly string[] {
  const refused: string[] = []
  for (const [down, line] of cells.entries()) {
    const index = from.row + down
    if (index >= rows.length) {
      if (!add) break
      add(draft)
    }
    for (const [right, text] of line.entries()) {
      const column = columns[from.column + right]
      if (!column) break
      try {
        writeCell(draft, index, rows[index], column, text, units)
      } catch (error) {
        if (!(error instanceof InputError)) throw error
        refused.push(`“${text}” in ${column.title}: ${error.allowed}`)
      }
    }
  }
  return refused
}
