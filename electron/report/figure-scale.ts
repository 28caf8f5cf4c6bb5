import type { Figure, FigureAxis } from '../../core/report/report.ts'
import { formatPlain } from '../../core/units/format.ts'

/** Maps values to positions along an axis, 0 at its lower end and 1 at its upper. */
export interface Scale {
  readonly from: number
  readonly to: number
  readonly ticks: readonly Tick[]
  /** fine lines without a label */
  readonly grid: readonly number[]
  place(value: number): number
}
export interface Tick {
  readonly at: number
  readonly text: string
}

/** A chart never shows more than this many decades below its highest value. */
const MOST_DECADES = 3.5

export function xScale(figure: Figure): Scale {
  const values = figure.series.flatMap((series) => [series.x[0], series.x.at(-1)])
  const finite = values.filter((value): value is number => value !== undefined)
  const [low, high] = extent(finite)
  return figure.x.scale === 'log'
    ? logScale(low, high)
    : linearScale(figure.operating ? Math.min(low, figure.operating[0]) : low, high)
}

/** Spans all curves and limits, with room above. */
export function yScale(figure: Figure): Scale {
  const values = figure.series.flatMap((series) => series.y.filter((value) => value !== null))
  const limits = figure.limits.map((limit) => limit.value)
  if (figure.y.scale === 'linear') {
    const [low, high] = extent([...values, ...limits, 0])
    return linearScale(low, high + 0.06 * (high - low))
  }
  const positive = [...values, ...limits].filter((value) => value > 0)
  const [low, high] = extent(positive)
  const top = high * 1.5
  return logScale(Math.max(low / 1.2, top / 10 ** MOST_DECADES), top)
}

function extent(values: readonly number[]): readonly [number, number] {
  if (values.length === 0) return [0.1, 1]
  let low = Infinity
  let high = -Infinity
  for (const value of values) {
    low = Math.min(low, value)
    high = Math.max(high, value)
  }
  return high > low ? [low, high] : [low - 0.5 * Math.abs(low || 1), low + 0.5 * Math.abs(low || 1)]
}

const WANTED_TICKS = 10

export function linearScale(from: number, to: number): Scale {
  const step = roundStep((to - from) / WANTED_TICKS)
  const ticks: Tick[] = []
  for (let index = Math.ceil(from / step - 1e-9); index <= to / step + 1e-9; index++) {
    const at = index * step
    ticks.push({ at, text: formatPlain(Number(at.toPrecision(12)), 6) })
  }
  return { from, to, ticks, grid: [], place: (value) => (value - from) / (to - from) }
}

/** The next of 1, 2 and 5 times a power of ten. */
function roundStep(size: number): number {
  const power = 10 ** Math.floor(Math.log10(size))
  return power * ([1, 2, 5].find((step) => step * power >= size * (1 - 1e-9)) ?? 10)
}

export function logScale(from: number, to: number): Scale {
  const decades = Math.log10(to / from)
  const labelled = decades <= 2.3 ? [1, 2, 5] : [1]
  const ticks: Tick[] = []
  const grid: number[] = []
  for (let power = Math.floor(Math.log10(from)); power <= Math.log10(to); power++) {
    for (let step = 1; step <= 9; step++) {
      const at = Number((step * 10 ** power).toPrecision(3))
      if (at < from || at > to) continue
      if (labelled.includes(step)) ticks.push({ at, text: formatPlain(at, 3) })
      else grid.push(at)
    }
  }
  return {
    from,
    to,
    ticks,
    grid,
    place: (value) => Math.log(Math.max(value, Number.MIN_VALUE) / from) / Math.log(to / from),
  }
}

export function axisTitle(axis: FigureAxis): string {
  return axis.unit === '' ? axis.label : `${axis.label} [${axis.unit}]`
}
