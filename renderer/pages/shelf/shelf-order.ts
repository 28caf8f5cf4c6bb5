import type { ShelfRow } from '../../../electron/api/contract.ts'

export const SHELF_COLUMNS = [
  'name',
  'site',
  'mass',
  'runningSpeed',
  'mountCount',
  'absorberCount',
  'changedAt',
] as const
export type ShelfColumn = (typeof SHELF_COLUMNS)[number]

export interface ShelfOrder {
  readonly column: ShelfColumn
  readonly rising: boolean
}

/** Rows in the order of one column; what is not known goes last whichever way it is sorted. */
export function sortRows(rows: readonly ShelfRow[], order: ShelfOrder): readonly ShelfRow[] {
  const sign = order.rising ? 1 : -1
  return rows.toSorted((a, b) => {
    const [first, second] = [a[order.column], b[order.column]]
    if (first === second) return a.name.localeCompare(b.name)
    if (first === null || first === '') return 1
    if (second === null || second === '') return -1
    if (typeof first === 'number' && typeof second === 'number') return sign * (first - second)
    return sign * String(first).localeCompare(String(second), undefined, { numeric: true })
  })
}

/** A first click on a column sorts it the way one most likely wants it; the next one turns it round. */
export function nextOrder(order: ShelfOrder, column: ShelfColumn): ShelfOrder {
  if (order.column === column) return { column, rising: !order.rising }
  return { column, rising: column === 'name' || column === 'site' }
}

/** Tags of these projects, the most used first. */
export function tagsOf(rows: readonly ShelfRow[]): readonly string[] {
  const counts = new Map<string, number>()
  for (const tag of rows.flatMap((row) => row.tags)) counts.set(tag, (counts.get(tag) ?? 0) + 1)
  return [...counts.entries()].toSorted(([a, m], [b, n]) => n - m || a.localeCompare(b)).map(([tag]) => tag)
}

/** `pump, one speed,` as typed becomes two tags, each once. */
export function parseTags(text: string): string[] {
  const tags = text
    .split(',')
    .map((tag) => tag.trim().replace(/\s+/g, ' ').slice(0, 60))
    .filter((tag) => tag !== '')
  return [...new Set(tags)].slice(0, 50)
}
