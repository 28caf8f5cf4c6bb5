import { valueAt } from './sample.ts'

export interface DataColumn {
  /** quantity and unit, such as `Support force [N]` */
  readonly heading: string
  readonly x: Float64Array
  readonly y: Float64Array
  /** base unit over shown unit: shown = value / factor */
  readonly factor: number
}

/**
 * Curves as tab-separated text for a spreadsheet: one column of x, one per curve, a point as decimal
 * mark. Every computed point of every curve has its row; a curve computed elsewhere is read off the
 * straight line between its neighbours, and is empty outside its range.
 */
export function toTabSeparated(xHeading: string, xFactor: number, columns: readonly DataColumn[]): string {
  const places = Float64Array.from(new Set(columns.flatMap((column) => Array.from(column.x)))).sort()
  const lines = [[xHeading, ...columns.map((column) => column.heading)].map(cleanHeading).join('\t')]
  for (const place of places) {
    const cells = columns.map((column) => {
      const value = valueAt(column.x, column.y, place)
      return value === null || !Number.isFinite(value) ? '' : plainNumber(value / column.factor)
    })
    lines.push([plainNumber(place / xFactor), ...cells].join('\t'))
  }
  return lines.join('\n') + '\n'
}

/** Twelve digits: nothing a person could use is lost, binary noise is. */
function plainNumber(value: number): string {
  return String(Number(value.toPrecision(12)))
}

function cleanHeading(text: string): string {
  return text.replace(/[\t\r\n]+/g, ' ')
}
