import type { ChartDataset, ChartOptions } from 'chart.js'
import { dashOf } from './dashes.ts'
import type { DrawModel, DrawnAxis, DrawnCurve, DrawnPoint } from './draw-model.ts'
import type { Palette } from './palette.ts'
import type { ChartSeries } from './chart-types.ts'
import { logGrid, logTicks, tickText } from './ticks.ts'

const FONT_SIZE = 12

export type CurveDataset = ChartDataset<'line', DrawnPoint[]>

export function inkOf(series: ChartSeries, palette: Palette): string {
  switch (series.role) {
    case 'pinned':
      return palette.faint
    case 'compare':
      return palette.soft
    case 'main':
    case 'points':
      return palette.curves[series.dash % palette.curves.length] ?? palette.ink
  }
}

export function weightOf(series: ChartSeries): number {
  return series.role === 'main' ? 1.9 : 1.4
}

/**
 * Lower numbers lie on top. Pinned lines lie behind those that follow the present
 * inputs; of coinciding curves the sparser dash lies over the fuller one, so that both are seen.
 */
function drawingOrder({ role, dash }: ChartSeries): number {
  if (role === 'points') return -100
  return (role === 'pinned' ? 100 : 0) - dash
}

export function datasetOf(curve: DrawnCurve, palette: Palette): CurveDataset {
  const { series } = curve
  const markers = series.role === 'points'
  return {
    data: [...curve.points],
    borderColor: inkOf(series, palette),
    borderDash: [...dashOf(series.dash)],
    borderWidth: weightOf(series),
    borderJoinStyle: 'round',
    showLine: !markers,
    pointRadius: markers ? 4 : 0,
    pointHitRadius: 0,
    pointBackgroundColor: palette.paper,
    pointBorderColor: palette.ink,
    pointBorderWidth: 1.5,
    order: drawingOrder(series),
  }
}

interface TickOwner {
  readonly min: number
  readonly max: number
}

/** The scale is asked as it stands, since zooming moves its ends without new options. */
function isLabelled(scale: TickOwner, value: number): boolean {
  return logTicks(scale.min, scale.max).includes(Number(value.toPrecision(3)))
}

export function axisOptions(axis: DrawnAxis, palette: Palette, across: boolean) {
  const log = axis.kind === 'log'
  return {
    type: log ? ('logarithmic' as const) : ('linear' as const),
    min: axis.min,
    max: axis.max,
    border: { color: palette.soft, width: 1 },
    grid: {
      color: (context: { scale: TickOwner; tick?: { value: number } }) =>
        log && isLabelled(context.scale, context.tick?.value ?? 0) ? palette.rule : palette.grid,
      tickLength: 4,
    },
    title: {
      display: true,
      text: axis.title,
      color: palette.ink,
      font: { size: FONT_SIZE, family: palette.font },
      padding: across ? { top: 2, bottom: 0 } : { top: 0, bottom: 2 },
    },
    ticks: {
      color: palette.soft,
      font: { size: FONT_SIZE, family: palette.font },
      maxRotation: 0,
      autoSkip: !log,
      autoSkipPadding: 14,
      maxTicksLimit: across ? 11 : 8,
      includeBounds: false,
      callback(this: TickOwner, value: number | string, _index: number, ticks: readonly { value: number }[]) {
        const number = Number(value)
        if (log) return isLabelled(this, number) ? tickText(number, 0) : null
        return tickText(number, Math.abs((ticks[1]?.value ?? 0) - (ticks[0]?.value ?? 0)))
      },
    },
    ...(log
      ? {
          afterBuildTicks: (scale: TickOwner & { ticks: { value: number }[] }) => {
            scale.ticks = logGrid(scale.min, scale.max).map((value) => ({ value }))
          },
        }
      : {}),
  }
}

/** Options that depend on structure and sheet; ranges and markings are set as the data move. */
export function chartOptions(
  model: DrawModel,
  palette: Palette,
  topRoom: number,
  zoomed: () => void,
): ChartOptions<'line'> {
  return {
    animation: false,
    responsive: true,
    maintainAspectRatio: false,
    parsing: false,
    normalized: true,
    events: [],
    layout: { padding: { top: topRoom, right: 6 } },
    // the axes' option types are wider than what the two scale kinds share
    scales: {
      x: axisOptions(model.x, palette, true),
      y: axisOptions(model.y, palette, false),
    } as unknown as NonNullable<ChartOptions<'line'>['scales']>,
    plugins: {
      annotation: { annotations: {}, clip: false },
      zoom: {
        pan: { enabled: true, mode: 'xy', modifierKey: 'ctrl', threshold: 4, onPan: zoomed },
        zoom: {
          wheel: { enabled: true, modifierKey: 'ctrl', speed: 0.15 },
          drag: {
            enabled: true,
            modifierKey: 'shift',
            threshold: 6,
            backgroundColor: palette.selectWash,
            borderColor: palette.select,
            borderWidth: 1,
          },
          pinch: { enabled: true },
          mode: 'xy',
          onZoom: zoomed,
        },
      },
    },
  }
}
