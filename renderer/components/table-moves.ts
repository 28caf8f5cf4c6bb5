import type { Block, Column } from './table-columns.ts'

export interface Cell {
  readonly row: number
  readonly column: number
}

export const ARROWS: Readonly<Record<string, readonly [down: number, right: number]>> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
}

/** The nearest cell in a direction that can be typed into; the cell itself at the table's edge. */
export function neighbour<R>(
  from: Cell,
  [down, right]: readonly [number, number],
  rows: number,
  columns: readonly Column<R>[],
): Cell {
  const row = from.row + down
  let column = from.column + right
  while (right !== 0 && columns[column]?.kind === 'value') column += right
  const inside = row >= 0 && row < rows && column >= 0 && column < columns.length
  return inside ? { row, column } : from
}

/** The block from its fixed corner with the opposite one moved by a step. */
export function extendBlock(
  block: Block | null,
  anchor: Cell,
  [down, right]: readonly [number, number],
  rows: number,
  columns: number,
): Block {
  const old = block ?? { top: anchor.row, bottom: anchor.row, left: anchor.column, right: anchor.column }
  const farRow = old.top === anchor.row ? old.bottom : old.top
  const farColumn = old.left === anchor.column ? old.right : old.left
  const row = Math.min(Math.max(farRow + down, 0), rows - 1)
  const column = Math.min(Math.max(farColumn + right, 0), columns - 1)
  return {
    top: Math.min(anchor.row, row),
    bottom: Math.max(anchor.row, row),
    left: Math.min(anchor.column, column),
    right: Math.max(anchor.column, column),
  }
}

export function isInBlock(block: Block | null, row: number, column: number): boolean {
  if (block === null) return false
  return row >= block.top && row <= block.bottom && column >= block.left && column <= block.right
}

export function isLarge(block: Block | null): block is Block {
  return block !== null && (block.top !== block.bottom || block.left !== block.right)
}

/** Sideways arrows leave a cell only from the end of its text, or while all of it is selected. */
export function leavesCell(target: EventTarget | null, right: number): boolean {
  if (right === 0 || !(target instanceof HTMLInputElement)) return true
  const { selectionStart: start, selectionEnd: end, value } = target
  if (start === 0 && end === value.length) return true
  return start === end && (right < 0 ? start === 0 : end === value.length)
}

/** Headings over neighbouring columns of one group. */
export function groupColumns<R>(columns: readonly Column<R>[]): { title: string; span: number }[] {
  const groups: { title: string; span: number }[] = []
  for (const column of columns) {
    const last = groups.at(-1)
    if (last && column.group !== undefined && last.title === column.group) last.span += 1
    else groups.push({ title: column.group ?? '', span: 1 })
  }
  return groups
}
