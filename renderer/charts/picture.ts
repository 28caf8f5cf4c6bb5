import { dashOf } from './dashes.ts'
import { inkOf, weightOf } from './chart-options.ts'
import type { ChartSeries } from './chart-types.ts'
import type { Palette } from './palette.ts'

const PAD = 16
const TITLE = 15
const TEXT = 12
const ROW = 20
const SAMPLE = 34

/** The chart as seen, with its title above and the key to its lines below, as a PNG. */
export async function chartPicture(
  source: HTMLCanvasElement,
  title: string,
  series: readonly ChartSeries[],
  palette: Palette,
): Promise<Blob> {
  const scale = source.width / source.clientWidth
  const width = source.clientWidth + 2 * PAD
  const canvas = document.createElement('canvas')
  const pen = canvas.getContext('2d')
  if (!pen) throw new Error('The picture could not be drawn')
  pen.font = `${TEXT}px ${palette.font}`
  const rows = keyRows(pen, series, width - 2 * PAD)
  const height = PAD + TITLE + 10 + source.clientHeight + 8 + rows.length * ROW + PAD
  canvas.width = Math.round(width * scale)
  canvas.height = Math.round(height * scale)
  pen.scale(scale, scale)
  pen.fillStyle = palette.paper
  pen.fillRect(0, 0, width, height)
  pen.textBaseline = 'middle'
  pen.fillStyle = palette.ink
  pen.font = `600 ${TITLE}px ${palette.font}`
  pen.fillText(title, PAD, PAD + TITLE / 2)
  pen.drawImage(source, PAD, PAD + TITLE + 10, source.clientWidth, source.clientHeight)
  pen.font = `${TEXT}px ${palette.font}`
  rows.forEach((row, index) => {
    let x = PAD
    const y = PAD + TITLE + 10 + source.clientHeight + 8 + (index + 0.5) * ROW
    for (const entry of row) {
      drawSample(pen, entry, palette, x, y)
      pen.fillStyle = palette.ink
      pen.fillText(entry.label, x + SAMPLE + 6, y)
      x += entryWidth(pen, entry)
    }
  })
  return await toPng(canvas)
}

function drawSample(
  pen: CanvasRenderingContext2D,
  series: ChartSeries,
  palette: Palette,
  x: number,
  y: number,
) {
  pen.save()
  pen.strokeStyle = inkOf(series, palette)
  pen.lineWidth = weightOf(series)
  pen.setLineDash([...dashOf(series.dash)])
  pen.beginPath()
  if (series.role === 'points') {
    pen.setLineDash([])
    pen.arc(x + SAMPLE / 2, y, 4, 0, 2 * Math.PI)
  } else {
    pen.moveTo(x, y)
    pen.lineTo(x + SAMPLE, y)
  }
  pen.stroke()
  pen.restore()
}

function entryWidth(pen: CanvasRenderingContext2D, series: ChartSeries): number {
  return SAMPLE + 6 + pen.measureText(series.label).width + 20
}

function keyRows(
  pen: CanvasRenderingContext2D,
  series: readonly ChartSeries[],
  room: number,
): ChartSeries[][] {
  const rows: ChartSeries[][] = []
  let used = Infinity
  for (const entry of series) {
    const width = entryWidth(pen, entry)
    if (used + width > room) {
      rows.push([])
      used = 0
    }
    rows[rows.length - 1]?.push(entry)
    used += width
  }
  return rows
}

function toPng(canvas: HTMLCanvasElement): Promise<Blob> {
  return new Promise((resolve, reject) => {
    canvas.toBlob((blob) => {
      if (blob) resolve(blob)
      else reject(new Error('The picture could not be made'))
    }, 'image/png')
  })
}
