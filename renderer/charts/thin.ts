import type { ScaleKind } from './chart-types.ts'

/** The part of the x axis on screen. */
export interface Span {
  readonly from: number
  readonly to: number
}

/**
 * Indices of the points worth drawing: of every bucket the first, lowest, highest and last, so
 * that no peak or notch is lost and neighbouring buckets join where the full curve does.
 * One neighbour outside each end of the span is kept, so the line runs off the edge.
 * The method is M4 aggregation (Jugel, Jerzak, Hackenbroich, Markl, VLDB 2014).
 * @param x rising
 * @param buckets number of columns into which the span is cut, at least 1
 */
export function thin(
  x: Float64Array,
  y: Float64Array,
  buckets: number,
  span: Span,
  scale: ScaleKind = 'linear',
): Int32Array {
  const begin = Math.max(0, lowerBound(x, span.from) - 1)
  const end = Math.min(x.length, lowerBound(x, span.to) + 2)
  const count = end - begin
  if (count <= 4 * buckets) return Int32Array.from({ length: Math.max(0, count) }, (_, i) => begin + i)

  const place = scale === 'log' ? Math.log : (value: number) => value
  const left = place(Math.max(span.from, scale === 'log' ? Number.MIN_VALUE : -Infinity))
  const width = (place(span.to) - left) / buckets
  const kept: number[] = []
  let start = begin
  while (start < end) {
    const bucket = Math.floor((place(at(x, start)) - left) / width)
    let next = start + 1
    let lowest = start
    let highest = start
    while (next < end && Math.floor((place(at(x, next)) - left) / width) === bucket) {
      if (at(y, next) < at(y, lowest)) lowest = next
      if (at(y, next) > at(y, highest)) highest = next
      next += 1
    }
    const inner = lowest < highest ? [lowest, highest] : [highest, lowest]
    for (const index of [start, ...inner, next - 1]) {
      if (kept[kept.length - 1] !== index) kept.push(index)
    }
    start = next
  }
  return Int32Array.from(kept)
}

/** First index whose x is not below the value; the length when there is none. */
export function lowerBound(x: Float64Array, value: number): number {
  let low = 0
  let high = x.length
  while (low < high) {
    const middle = (low + high) >>> 1
    if (at(x, middle) < value) low = middle + 1
    else high = middle
  }
  return low
}

function at(values: Float64Array, index: number): number {
  return values[index] ?? Number.NaN
}
