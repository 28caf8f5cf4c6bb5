import { formatQuantity } from '../../core/units/format.ts'
import type { UnitSystem } from '../../core/units/dimensions.ts'
import type { ChartAxis, ChartLimit, ChartSeries } from './chart-types.ts'
import { peakWithin } from './sample.ts'

/** What the chart shows, in words for those who do not see it. */
export function chartSummary(
  title: string,
  x: ChartAxis,
  y: ChartAxis,
  series: readonly ChartSeries[],
  limits: readonly ChartLimit[],
  units: UnitSystem,
): string {
  const curves = series.filter((entry) => entry.x.length > 0)
  const first = curves[0]
  if (!first) return `${title}: nothing to draw yet.`
  const from = formatQuantity(first.x[0], x.dimension, units)
  const to = formatQuantity(first.x[first.x.length - 1], x.dimension, units)
  const peaks = curves.map((entry) => {
    const peak = peakWithin(entry.x, entry.y, -Infinity, Infinity)
    if (!peak) return `${entry.label}: no value`
    return `${entry.label}: highest ${formatQuantity(peak.y, y.dimension, units)} at ${formatQuantity(peak.x, x.dimension, units)}`
  })
  const bounds = limits.map((limit) => limit.label)
  return [`${title}: ${y.title} against ${x.title}, ${from} to ${to}`, ...peaks, ...bounds].join('. ') + '.'
}
