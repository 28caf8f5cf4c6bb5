/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for n and BLOCK by construction */
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

export interface BlockMatrix {
  readonly size: number
  /** packed lower triangle: entry (i, j <= i) of frequency f at (i (i + 1) / 2 + j) BLOCK + f */
  readonly re: Float64Array
  readonly im: Float64Array
  /** multipliers of the elimination, same layout */
  readonly factorRe: Float64Array
  readonly factorIm: Float64Array
  /** reciprocal pivots, n BLOCK */
  readonly pivotRe: Float64Array
  readonly pivotIm: Float64Array
}

export function blockMatrix(size: number): BlockMatrix {
  const packed = ((size * (size + 1)) / 2) * BLOCK
  const make = (length: number) => new Float64Array(length)
  return {
    size,
    re: make(packed),
    im: make(packed),
    factorRe: make(packed),
    factorIm: make(packed),
    pivotRe: make(size * BLOCK),
    pivotIm: make(size * BLOCK),
  }
}

/** Factors the first `count` matrices of the block; the packed triangle is used up. */
export function factorBlock(block: BlockMatrix, count: number): void {
  const { size: n, re, im, factorRe, factorIm } = block
  for (let k = 0; k < n; k++) {
    invertPivot(block, k, count)
    const pivot = k * BLOCK
    const { pivotRe, pivotIm } = block
    for (let i = k + 1; i < n; i++) {
      const at = ((i * (i + 1)) / 2 + k) * BLOCK
      for (let f = 0; f < count; f++) {
        const a = re[at + f]!
        const b = im[at + f]!
        const c = pivotRe[pivot + f]!
        const d = pivotIm[pivot + f]!
        factorRe[at + f] = a * c - b * d
        factorIm[at + f] = a * d + b * c
      }
    }
    for (let i = k + 1; i < n; i++) {
      const left = ((i * (i + 1)) / 2 + k) * BLOCK
      for (let j = k + 1; j <= i; j++) {
        const right = ((j * (j + 1)) / 2 + k) * BLOCK
        const at = ((i * (i + 1)) / 2 + j) * BLOCK
        for (let f = 0; f < count; f++) {
          const a = factorRe[left + f]!
          const b = factorIm[left + f]!
          const c = re[right + f]!
          const d = im[right + f]!
          re[at + f]! -= a * c - b * d
          im[at + f]! -= a * d + b * c
        }
      }
    }
  }
}

function invertPivot({ re, im, pivotRe, pivotIm }: BlockMatrix, k: number, count: number): void {
  const at = ((k * (k + 1)) / 2 + k) * BLOCK
  const to = k * BLOCK
  for (let f = 0; f < count; f++) {
    const a = re[at + f]!
    const b = im[at + f]!
    const square = a * a + b * b
    pivotRe[to + f] = a / square
    pivotIm[to + f] = -b / square
  }
}

/** Solves for one right side per frequency, in place: entry i of frequency f at i BLOCK + f. */
export function solveBlock(block: BlockMatrix, count: number, re: Float64Array, im: Float64Array): void {
  const { size: n, factorRe, factorIm, pivotRe, pivotIm } = block
  for (let i = 1; i < n; i++) {
    for (let k = 0; k < i; k++) {
      eliminate(factorRe, factorIm, ((i * (i + 1)) / 2 + k) * BLOCK, re, im, i * BLOCK, k * BLOCK, count)
    }
  }
  for (let at = 0; at < n * BLOCK; at += BLOCK) {
    for (let f = 0; f < count; f++) {
      const a = re[at + f]!
      const b = im[at + f]!
      const c = pivotRe[at + f]!
      const d = pivotIm[at + f]!
      re[at + f] = a * c - b * d
      im[at + f] = a * d + b * c
    }
  }
  for (let k = n - 2; k >= 0; k--) {
    for (let i = k + 1; i < n; i++) {
      eliminate(factorRe, factorIm, ((i * (i + 1)) / 2 + k) * BLOCK, re, im, k * BLOCK, i * BLOCK, count)
    }
  }
}

/** target -= factor · source, frequency by frequency */
function eliminate(
  factorRe: Float64Array,
  factorIm: Float64Array,
  factor: number,
  re: Float64Array,
  im: Float64Array,
  target: number,
  source: number,
  count: number,
): void {
  for (let f = 0; f < count; f++) {
    const a = factorRe[factor + f]!
    const b = factorIm[factor + f]!
    const c = re[source + f]!
    const d = im[source + f]!
    re[target + f]! -= a * c - b * d
    im[target + f]! -= a * d + b * c
  }
}
