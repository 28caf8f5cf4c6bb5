/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within the maps' own grids */
import type { Project } from '../project/project.ts'
import { judgedOf } from '../runup/judged.ts'
import type { FeasibilityCells, FeasibilityGrid, FeasibilityMap } from './feasibility-map.ts'

/** Cells of a coarser map around a place: lower and upper index each way, equal where the grids meet. */
export interface Around {
  readonly left: number
  readonly right: number
  readonly low: number
  readonly high: number
  /** where the place stands between them, 0 to 1, by the logarithm */
  readonly across: number
  readonly up: number
}

/** @returns null outside the coarser map */
export function cellBetween(
  { frequencies, ratios }: FeasibilityMap,
  frequency: number,
  ratio: number,
): Around | null {
  const x = between(frequencies, frequency)
  const y = between(ratios, ratio)
  if (x === null || y === null) return null
  return { left: x.low, right: x.high, across: x.share, low: y.low, high: y.high, up: y.share }
}

function between(
  values: Float64Array,
  value: number,
): { readonly low: number; readonly high: number; readonly share: number } | null {
  const high = values.findIndex((candidate) => candidate >= value)
  if (high < 0) return null
  if (values[high] === value) return { low: high, high, share: 0 }
  if (high === 0) return null
  const low = high - 1
  return { low, high, share: Math.log(value / values[low]!) / Math.log(values[high]! / values[low]!) }
}

/**
 * Fills a cell from the coarser map where that is safe: on one of its cells, or among cells in which every
 * requirement is known and fares alike.
 * @returns whether it was
 */
export function takeOver(map: FeasibilityMap, coarse: FeasibilityMap, at: number, around: Around): boolean {
  const width = coarse.frequencies.length
  const corners = [
    around.low * width + around.left,
    around.low * width + around.right,
    around.high * width + around.left,
    around.high * width + around.right,
  ] as const
  const meets = around.left === around.right && around.low === around.high
  const pairs = map.layers.map((layer) => ({
    to: layer,
    from: coarse.layers.find(({ requirement }) => requirement === layer.requirement),
  }))
  for (const { from } of pairs) {
    if (!from) return false
    const status = from.status[corners[0]]!
    if (!meets && (status === 0 || corners.some((corner) => from.status[corner] !== status))) return false
  }
  const fill = (to: FeasibilityCells, from: FeasibilityCells) => {
    const [a, b, c, d] = corners.map((corner) => from.margin[corner]!)
    const lower = a! + around.across * (b! - a!)
    const upper = c! + around.across * (d! - c!)
    to.margin[at] = lower + around.up * (upper - lower)
    to.status[at] = from.status[corners[0]]!
  }
  for (const { to, from } of pairs) if (from) fill(to, from)
  fill(map.worst, coarse.worst)
  if (meets) map.computed[at] = coarse.computed[corners[0]]!
  return true
}

/** Frequencies about the present one and damping ratios worth looking at: common practice, no source. */
const SPAN = { below: 4, above: 3, ratios: [0.005, 0.5] } as const

/** How many columns and rows a first map can have to be there at once: a run-up costs most of a cell. */
export function startSize(project: Project): { readonly columns: number; readonly rows: number } {
  const passing = project.runUp.enabled && judgedOf(project) !== null
  return passing ? { columns: 9, rows: 6 } : { columns: 16, rows: 10 }
}

/**
 * A grid about where the project stands, for a first map.
 * @param present natural frequency of the reference mode [Hz]
 * @param columns,rows how many of each
 */
export function startGrid(present: number, columns: number, rows: number): FeasibilityGrid {
  return {
    frequencies: spaced(present / SPAN.below, present * SPAN.above, columns),
    ratios: spaced(SPAN.ratios[0], SPAN.ratios[1], rows),
  }
}

/** The same grid with a value between every two, for the next round. */
export function refinedGrid({ frequencies, ratios }: FeasibilityGrid): FeasibilityGrid {
  return { frequencies: withMiddles(frequencies), ratios: withMiddles(ratios) }
}

function spaced(from: number, to: number, count: number): readonly number[] {
  return Array.from({ length: count }, (_, i) => from * (to / from) ** (i / Math.max(1, count - 1)))
}

function withMiddles(values: readonly number[]): readonly number[] {
  return values.flatMap((value, i) => {
    const next = values[i + 1]
    return next === undefined ? [value] : [value, Math.sqrt(value * next)]
  })
}
