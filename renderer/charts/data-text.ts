import type { UnitSystem } from '../../core/units/dimensions.ts'
import { unitLabel } from '../../core/units/format.ts'
import { factorOf } from '../../core/units/parse.ts'
import type { ChartAxis, ChartSeries } from './chart-types.ts'
import { valueAt } from './sample.ts'
import { withUnit } from './ticks.ts'

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

/** The curves of a chart as text for a spreadsheet, in shown units. */
export function seriesText(
  x: ChartAxis,
  y: ChartAxis,
  series: readonly ChartSeries[],
  units: UnitSystem,
): string {
  const columns = series.map((entry) => ({
    heading: withUnit(`${y.title}, ${entry.label}`, unitLabel(y.dimension, units)),
    x: entry.x,
    y: entry.y,
    factor: factorOf(y.dimension, units),
  }))
  const heading = withUnit(x.title, unitLabel(x.dimension, units))
  return toTabSeparated(heading, factorOf(x.dimension, units), columns)
}

/** Twelve digits: nothing a person could use is lost, binary noise is. */
function plainNumber(value: number): string {
  return String(Number(value.toPrecision(12)))
}

function cleanHeading(text: string): string {
  return text.replace(/[\t\r\n]+/g, ' ')
}
