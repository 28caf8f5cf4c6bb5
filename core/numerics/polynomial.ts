/** Real polynomials, coefficients from the constant term upwards. */

/** Value at x by Horner's rule. */
export function polynomialValue(coefficients: ArrayLike<number>, x: number): number {
  let value = 0
  for (let k = coefficients.length - 1; k >= 0; k--) value = value * x + (coefficients[k] ?? 0)
  return value
}

export function polynomialProduct(a: ArrayLike<number>, b: ArrayLike<number>): Float64Array {
  const product = new Float64Array(Math.max(0, a.length + b.length - 1))
  for (let i = 0; i < a.length; i++) {
    const factor = a[i] ?? 0
    for (let j = 0; j < b.length; j++) product[i + j] = (product[i + j] ?? 0) + factor * (b[j] ?? 0)
  }
  return product
}

export function polynomialDerivative(a: ArrayLike<number>): Float64Array {
  const derivative = new Float64Array(Math.max(1, a.length - 1))
  for (let k = 1; k < a.length; k++) derivative[k - 1] = k * (a[k] ?? 0)
  return derivative
}

const MOST_COEFFICIENTS = 16
/** Work space, kept between calls: rows of the derivative chain and the break points of two levels. */
const chain = Array.from({ length: MOST_COEFFICIENTS }, () => new Float64Array(MOST_COEFFICIENTS))
let breaks = new Float64Array(2 * MOST_COEFFICIENTS)
let nextBreaks = new Float64Array(2 * MOST_COEFFICIENTS)

/**
 * Every real root between `low` and `high`, rising. The roots of the derivative part the interval into
 * pieces in which the polynomial rises or falls, so each piece holds at most one root and its ends
 * bracket it; the derivatives are treated the same way first, from the parabola upwards. A root that only
 * touches zero is found when its touch is exact; a nearly double root may be missed or come twice.
 * Roots near 0 keep their relative precision: shift a cluster of roots to the origin before calling.
 * @param coefficients of a polynomial of degree 15 at most
 * @param tolerance relative size of the last step of Newton's method; its square is what is left
 */
export function realRoots(
  coefficients: ArrayLike<number>,
  low: number,
  high: number,
  tolerance = 4e-16,
): number[] {
  let degree = coefficients.length - 1
  while (degree > 0 && coefficients[degree] === 0) degree--
  if (degree < 1 || !(low < high)) return []
  if (degree >= MOST_COEFFICIENTS) throw new RangeError(`degree ${degree} is above ${MOST_COEFFICIENTS - 1}`)
  // row k holds the derivative of degree k over its leading factor, so that numbers stay of one size
  let row = rowOf(degree)
  for (let k = 0; k <= degree; k++) row[k] = coefficients[k] ?? 0
  for (let k = degree - 1; k >= 1; k--) {
    const next = rowOf(k)
    for (let j = 0; j <= k; j++) next[j] = ((row[j + 1] ?? 0) * (j + 1)) / (k + 1)
    row = next
  }
  let count = 0
  for (let k = 1; k <= degree; k++) {
    // break points need not be exact: a piece cut a little beside an extremum still holds its root
    count = rootsBetween(rowOf(k), k, low, count, high, k === degree ? tolerance : 1e-7)
    const spare = breaks
    breaks = nextBreaks
    nextBreaks = spare
  }
  return Array.from(breaks.subarray(0, count))
}

function rowOf(degree: number): Float64Array {
  const row = chain[degree]
  if (!row) throw new RangeError('no row of this degree')
  return row
}

/** Roots of `c` given the rising zeros of its derivative in `breaks`; writes them to `nextBreaks`. */
function rootsBetween(
  c: Float64Array,
  degree: number,
  low: number,
  critical: number,
  high: number,
  tolerance: number,
): number {
  let count = 0
  let left = low
  let valueLeft = valueAt(c, degree, left)
  if (valueLeft === 0) nextBreaks[count++] = left
  for (let i = 0; i <= critical; i++) {
    const right = i < critical ? (breaks[i] ?? high) : high
    if (!(right > left)) continue
    const valueRight = valueAt(c, degree, right)
    if (valueRight === 0) nextBreaks[count++] = right
    else if (valueLeft !== 0 && valueLeft < 0 !== valueRight < 0) {
      nextBreaks[count++] = bracketedRoot(c, degree, left, right, valueLeft < 0, tolerance)
    }
    left = right
    valueLeft = valueRight
  }
  return count
}

function valueAt(c: Float64Array, degree: number, x: number): number {
  let value = c[degree] ?? 0
  for (let k = degree - 1; k >= 0; k--) value = value * x + (c[k] ?? 0)
  return value
}

/**
 * Newton's method kept inside a bracket; a step that does not halve the one before gives way to
 * bisection, so that a distant start costs no more than a close one.
 * @param tolerance relative size of the last step
 */
function bracketedRoot(
  c: Float64Array,
  degree: number,
  low: number,
  high: number,
  rising: boolean,
  tolerance: number,
): number {
  if (degree === 1) return -(c[0] ?? 0) / (c[1] ?? 1)
  let x = middle(low, high)
  let lastStep = high - low
  for (let iteration = 0; iteration < 200; iteration++) {
    let value = c[degree] ?? 0
    let slope = 0
    for (let k = degree - 1; k >= 0; k--) {
      slope = slope * x + value
      value = value * x + (c[k] ?? 0)
    }
    if (value === 0) return x
    if (value < 0 === rising) low = x
    else high = x
    let next = x - value / slope
    if (!(next > low && next < high) || Math.abs(next - x) > lastStep / 2) next = middle(low, high)
    lastStep = Math.abs(next - x)
    if (lastStep <= tolerance * Math.abs(next) || next === low || next === high) return next
    x = next
  }
  return x
}

/** Halfway; in ratio where the bracket spans orders of magnitude upwards. */
function middle(low: number, high: number): number {
  if (low > 0 && high > 16 * low) return Math.sqrt(low) * Math.sqrt(high)
  if (low <= 0 && high > 16 * (1 - low)) return Math.sqrt(high) * Math.sqrt(1 - low)
  return low + (high - low) / 2
}
