import { lowerBound } from './thin.ts'

/** The x of the curve nearest to the value; the value itself on an empty curve. */
export function snap(x: Float64Array, value: number): number {
  const after = lowerBound(x, value)
  const right = x[after]
  const left = x[after - 1]
  if (left === undefined) return right ?? value
  if (right === undefined) return left
  return value - left < right - value ? left : right
}

/**
 * Value of the curve at x: the computed one where x is a computed point, the straight line between
 * its neighbours elsewhere. Null outside the curve.
 */
export function valueAt(x: Float64Array, y: Float64Array, value: number): number | null {
  const after = lowerBound(x, value)
  const right = x[after]
  const rightValue = y[after]
  if (right === undefined || rightValue === undefined) return null
  if (right === value) return rightValue
  const left = x[after - 1]
  const leftValue = y[after - 1]
  if (left === undefined || leftValue === undefined) return null
  return leftValue + ((rightValue - leftValue) * (value - left)) / (right - left)
}

/** Largest value between two x, and where it stands; null when no point lies there. */
export function peakWithin(
  x: Float64Array,
  y: Float64Array,
  from: number,
  to: number,
): { readonly x: number; readonly y: number } | null {
  let best: { x: number; y: number } | null = null
  for (let index = lowerBound(x, from); index < x.length; index += 1) {
    const place = x[index] ?? Number.NaN
    if (place > to) break
    const value = y[index] ?? Number.NaN
    if (Number.isFinite(value) && (best === null || value > best.y)) best = { x: place, y: value }
  }
  return best
}
