/** A smooth curve through points that rises wherever the points rise. */
export interface MonotoneCurve {
  readonly x: Float64Array
  readonly y: Float64Array
  /** dy/dx at the points */
  readonly slope: Float64Array
}

export interface CurvePoint {
  readonly value: number
  readonly slope: number
  /** whether x lies beyond the first or the last point, where the curve is continued as a straight line */
  readonly outside: boolean
}

/**
 * Piecewise cubic through points with rising x and rising y, without overshoot.
 * Slopes inside: weighted harmonic mean of the neighbouring secants (F. N. Fritsch and J. Butland,
 * SIAM J. Sci. Stat. Comput. 5, 1984), which lies within the region that F. N. Fritsch and
 * R. E. Carlson (SIAM J. Numer. Anal. 17, 1980) show to be enough for a monotone cubic. Slopes at the
 * ends: three-point formula, held within the same region.
 * @param points at least two, x and y strictly rising
 */
export function monotoneCurve(points: readonly (readonly [x: number, y: number])[]): MonotoneCurve {
  const n = points.length
  const x = Float64Array.from(points, ([value]) => value)
  const y = Float64Array.from(points, ([, value]) => value)
  if (n < 2) throw new Error('a curve needs two points')
  const width = (k: number) => entry(x, k + 1) - entry(x, k)
  const secant = (k: number) => (entry(y, k + 1) - entry(y, k)) / width(k)
  const slope = new Float64Array(n)
  for (let k = 1; k < n - 1; k++) {
    const before = 2 * width(k) + width(k - 1)
    const after = width(k) + 2 * width(k - 1)
    slope[k] = (before + after) / (before / secant(k - 1) + after / secant(k))
  }
  if (n === 2) slope.fill(secant(0))
  else {
    slope[0] = endSlope(width(0), width(1), secant(0), secant(1))
    slope[n - 1] = endSlope(width(n - 2), width(n - 3), secant(n - 2), secant(n - 3))
  }
  return { x, y, slope }
}

/** Slope at an end from the two nearest intervals; `near` is the one that ends there. */
function endSlope(nearWidth: number, farWidth: number, near: number, far: number): number {
  // with rising secants it stays under twice the near one, well within the region
  return Math.max(0, ((2 * nearWidth + farWidth) * near - nearWidth * far) / (nearWidth + farWidth))
}

/**
 * Value and slope of the curve. Beyond its ends it goes on straight, with the slope of the end or,
 * where that is zero, of the last secant: a mount does not lose its stiffness where its table ends.
 */
export function curveAt(curve: MonotoneCurve, position: number): CurvePoint {
  const { x, y, slope } = curve
  const last = x.length - 1
  if (position < entry(x, 0)) return beyond(curve, 0, 0, position)
  if (position > entry(x, last)) return beyond(curve, last, last - 1, position)
  const k = intervalOf(x, position)
  const h = entry(x, k + 1) - entry(x, k)
  const t = (position - entry(x, k)) / h
  const secant = (entry(y, k + 1) - entry(y, k)) / h
  const [d0, d1] = [entry(slope, k), entry(slope, k + 1)]
  // cubic in t from the value at the left: y0 + h (d0 t + c2 t² + c3 t³)
  const c2 = 3 * secant - 2 * d0 - d1
  const c3 = d0 + d1 - 2 * secant
  return {
    value: entry(y, k) + h * t * (d0 + t * (c2 + t * c3)),
    slope: d0 + t * (2 * c2 + 3 * t * c3),
    outside: false,
  }
}

function beyond({ x, y, slope }: MonotoneCurve, end: number, interval: number, position: number): CurvePoint {
  const secant = (entry(y, interval + 1) - entry(y, interval)) / (entry(x, interval + 1) - entry(x, interval))
  const straight = entry(slope, end) > 0 ? entry(slope, end) : secant
  return { value: entry(y, end) + straight * (position - entry(x, end)), slope: straight, outside: true }
}

/** Index of the interval that holds `value`, by halving. */
function intervalOf(x: Float64Array, value: number): number {
  let low = 0
  let high = x.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (entry(x, middle) <= value) low = middle
    else high = middle
  }
  return low
}

function entry(list: Float64Array, index: number): number {
  return list[index] ?? 0
}
