/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for n and BLOCK by construction */
import { subtractProducts, type ComplexParts } from './block-combine.ts'

/**
 * Solves A(f) x(f) = b(f) for a block of frequencies at once, A complex and symmetric (not
 * Hermitian) and small. Real and imaginary parts lie apart, the frequency innermost: the inner loops
 * are long, independent and free of allocation.
 *
 * Elimination is L D Lᵀ without exchange of rows. That is safe where the imaginary part of A is
 * positive semidefinite (every passive damping): the part of A that is left after each step then
 * stays bounded by A itself. G. H. Golub and C. F. Van Loan, Matrix Computations, section on
 * symmetric systems; N. J. Higham, Factorizing complex symmetric matrices with positive definite
 * real and imaginary parts, Math. Comp. 67, 1998.
 */
export const BLOCK = 64

/**
 * Stands for the reciprocal of a pivot that is exactly zero (a resonance without damping): nothing
 * times it stays nothing, anything else becomes so large that `isUnbounded` tells it.
 */
const RECIPROCAL_OF_ZERO = 1e200
const UNBOUNDED = 1e100

/** Whether a computed value only says that there is no bound, or is no number at all. */
export function isUnbounded(value: number): boolean {
  return !(Math.abs(value) < UNBOUNDED)
}

export interface BlockMatrix {
  readonly size: number
  /** packed lower triangle: entry (i, j <= i) of frequency f at `entryAt(i, j) + f` */
  readonly matrix: ComplexParts
  /** multipliers of the elimination, same layout */
  readonly factor: ComplexParts
  /** reciprocal pivots, entry i of frequency f at i BLOCK + f */
  readonly pivot: ComplexParts
}

/** Offset of entry (i, j <= i) in a packed triangle. */
export function entryAt(i: number, j: number): number {
  return ((i * (i + 1)) / 2 + j) * BLOCK
}

export function blockMatrix(size: number): BlockMatrix {
  const make = (length: number) => ({ re: new Float64Array(length), im: new Float64Array(length) })
  return {
    size,
    matrix: make(entryAt(size, 0)),
    factor: make(entryAt(size, 0)),
    pivot: make(size * BLOCK),
  }
}

/**
 * Factors the first `count` matrices of the block, column after column: what is left of column j
 * after the earlier ones stays in `matrix` (unscaled) and its multiples by the pivot go to `factor`.
 */
export function factorBlock({ size: n, matrix, factor, pivot }: BlockMatrix, count: number): void {
  for (let j = 0; j < n; j++) {
    for (let i = j; i < n; i++) {
      subtractProducts(
        factor,
        entryAt(j, 0),
        BLOCK,
        matrix,
        entryAt(i, 0),
        BLOCK,
        j,
        matrix,
        entryAt(i, j),
        count,
      )
    }
    invert(matrix, entryAt(j, j), pivot, j * BLOCK, count)
    for (let i = j + 1; i < n; i++) {
      multiply(matrix, entryAt(i, j), pivot, j * BLOCK, factor, entryAt(i, j), count)
    }
  }
}

/** Pivots of diagonal matrices: all there is to factor. */
export function factorDiagonal({ size, matrix, pivot }: BlockMatrix, count: number): void {
  for (let i = 0; i < size; i++) invert(matrix, entryAt(i, i), pivot, i * BLOCK, count)
}

/** Solves for one right side per frequency, in place: entry i of frequency f at i BLOCK + f. */
export function solveBlock({ size: n, factor, pivot }: BlockMatrix, count: number, x: ComplexParts): void {
  for (let i = 1; i < n; i++) {
    subtractProducts(factor, entryAt(i, 0), BLOCK, x, 0, BLOCK, i, x, i * BLOCK, count)
  }
  for (let i = 0; i < n; i++) multiply(x, i * BLOCK, pivot, i * BLOCK, x, i * BLOCK, count)
  for (let k = n - 2; k >= 0; k--) {
    for (let i = k + 1; i < n; i++) {
      subtractProducts(factor, entryAt(i, k), 0, x, i * BLOCK, 0, 1, x, k * BLOCK, count)
    }
  }
}

export function solveDiagonal({ size, pivot }: BlockMatrix, count: number, x: ComplexParts): void {
  for (let i = 0; i < size; i++) multiply(x, i * BLOCK, pivot, i * BLOCK, x, i * BLOCK, count)
}

function invert(
  { re, im }: ComplexParts,
  at: number,
  { re: toRe, im: toIm }: ComplexParts,
  to: number,
  count: number,
): void {
  for (let f = 0; f < count; f++) {
    const a = re[at + f]!
    const b = im[at + f]!
    const square = a * a + b * b
    toRe[to + f] = square > 0 ? a / square : RECIPROCAL_OF_ZERO
    toIm[to + f] = square > 0 ? -b / square : 0
  }
}

function multiply(
  { re: leftRe, im: leftIm }: ComplexParts,
  l: number,
  { re: rightRe, im: rightIm }: ComplexParts,
  r: number,
  { re, im }: ComplexParts,
  at: number,
  count: number,
): void {
  for (let f = 0; f < count; f++) {
    const a = leftRe[l + f]!
    const b = leftIm[l + f]!
    const c = rightRe[r + f]!
    const d = rightIm[r + f]!
    re[at + f] = a * c - b * d
    im[at + f] = a * d + b * c
  }
}
