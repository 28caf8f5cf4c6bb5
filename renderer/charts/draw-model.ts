import { unitLabel } from '../../core/units/format.ts'
import { factorOf } from '../../core/units/parse.ts'
import type { UnitSystem } from '../../core/units/dimensions.ts'
import type { ChartAxis, ChartLimit, ChartSeries, ScaleKind } from './chart-types.ts'
import { toDecibels } from './decibels.ts'
import { valueRange, type AxisRange } from './ranges.ts'
import { thin, type Span } from './thin.ts'
import { withUnit } from './ticks.ts'

export type ValueKind = ScaleKind | 'dB'

/** What is on screen after zooming, in shown units. */
export interface View {
  readonly x: AxisRange
  readonly y: AxisRange
}

export interface DrawInput {
  readonly series: readonly ChartSeries[]
  readonly x: ChartAxis
  readonly y: ChartAxis
  readonly yKind: ValueKind
  readonly units: UnitSystem
  readonly limits: readonly ChartLimit[]
  readonly hidden: ReadonlySet<string>
  readonly view: View | null
  /** columns into which the width is cut for thinning */
  readonly buckets: number
}

export interface DrawnAxis extends AxisRange {
  readonly title: string
  readonly kind: ValueKind
  /** SI to shown; NaN where it cannot be shown (no level of zero) */
  readonly shown: (value: number) => number
}

export interface DrawnPoint {
  readonly x: number
  readonly y: number
}

export interface DrawnCurve {
  readonly series: ChartSeries
  readonly points: readonly DrawnPoint[]
}

/** The chart in shown units, thinned to what the width can show. */
export interface DrawModel {
  readonly x: DrawnAxis
  readonly y: DrawnAxis
  readonly curves: readonly DrawnCurve[]
}

export function drawModel(input: DrawInput): DrawModel {
  const x = converter(input.x, input.x.scale ?? 'linear', input.units)
  const y = converter(input.y, input.yKind, input.units)
  const visible = input.series.filter((series) => !input.hidden.has(series.id))
  const full = horizontalSpan(visible.length > 0 ? visible : input.series, input.x)
  const xFactor = factorOf(input.x.dimension, input.units)
  const span = input.view ? { from: input.view.x.min * xFactor, to: input.view.x.max * xFactor } : full
  const curves = visible.map((series) => ({
    series,
    points: shownPoints(series, span, input.x.scale ?? 'linear', input.buckets, x.shown, y.shown),
  }))
  const range = input.view?.y ?? fixed(input.y, y.shown) ?? rangeOfCurves(curves, input, y.shown)
  return {
    x: { ...x, min: x.shown(span.from), max: x.shown(span.to) },
    y: { ...y, ...range },
    curves,
  }
}

function shownPoints(
  series: ChartSeries,
  span: Span,
  scale: ScaleKind,
  buckets: number,
  shownX: (value: number) => number,
  shownY: (value: number) => number,
): DrawnPoint[] {
  const points: DrawnPoint[] = []
  for (const index of thin(series.x, series.y, buckets, span, scale)) {
    points.push({ x: shownX(series.x[index] ?? NaN), y: shownY(series.y[index] ?? NaN) })
  }
  return points
}

function converter(axis: ChartAxis, kind: ValueKind, units: UnitSystem) {
  const factor = factorOf(axis.dimension, units)
  const reference = axis.decibelReference ?? 1
  const title =
    kind === 'dB'
      ? withUnit(axis.title, `dB ${axis.decibelLabel ?? ''}`.trim())
      : withUnit(axis.title, unitLabel(axis.dimension, units))
  const shown = (value: number): number => {
    if (kind === 'dB') return toDecibels(value, reference) ?? NaN
    if (kind === 'log' && !(value > 0)) return NaN
    return value / factor
  }
  return { title, kind, shown }
}

function horizontalSpan(series: readonly ChartSeries[], axis: ChartAxis): Span {
  let from = axis.min ?? Infinity
  let to = axis.max ?? -Infinity
  for (const { x } of series) {
    const first = x[0]
    const last = x[x.length - 1]
    if (axis.min === undefined && first !== undefined) from = Math.min(from, first)
    if (axis.max === undefined && last !== undefined) to = Math.max(to, last)
  }
  return to > from ? { from, to } : { from: 0, to: 1 }
}

function fixed(axis: ChartAxis, shown: (value: number) => number): AxisRange | null {
  if (axis.min === undefined || axis.max === undefined) return null
  return { min: shown(axis.min), max: shown(axis.max) }
}

function rangeOfCurves(
  curves: readonly DrawnCurve[],
  input: DrawInput,
  shown: (value: number) => number,
): AxisRange {
  const values: number[] = []
  for (const curve of curves) for (const point of curve.points) values.push(point.y)
  const range = valueRange(
    values,
    input.limits.map((limit) => shown(limit.y)),
    input.yKind,
  )
  return {
    min: input.y.min === undefined ? range.min : shown(input.y.min),
    max: input.y.max === undefined ? range.max : shown(input.y.max),
  }
}
