import type { FeasibilityCells, FeasibilityMap } from './feasibility-map.ts'

/** A line over the map: [frequency in Hz, damping ratio] from point to point. */
export type BoundaryLine = readonly (readonly [frequency: number, ratio: number])[]

type Point = readonly [number, number]

/**
 * Where a margin is zero: lines between the cells that pass and those that fail, straight across each
 * square of the grid (marching squares). Squares with a cell that is not known have no line.
 */
export function boundaryLines(map: FeasibilityMap, cells: FeasibilityCells): readonly BoundaryLine[] {
  const { frequencies, ratios } = map
  const pieces: (readonly [Point, Point])[] = []
  for (let j = 0; j + 1 < ratios.length; j++) {
    for (let i = 0; i + 1 < frequencies.length; i++) pieces.push(...acrossSquare(map, cells, i, j))
  }
  return joined(pieces)
}

/** Corners of a square, once around from its lower left. */
const AROUND = [
  [0, 0],
  [1, 0],
  [1, 1],
  [0, 1],
] as const

function acrossSquare(
  { frequencies, ratios }: FeasibilityMap,
  { margin, status }: FeasibilityCells,
  i: number,
  j: number,
): (readonly [Point, Point])[] {
  const corners = AROUND.map(([right, up]) => {
    const at = (j + up) * frequencies.length + i + right
    return {
      at,
      place: [frequencies[i + right] ?? 0, ratios[j + up] ?? 0] as const,
      margin: margin[at] ?? 0,
      known: (status[at] ?? 0) > 0,
    }
  })
  if (!corners.every(({ known }) => known)) return []
  const crossings = corners.flatMap((corner, k): Point[] => {
    const next = corners[(k + 1) % 4]
    if (!next || corner.margin < 0 === next.margin < 0) return []
    // from the same end in both squares that share this edge, so that rounding is the same
    const [from, to] = corner.at < next.at ? [corner, next] : [next, corner]
    const share = from.margin / (from.margin - to.margin)
    const between = (axis: 0 | 1) => from.place[axis] + share * (to.place[axis] - from.place[axis])
    return [[between(0), between(1)]]
  })
  const [a, b, c, d] = crossings
  if (a && b && c && d) {
    // a saddle: the middle of the square tells which corners belong together
    const middle = corners.reduce((sum, corner) => sum + corner.margin, 0)
    const first = corners[0]?.margin ?? 0
    return middle < 0 === first < 0
      ? [
          [a, b],
          [c, d],
        ]
      : [
          [d, a],
          [b, c],
        ]
  }
  return a && b ? [[a, b]] : []
}

/** Chains pieces that share an end; shared ends are the same numbers, computed from the same two cells. */
function joined(pieces: readonly (readonly [Point, Point])[]): readonly BoundaryLine[] {
  const key = ([x, y]: Point) => `${x} ${y}`
  const ends = new Map<string, number[]>()
  pieces.forEach((piece, index) => {
    for (const point of piece) ends.set(key(point), [...(ends.get(key(point)) ?? []), index])
  })
  const used = new Set<number>()
  const follow = (from: Point): Point[] => {
    const line: Point[] = []
    for (let at = from; ;) {
      const index = ends.get(key(at))?.find((candidate) => !used.has(candidate))
      const piece = index === undefined ? undefined : pieces[index]
      if (index === undefined || !piece) return line
      used.add(index)
      at = key(piece[0]) === key(at) ? piece[1] : piece[0]
      line.push(at)
    }
  }
  return pieces.flatMap((piece, index) => {
    if (used.has(index)) return []
    used.add(index)
    return [[...follow(piece[0]).toReversed(), ...piece, ...follow(piece[1])]]
  })
}
