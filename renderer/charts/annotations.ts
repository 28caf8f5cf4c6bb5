import type { AnnotationOptions } from 'chartjs-plugin-annotation'
import { shareOf, valueAtShare } from './axis-share.ts'
import type { ChartBand, ChartLimit, ChartMark } from './chart-types.ts'
import type { DrawModel, DrawnAxis } from './draw-model.ts'
import { placeLabels } from './label-rows.ts'
import type { Palette } from './palette.ts'

const FONT_SIZE = 11
const ROW_HEIGHT = 15
/** average width of a letter of the label's font [px], for keeping labels apart */
const LETTER = 6.1

export interface Marking {
  readonly marks: readonly ChartMark[]
  readonly limits: readonly ChartLimit[]
  readonly bands: readonly ChartBand[]
}

export interface PlotSize {
  readonly width: number
  readonly height: number
}

/** Places along a horizontal line for its name, in the order in which they are taken. */
const PLACES = ['start', 'end', 'center'] as const

/** Marks, limits, forbidden regions and bands as annotations in shown units. */
export function annotationsOf(
  model: DrawModel,
  marking: Marking,
  palette: Palette,
  hatch: CanvasPattern | string,
  plot: PlotSize,
): Record<string, AnnotationOptions> {
  return {
    ...Object.fromEntries(
      marking.bands.map((band) => [`band-${band.id}`, bandOf(band, model, palette, hatch)]),
    ),
    ...limitsOf(marking.limits, model, palette, hatch, plot),
    ...marksOf(marking.marks, model, palette, plot.width),
  }
}

function bandOf(
  band: ChartBand,
  model: DrawModel,
  palette: Palette,
  hatch: CanvasPattern | string,
): AnnotationOptions {
  return {
    type: 'box',
    ...acrossOf(band, model),
    backgroundColor: band.role === 'range' ? palette.accentWash : hatch,
    borderWidth: 0,
    drawTime: 'beforeDatasetsDraw',
    z: -2,
  }
}

function limitsOf(
  limits: readonly ChartLimit[],
  model: DrawModel,
  palette: Palette,
  hatch: CanvasPattern | string,
  plot: PlotSize,
): Record<string, AnnotationOptions> {
  const made: Record<string, AnnotationOptions> = {}
  const places = placeLabels(
    limits.map((limit) => ({
      at: shareOf(model.y.shown(limit.y), model.y) * plot.height + (limit.forbidden === 'below' ? 9 : -9),
      width: FONT_SIZE + 2,
    })),
    PLACES.length,
    [-Infinity, Infinity],
    1,
  )
  for (const [index, limit] of limits.entries()) {
    const y = model.y.shown(limit.y)
    if (!Number.isFinite(y)) continue
    const ends = acrossOf(limit, model)
    const edge = Math.max(model.y.min, Math.min(model.y.max, y))
    const plain = limit.forbidden === 'none'
    if (!plain) {
      made[`region-${limit.id}`] = {
        type: 'box',
        ...ends,
        yMin: limit.forbidden === 'above' ? edge : model.y.min,
        yMax: limit.forbidden === 'above' ? model.y.max : edge,
        backgroundColor: hatch,
        borderWidth: 0,
        drawTime: 'beforeDatasetsDraw',
        z: -1,
      }
    }
    if (edge !== y) continue
    const row = places[index]?.row ?? null
    const across = (shareOf(ends.xMax, model.x) - shareOf(ends.xMin, model.x)) * plot.width
    const wide = across > limit.label.length * LETTER + 12
    made[`limit-${limit.id}`] = {
      type: 'line',
      ...ends,
      yMin: y,
      yMax: y,
      borderColor: plain ? palette.soft : palette.danger,
      borderWidth: plain ? 1 : 1.5,
      borderDash: plain ? [6, 3] : [],
    }
    if (limit.label === '' || row === null) continue
    const at = wide ? (PLACES[row] ?? 'start') : 'center'
    made[`name-${limit.id}`] = {
      type: 'label',
      xValue: at === 'start' ? ends.xMin : at === 'end' ? ends.xMax : middle(ends, model.x),
      yValue: y,
      position: { x: at, y: 'center' },
      content: limit.label,
      color: plain ? palette.soft : palette.danger,
      backgroundColor: 'transparent',
      textStrokeColor: palette.paper,
      textStrokeWidth: 3,
      font: { size: FONT_SIZE, family: palette.font, weight: plain ? 400 : 600 },
      padding: 0,
      xAdjust: at === 'start' ? 6 : at === 'end' ? -6 : 0,
      yAdjust: limit.forbidden === 'below' ? -9 : 9,
    }
  }
  return made
}

/** Room kept above the plot for the names of its marks [px]; steady while marks move. */
export function labelRoom(marks: readonly ChartMark[]): number {
  return labelRows(marks) * ROW_HEIGHT + 2
}

function labelRows(marks: readonly ChartMark[]): number {
  const named = marks.filter((mark) => mark.label !== '').length
  return named > 1 ? 2 : named
}

function acrossOf(part: { readonly from?: number; readonly to?: number }, model: DrawModel) {
  const from = part.from === undefined ? model.x.min : model.x.shown(part.from)
  const to = part.to === undefined ? model.x.max : model.x.shown(part.to)
  const inside = (x: number) => Math.max(model.x.min, Math.min(model.x.max, x))
  return { xMin: inside(from), xMax: inside(to) }
}

function marksOf(
  marks: readonly ChartMark[],
  model: DrawModel,
  palette: Palette,
  plotWidth: number,
): Record<string, AnnotationOptions> {
  const inside = marks
    .map((mark) => ({ mark, x: model.x.shown(mark.x) }))
    .filter(({ x }) => x >= model.x.min && x <= model.x.max)
    .toSorted((a, b) => Number(b.mark.role === 'running') - Number(a.mark.role === 'running'))
  const pixel = (x: number) => shareOf(x, model.x) * plotWidth
  const placed = placeLabels(
    inside.map(({ mark, x }) => ({ at: pixel(x), width: mark.label.length * LETTER + 8 })),
    labelRows(marks),
    [0, plotWidth],
  )
  return Object.fromEntries(
    inside.map(({ mark, x }, index): [string, AnnotationOptions] => {
      const place = placed[index]
      const running = mark.role === 'running'
      const row = place?.row ?? null
      return [
        `mark-${mark.id}`,
        {
          type: 'line',
          xMin: x,
          xMax: x,
          borderColor: running ? palette.accent : palette.soft,
          borderWidth: running ? 2 : 1,
          borderDash: running ? [] : [2, 3],
          drawTime: 'beforeDatasetsDraw',
          label: {
            display: row !== null && mark.label !== '',
            content: mark.label,
            position: 'end',
            rotation: 0,
            color: running ? palette.accent : palette.soft,
            backgroundColor: 'transparent',
            font: { size: FONT_SIZE, family: palette.font, weight: running ? 600 : 400 },
            padding: { x: 3, y: 0 },
            yAdjust: -ROW_HEIGHT * ((row ?? 0) + 1),
            xAdjust: (place?.at ?? 0) - pixel(x),
          },
        },
      ]
    }),
  )
}

function middle(ends: { readonly xMin: number; readonly xMax: number }, axis: DrawnAxis): number {
  return valueAtShare((shareOf(ends.xMin, axis) + shareOf(ends.xMax, axis)) / 2, axis)
}
