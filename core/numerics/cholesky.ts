/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of size n by construction */
/**
 * Cholesky factor L of a symmetric positive definite matrix, A = L Lᵀ, row-major, lower triangle.
 * @returns false when the matrix is not positive definite to rounding
 */
export function cholesky(matrix: Float64Array, size: number, factor: Float64Array): boolean {
  const n = size
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = matrix[i * n + j]!
      for (let k = 0; k < j; k++) sum -= factor[i * n + k]! * factor[j * n + k]!
      if (i === j) {
        // what is left of a pivot after cancellation says how far from singular the matrix is
        if (!(sum > matrix[i * n + i]! * n * Number.EPSILON)) return false
        factor[i * n + i] = Math.sqrt(sum)
      } else {
        factor[i * n + j] = sum / factor[j * n + j]!
        factor[j * n + i] = 0
      }
    }
  }
  return true
}

/** The inverse of a lower triangular matrix, row-major. */
export function invertLower(factor: Float64Array, size: number, inverse: Float64Array): void {
  const n = size
  inverse.fill(0)
  for (let j = 0; j < n; j++) {
    inverse[j * n + j] = 1 / factor[j * n + j]!
    for (let i = j + 1; i < n; i++) {
      let sum = 0
      for (let k = j; k < i; k++) sum -= factor[i * n + k]! * inverse[k * n + j]!
      inverse[i * n + j] = sum / factor[i * n + i]!
    }
  }
}

/**
 * Solves A x = b for a symmetric positive definite matrix.
 * @param matrix row-major; left as it is
 * @returns x, or null when the matrix is not positive definite to rounding
 */
export function solvePositiveDefinite(
  matrix: Float64Array,
  rightSide: ArrayLike<number>,
): Float64Array | null {
  const n = rightSide.length
  const factor = new Float64Array(n * n)
  if (!cholesky(matrix, n, factor)) return null
  const x = Float64Array.from(rightSide)
  solveFactored(factor, x)
  return x
}

/** Solves L Lᵀ x = b in place. */
function solveFactored(factor: Float64Array, x: Float64Array): void {
  const n = x.length
  for (let i = 0; i < n; i++) {
    let sum = x[i]!
    for (let k = 0; k < i; k++) sum -= factor[i * n + k]! * x[k]!
    x[i] = sum / factor[i * n + i]!
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = x[i]!
    for (let k = i + 1; k < n; k++) sum -= factor[k * n + i]! * x[k]!
    x[i] = sum / factor[i * n + i]!
  }
}
