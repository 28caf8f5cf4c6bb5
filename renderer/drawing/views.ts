import type { Vec3 } from '../../core/project/fields.ts'
import type { Axis, Bounds } from './scene.ts'

export type ViewName = 'plan' | 'side' | 'end'

/** One view of the sheet: which axes run right and up, and which points at the reader. */
export interface View {
  readonly name: ViewName
  readonly title: string
  readonly right: Axis
  readonly up: Axis
  readonly toward: Axis
  /** whether the third axis points at the reader or away */
  readonly towardSign: 1 | -1
  /** frame of the bounds on the sheet [px] */
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
  readonly scale: number
  readonly toSheet: (point: Readonly<Vec3>) => readonly [x: number, y: number]
}

export interface Sheet {
  readonly scale: number
  readonly plan: View
  readonly side: View
  readonly end: View
}

const MARGIN = { left: 44, right: 18, top: 30, bottom: 58 }
const GAP_X = 32
const GAP_Y = 72

/**
 * Plan above, side view below it, end view beside that: third-angle projection at one scale,
 * so that edges line up across the views.
 * @param width of the sheet [px]
 */
export function layOutViews(bounds: Bounds, width: number, height: number): Sheet {
  const [dx, dy, dz] = [0, 1, 2].map(
    (axis) => bounds.max[axis as Axis] - bounds.min[axis as Axis], // 0, 1, 2 are the axes
  ) as [number, number, number]
  const roomX = Math.max(width - MARGIN.left - MARGIN.right - GAP_X, 40)
  const roomY = Math.max(height - MARGIN.top - MARGIN.bottom - GAP_Y, 40)
  const scale = Math.min(roomX / (dx + dy), roomY / (dy + dz))
  const spareX = (roomX - scale * (dx + dy)) / 2
  const spareY = (roomY - scale * (dy + dz)) / 2
  const left = MARGIN.left + spareX
  const top = MARGIN.top + spareY
  const below = top + scale * dy + GAP_Y
  const view = frame(bounds, scale)
  return {
    scale,
    plan: view('plan', 'Plan', 0, 1, 2, 1, left, top),
    side: view('side', 'Side', 0, 2, 1, -1, left, below),
    end: view('end', 'End', 1, 2, 0, 1, left + scale * dx + GAP_X, below),
  }
}

/** A single plan that fills its sheet, with room around it to move things. */
export function layOutPlan(bounds: Bounds, width: number, height: number, margin: number): View {
  const dx = bounds.max[0] - bounds.min[0]
  const dy = bounds.max[1] - bounds.min[1]
  const scale = Math.min(Math.max(width - 2 * margin, 40) / dx, Math.max(height - 2 * margin, 40) / dy)
  const left = (width - scale * dx) / 2
  const top = (height - scale * dy) / 2
  return frame(bounds, scale)('plan', 'Plan', 0, 1, 2, 1, left, top)
}

function frame(bounds: Bounds, scale: number) {
  return (
    name: ViewName,
    title: string,
    right: Axis,
    up: Axis,
    toward: Axis,
    towardSign: 1 | -1,
    left: number,
    top: number,
  ): View => ({
    name,
    title,
    right,
    up,
    toward,
    towardSign,
    left,
    top,
    width: scale * (bounds.max[right] - bounds.min[right]),
    height: scale * (bounds.max[up] - bounds.min[up]),
    scale,
    toSheet: (point) => [
      left + scale * (point[right] - bounds.min[right]),
      top + scale * (bounds.max[up] - point[up]),
    ],
  })
}

/** A length of one, two or five times a power of ten, not longer than `most`. */
export function roundLength(most: number): number {
  const power = 10 ** Math.floor(Math.log10(most))
  const factor = [5, 2, 1].find((candidate) => candidate * power <= most) ?? 1
  return factor * power
}

export interface Label {
  readonly id: string
  readonly text: string
  /** of the mark that it names [px] */
  readonly x: number
  readonly y: number
  /** radius of the mark, kept free [px] */
  readonly clear: number
}

export interface PlacedLabel extends Label {
  readonly textX: number
  readonly textY: number
  readonly anchor: 'start' | 'middle' | 'end'
}

export interface Box {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}

/**
 * Puts each label beside its mark where it hides neither another label nor a mark, trying right,
 * left, above and below and then the corners; where nothing is free the least bad place is taken.
 * @param size of the text [px]
 * @param occupied where something else is written already
 */
export function placeLabels(
  labels: readonly Label[],
  size: number,
  width: number,
  height: number,
  occupied: readonly Box[] = [],
): PlacedLabel[] {
  const marks = labels.map(({ x, y, clear }): Box => ({
    left: x - clear,
    right: x + clear,
    top: y - clear,
    bottom: y + clear,
  }))
  const taken: Box[] = [...occupied]
  return labels.map((label) => {
    const length = label.text.length * size * 0.52
    const best = candidates(label, size)
      .map((place) => {
        const box = boxOf(place, length, size)
        const outside = box.left < 2 || box.right > width - 2 || box.top < 2 || box.bottom > height - 2
        const cost =
          taken.reduce((sum, other) => sum + overlap(box, other), 0) * 3 +
          marks.reduce((sum, other) => sum + overlap(box, other), 0) +
          (outside ? 1e4 : 0)
        return { place, box, cost }
      })
      .reduce((a, b) => (b.cost < a.cost - 1e-6 ? b : a))
    taken.push(best.box)
    return { ...label, ...best.place }
  })
}

type Place = Pick<PlacedLabel, 'textX' | 'textY' | 'anchor'>

function candidates({ x, y, clear }: Label, size: number): Place[] {
  const gap = clear + 4
  const middle = y + size * 0.35
  const [above, below] = [y - gap, y + gap + size * 0.75]
  return [
    { textX: x + gap, textY: middle, anchor: 'start' },
    { textX: x - gap, textY: middle, anchor: 'end' },
    { textX: x, textY: above, anchor: 'middle' },
    { textX: x, textY: below, anchor: 'middle' },
    { textX: x + clear, textY: above, anchor: 'start' },
    { textX: x - clear, textY: above, anchor: 'end' },
    { textX: x + clear, textY: below, anchor: 'start' },
    { textX: x - clear, textY: below, anchor: 'end' },
    { textX: x, textY: above - size, anchor: 'middle' },
    { textX: x, textY: below + size, anchor: 'middle' },
  ]
}

function boxOf(place: Place, length: number, size: number): Box {
  const left =
    place.anchor === 'start' ? place.textX : place.textX - (place.anchor === 'end' ? length : length / 2)
  return { left, right: left + length, top: place.textY - size * 0.8, bottom: place.textY + size * 0.25 }
}

function overlap(a: Box, b: Box): number {
  const across = Math.min(a.right, b.right) - Math.max(a.left, b.left)
  const down = Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top)
  return across > 0 && down > 0 ? across * down : 0
}
