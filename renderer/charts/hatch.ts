const TILE = 7

/** Slanted lines that tile without a seam; null when the canvas refuses (then the tint alone stays). */
export function hatchPattern(colour: string, pixelRatio: number): CanvasPattern | null {
  const tile = document.createElement('canvas')
  const size = Math.round(TILE * pixelRatio)
  tile.width = size
  tile.height = size
  const pen = tile.getContext('2d')
  if (!pen) return null
  pen.strokeStyle = colour
  pen.lineWidth = pixelRatio
  // the two short strokes complete the corners, where the long one is cut off
  for (const shift of [-size, 0, size]) {
    pen.beginPath()
    pen.moveTo(shift - 1, size + 1)
    pen.lineTo(shift + size + 1, -1)
    pen.stroke()
  }
  const pattern = pen.createPattern(tile, 'repeat')
  pattern?.setTransform(new DOMMatrix().scale(1 / pixelRatio))
  return pattern
}
