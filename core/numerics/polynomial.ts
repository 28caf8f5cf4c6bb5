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

/**
 * Every real root between `low` and `high`, rising. The roots of the derivative part the interval into
 * pieces in which the polynomial rises or falls, so each piece holds at most one root and its ends
 * bracket it; the derivatives are treated the same way first, from the straight line upwards. A root
 * that only touches zero is reported when the touch is exact.
 * Roots near 0 keep their relative precision: shift a cluster of roots to the origin before calling.
 * @param coefficients of a polynomial of any degree up to about 10
 */
export function realRoots(coefficients: ArrayLike<number>, low: number, high: number): number[] {
  let degree = coefficients.length - 1
  while (degree > 0 && coefficients[degree] === 0) degree--
  if (degree < 1 || !(low < high)) return []
  // row k of the chain: the derivative of degree k, scaled so that numbers stay of one size
  const chain: Float64Array[] = []
  let row: Float64Array = Float64Array.from({ length: degree + 1 }, (_, k) => coefficients[k] ?? 0)
  for (let k = degree; k >= 1; k--) {
    chain.push(row)
    const next = new Float64Array(k)
    for (let j = 1; j <= k; j++) next[j - 1] = ((row[j] ?? 0) * j) / k
    row = next
  }
  let breaks: number[] = []
  for (let index = chain.length - 1; index >= 0; index--) {
    const polynomial = chain[index]
    if (polynomial) breaks = rootsBetween(polynomial, low, breaks, high)
  }
  return breaks
}

/** Roots of `c` given the rising zeros of its derivative. */
function rootsBetween(c: Float64Array, low: number, critical: readonly number[], high: number): number[] {
  const roots: number[] = []
  let left = low
  let valueLeft = polynomialValue(c, left)
  if (valueLeft === 0) roots.push(left)
  for (let i = 0; i <= critical.length; i++) {
    const right = critical[i] ?? high
    if (!(right > left)) continue
    const valueRight = polynomialValue(c, right)
    if (valueRight === 0) roots.push(right)
    else if (valueLeft !== 0 && valueLeft < 0 !== valueRight < 0) {
      roots.push(bracketedRoot(c, left, right, valueLeft < 0))
    }
    left = right
    valueLeft = valueRight
  }
  return roots
}

/**
 * Newton's method kept inside a bracket; a step that does not halve the one before gives way to
 * bisection, so that a distant start costs no more than a close one. Ends at the precision of the
 * arithmetic.
 */
function bracketedRoot(c: Float64Array, low: number, high: number, rising: boolean): number {
  const top = c.length - 1
  let x = middle(low, high)
  let lastStep = high - low
  for (let iteration = 0; iteration < 200; iteration++) {
    let value = c[top] ?? 0
    let slope = 0
    for (let k = top - 1; k >= 0; k--) {
      slope = slope * x + value
      value = value * x + (c[k] ?? 0)
    }
    if (value === 0) return x
    if (value < 0 === rising) low = x
    else high = x
    let next = x - value / slope
    if (!(next > low && next < high) || Math.abs(next - x) > lastStep / 2) next = middle(low, high)
    lastStep = Math.abs(next - x)
    if (lastStep <= 4e-16 * Math.abs(next) || next === low || next === high) return next
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
