import type { Figure, FigureLimit, FigureMark, FigureSeries } from '../../core/report/report.ts'
import { formatPlain } from '../../core/units/format.ts'
import { axisTitle, xScale, yScale, type Scale } from './figure-scale.ts'
import { CURVES, DANGER, DASHES, GRID, INK, INK_SOFT, RULE_STRONG, SPEED, WIDTHS } from './paper.ts'

export interface FigureSize {
  /** [pt] */
  readonly width: number
  readonly height: number
}

/** The rectangle between the axes, in points from the upper left corner of the picture. */
interface Plot {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
  readonly x: Scale
  readonly y: Scale
}

/** A figure of the report as a vector drawing (SVG 1.1), with legend, limits and marks. */
export function figureSvg(figure: Figure, size: FigureSize): string {
  const marks = markRows(figure, size.width)
  const top = 20 + 10 * marks.rows
  const plot: Plot = {
    left: 46,
    top,
    width: size.width - 46 - 10,
    height: size.height - top - 34,
    x: xScale(figure),
    y: yScale(figure),
  }
  const parts = [
    operatingBand(figure, plot),
    gridLines(plot),
    ...figure.limits.map((limit) => limitHatch(limit, plot)),
    markLines(figure, plot, marks.places),
    operatingBar(figure, plot),
    ...figure.series.map((series) => curve(series, plot)),
    ...figure.limits.map((limit) => limitLine(limit, plot)),
    frame(plot),
    axisText(figure, plot),
    legend(figure, plot),
  ]
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${n(size.width)}" height="${n(size.height)}" viewBox="0 0 ${n(size.width)} ${n(size.height)}" font-family="Roboto" font-size="7.5">${parts.join('')}</svg>`
}

const n = (value: number): string => String(Math.round(value * 100) / 100)
const px = (plot: Plot, value: number) => plot.left + plot.width * plot.x.place(value)
const py = (plot: Plot, value: number) => plot.top + plot.height * (1 - plot.y.place(value))

interface LineLook {
  readonly stroke: string
  readonly width: number
  readonly dash?: string
}

function line(x1: number, y1: number, x2: number, y2: number, { stroke, width, dash }: LineLook): string {
  const dashes = dash ? ` stroke-dasharray="${dash}"` : ''
  return `<line x1="${n(x1)}" y1="${n(y1)}" x2="${n(x2)}" y2="${n(y2)}" stroke="${stroke}" stroke-width="${width}"${dashes}/>`
}

interface TextLook {
  readonly anchor?: 'start' | 'middle' | 'end'
  readonly fill?: string
  readonly bold?: boolean
  readonly turned?: boolean
}

function text(x: number, y: number, words: string, look: TextLook = {}): string {
  const { anchor = 'start', fill = INK_SOFT, bold = false, turned = false } = look
  const turn = turned ? ` transform="rotate(-90 ${n(x)} ${n(y)})"` : ''
  const weight = bold ? ' font-weight="bold"' : ''
  return `<text x="${n(x)}" y="${n(y)}" text-anchor="${anchor}" fill="${fill}"${weight}${turn}>${escaped(words)}</text>`
}

function escaped(words: string): string {
  return words
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
}

function gridLines(plot: Plot): string {
  const fine = { stroke: GRID, width: 0.4 }
  const bold = { stroke: GRID, width: 0.9 }
  const right = plot.left + plot.width
  const bottom = plot.top + plot.height
  return [
    ...plot.x.grid.map((at) => line(px(plot, at), plot.top, px(plot, at), bottom, fine)),
    ...plot.y.grid.map((at) => line(plot.left, py(plot, at), right, py(plot, at), fine)),
    ...plot.x.ticks.map(({ at }) => line(px(plot, at), plot.top, px(plot, at), bottom, bold)),
    ...plot.y.ticks.map(({ at }) => line(plot.left, py(plot, at), right, py(plot, at), bold)),
  ].join('')
}

function frame(plot: Plot): string {
  return `<rect x="${n(plot.left)}" y="${n(plot.top)}" width="${n(plot.width)}" height="${n(plot.height)}" fill="none" stroke="${RULE_STRONG}" stroke-width="0.8"/>`
}

function axisText(figure: Figure, plot: Plot): string {
  const bottom = plot.top + plot.height
  const middle = plot.top + plot.height / 2
  return [
    ...plot.x.ticks.map(({ at, text: words }) =>
      text(px(plot, at), bottom + 10, words, { anchor: 'middle' }),
    ),
    ...plot.y.ticks.map(({ at, text: words }) =>
      text(plot.left - 4, py(plot, at) + 2.6, words, { anchor: 'end' }),
    ),
    text(plot.left + plot.width / 2, bottom + 22, axisTitle(figure.x), { anchor: 'middle', fill: INK }),
    text(10, middle, axisTitle(figure.y), { anchor: 'middle', fill: INK, turned: true }),
  ].join('')
}

/** Curve in as few points as show every peak: of each quarter point of width the first, lowest, highest and last. */
function curve(series: FigureSeries, plot: Plot): string {
  const path: string[] = []
  let pen = false
  const columns = Math.ceil(plot.width * 4)
  let column = -1
  let pending: { x: number; y: number }[] = []
  const flush = () => {
    for (const point of thinned(pending)) {
      path.push(`${pen ? 'L' : 'M'}${n(point.x)} ${n(point.y)}`)
      pen = true
    }
    pending = []
  }
  series.x.forEach((x, index) => {
    const value = series.y[index]
    const place = plot.x.place(x)
    if (value === null || value === undefined || place < 0 || place > 1) {
      flush()
      pen = false
      return
    }
    const at = Math.floor(place * columns)
    if (at !== column) flush()
    column = at
    pending.push({ x: px(plot, x), y: py(plot, value) })
  })
  flush()
  const { left, top, width, height } = plot
  const clip = `clip-${series.style}`
  const dash = DASHES[series.style]
  return `<clipPath id="${clip}"><rect x="${n(left)}" y="${n(top)}" width="${n(width)}" height="${n(height)}"/></clipPath><path d="${path.join('')}" clip-path="url(#${clip})" fill="none" stroke="${CURVES[series.style]}" stroke-width="${WIDTHS[series.style]}" stroke-linejoin="round"${dash === '' ? '' : ` stroke-dasharray="${dash}"`}/>`
}

function thinned<P extends { readonly y: number }>(points: readonly P[]): readonly P[] {
  const [first] = points
  const last = points.at(-1)
  if (!first || !last || points.length <= 4) return points
  const lowest = points.reduce((a, b) => (b.y < a.y ? b : a))
  const highest = points.reduce((a, b) => (b.y > a.y ? b : a))
  return points.filter((point) => [first, lowest, highest, last].includes(point))
}

/** Part of the x axis over which a limit counts; one speed gets a short piece about it. */
function limitSpan(limit: FigureLimit, plot: Plot): readonly [number, number] {
  const right = plot.left + plot.width
  if (limit.over === null) return [plot.left, right]
  const [from, to] = [px(plot, limit.over[0]), px(plot, limit.over[1])]
  const least = 14
  const spread = Math.max(0, least - (to - from) / 2)
  return to - from < least
    ? [Math.max(plot.left, from - spread), Math.min(right, to + spread)]
    : [Math.max(plot.left, from), Math.min(right, to)]
}

/** Height of the hatched strip beside a limit [pt]; what is not allowed is hatched, never only coloured. */
const STRIP = 7
const HATCH_STEP = 4

function limitHatch(limit: FigureLimit, plot: Plot): string {
  const [from, to] = limitSpan(limit, plot)
  const at = py(plot, limit.value)
  const up = limit.forbidden === 'above' ? -STRIP : STRIP
  const strokes: string[] = []
  for (let x = from; x < to; x += HATCH_STEP) {
    const run = Math.min(STRIP, to - x)
    strokes.push(`M${n(x)} ${n(at)}L${n(x + run)} ${n(at + (up * run) / STRIP)}`)
  }
  return `<path d="${strokes.join('')}" fill="none" stroke="${DANGER}" stroke-width="0.6"/>`
}

function limitLine(limit: FigureLimit, plot: Plot): string {
  const [from, to] = limitSpan(limit, plot)
  const at = py(plot, limit.value)
  const words = `${limit.label} ${formatPlain(limit.value)}`
  const room = to + 60 < plot.left + plot.width
  return [
    line(from, at, to, at, { stroke: DANGER, width: 1.3 }),
    room
      ? text(to + 4, at + 2.6, words, { fill: DANGER, bold: true })
      : text(to - 3, at + (limit.forbidden === 'above' ? 9 : -4), words, {
          anchor: 'end',
          fill: DANGER,
          bold: true,
        }),
  ].join('')
}

function operatingEnds(figure: Figure, plot: Plot): readonly [number, number] | null {
  if (figure.operating === null) return null
  const [from, to] = figure.operating
  return [Math.max(plot.left, px(plot, from)), Math.min(plot.left + plot.width, px(plot, to))]
}

function operatingBand(figure: Figure, plot: Plot): string {
  const ends = operatingEnds(figure, plot)
  if (ends === null) return ''
  return `<rect x="${n(ends[0])}" y="${n(plot.top)}" width="${n(ends[1] - ends[0])}" height="${n(plot.height)}" fill="${SPEED}" fill-opacity="0.05"/>`
}

function operatingBar(figure: Figure, plot: Plot): string {
  const ends = operatingEnds(figure, plot)
  if (ends === null) return ''
  const bottom = plot.top + plot.height
  const middle = (ends[0] + ends[1]) / 2
  return [
    `<rect x="${n(middle - 31)}" y="${n(bottom - 13)}" width="62" height="9" fill="#ffffff" fill-opacity="0.8"/>`,
    line(ends[0], bottom - 2, ends[1], bottom - 2, { stroke: SPEED, width: 2 }),
    text(middle, bottom - 6, 'operating speeds', { anchor: 'middle', fill: SPEED }),
  ].join('')
}

interface MarkPlace {
  /** null: there is no room left for its label */
  readonly row: number | null
}

const MOST_ROWS = 3

/** The running speed has the first choice of a place. */
const rank = (mark: FigureMark) => (mark.kind === 'running' ? 0 : 1)

/** Labels of vertical marks in as many rows as keep them apart. */
function markRows(figure: Figure, width: number): { rows: number; places: readonly MarkPlace[] } {
  const scale = xScale(figure)
  const rows: (readonly [from: number, to: number])[][] = []
  const order = figure.marks
    .map((mark, index) => ({ mark, index }))
    .sort((a, b) => rank(a.mark) - rank(b.mark) || a.mark.at - b.mark.at)
  const places: MarkPlace[] = figure.marks.map(() => ({ row: null }))
  for (const { mark, index } of order) {
    const at = (width - 56) * scale.place(mark.at)
    const half = 2.2 * mark.label.length + 2
    const free = rows.findIndex((taken) => taken.every(([from, to]) => at + half < from || at - half > to))
    const row = free < 0 ? rows.length : free
    if (row >= MOST_ROWS) continue
    const taken = rows[row] ?? []
    rows[row] = [...taken, [at - half, at + half]]
    places[index] = { row }
  }
  return { rows: Math.max(1, rows.length), places }
}

function markLines(figure: Figure, plot: Plot, places: readonly MarkPlace[]): string {
  return figure.marks
    .map((mark, index) => {
      const at = px(plot, mark.at)
      if (at < plot.left || at > plot.left + plot.width) return ''
      const row = places[index]?.row ?? null
      const top = plot.top - 3 - 10 * (row ?? 0)
      const running = mark.kind === 'running'
      const look: LineLook = running
        ? { stroke: SPEED, width: 1.1 }
        : { stroke: RULE_STRONG, width: 0.5, dash: '1 2' }
      return [
        line(at, top + 1, at, plot.top + plot.height, look),
        row === null
          ? ''
          : text(at, top, mark.label, { anchor: 'middle', fill: running ? SPEED : INK_SOFT, bold: running }),
      ].join('')
    })
    .join('')
}

/** Samples of the curves in one row above the plot. */
function legend(figure: Figure, plot: Plot): string {
  const y = 9
  let x = plot.left
  const entries = figure.series.map((series) => {
    const dash = DASHES[series.style]
    const look: LineLook = { stroke: CURVES[series.style], width: WIDTHS[series.style], dash }
    const entry = line(x, y - 2.5, x + 22, y - 2.5, look) + text(x + 26, y, series.label, { fill: INK })
    x += 26 + 4.1 * series.label.length + 16
    return entry
  })
  if (figure.marks.some((mark) => mark.kind === 'mode')) {
    entries.push(
      text(plot.left + plot.width, y, 'dotted: mode, and order where not the first', { anchor: 'end' }),
    )
  }
  return entries.join('')
}
