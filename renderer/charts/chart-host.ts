import type { Chart as ChartType, ChartOptions, Plugin } from 'chart.js'
import { annotationsOf, labelRoom, type Marking } from './annotations.ts'
import { chartOptions, datasetOf } from './chart-options.ts'
import type { DrawModel, DrawnPoint, View } from './draw-model.ts'
import { hatchPattern } from './hatch.ts'
import type { Palette } from './palette.ts'
import { Chart } from './register.ts'

/** Where the plot stands inside its canvas [CSS px]. */
export interface PlotArea {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
}

export interface ChartHost {
  /** Draws the model; options are made anew only when `structure` or the palette differ. */
  update(model: DrawModel, marking: Marking, palette: Palette, structure: string): void
  /** @param x, y what stays in place [CSS px]; left out: the middle */
  zoomBy(factor: number, focus?: { readonly x: number; readonly y: number }): void
  panBy(pixels: number): void
  destroy(): void
}

interface Callbacks {
  readonly viewed: (view: View) => void
  readonly placed: (area: PlotArea) => void
}

/** The one place that holds a Chart.js chart. */
export function createChartHost(canvas: HTMLCanvasElement, callbacks: Callbacks): ChartHost {
  let chart: ChartType<'line', DrawnPoint[]> | null = null
  // what was handed to the chart; chart.options itself reads the old ones until the next update
  let options: ChartOptions<'line'> = {}
  let lastStructure = ''
  let lastPalette: Palette | null = null
  let hatch: CanvasPattern | string = 'transparent'
  let area = ''

  const zoomed = () => {
    const x = chart?.scales['x']
    const y = chart?.scales['y']
    if (x && y) callbacks.viewed({ x: { min: x.min, max: x.max }, y: { min: y.min, max: y.max } })
  }

  const reportArea: Plugin<'line'> = {
    id: 'plotArea',
    afterDraw: ({ chartArea: { left, top, width, height } }) => {
      const next = `${left} ${top} ${width} ${height}`
      if (next === area) return
      area = next
      callbacks.placed({ left, top, width, height })
    },
  }

  const plotSize = () =>
    chart?.chartArea ?? { width: canvas.clientWidth - 60, height: canvas.clientHeight - 60 }

  function create(model: DrawModel) {
    return new Chart<'line', DrawnPoint[]>(canvas, {
      type: 'line',
      data: { datasets: model.curves.map(() => ({ data: [] })) },
      options,
      plugins: [reportArea],
    })
  }

  function update(model: DrawModel, marking: Marking, palette: Palette, structure: string) {
    if (palette !== lastPalette) hatch = hatchPattern(palette.hatch, devicePixelRatio) ?? palette.hatch
    const topRoom = labelRoom(marking.marks)
    const fresh = `${structure}|${topRoom}`
    const anew = fresh !== lastStructure || palette !== lastPalette
    if (anew) options = chartOptions(model, palette, topRoom, zoomed)
    chart ??= create(model)
    const drawn = chart
    if (anew) {
      drawn.options = options
      drawn.data.datasets = model.curves.map((curve) => datasetOf(curve, palette))
    } else {
      model.curves.forEach((curve, index) => {
        const dataset = drawn.data.datasets[index]
        if (dataset) dataset.data = [...curve.points]
      })
    }
    lastStructure = fresh
    lastPalette = palette
    setRange(options, 'x', model)
    setRange(options, 'y', model)
    const annotation = options.plugins?.annotation
    if (annotation) annotation.annotations = annotationsOf(model, marking, palette, hatch, plotSize())
    drawn.update('none')
  }

  return {
    update,
    zoomBy: (factor, focus) =>
      chart?.zoom({ x: factor, y: factor, ...(focus ? { focalPoint: { ...focus } } : {}) }),
    panBy: (pixels) => chart?.pan({ x: pixels }, undefined, 'none'),
    destroy: () => {
      chart?.destroy()
      chart = null
    },
  }
}

function setRange(options: ChartOptions<'line'>, axis: 'x' | 'y', model: DrawModel) {
  const scale = options.scales?.[axis]
  if (!scale) return
  scale.min = model[axis].min
  scale.max = model[axis].max
}
