import fc from 'fast-check'
import { EVD, Matrix } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import { cholesky, invertLower, solvePositiveDefinite } from '../../../core/numerics/cholesky.ts'
import {
  generalisedEigen,
  symmetricEigen,
  symmetricEigenWork,
} from '../../../core/numerics/symmetric-eigen.ts'

const entry = fc.double({ min: -1, max: 1, noNaN: true })
const square = fc
  .integer({ min: 1, max: 9 })
  .chain((n) => fc.tuple(fc.constant(n), fc.array(entry, { minLength: n * n, maxLength: n * n })))

function rows(n: number, entries: ArrayLike<number>): Matrix {
  return new Matrix(
    Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => entries[i * n + j] ?? 0)),
  )
}

function symmetric(n: number, entries: readonly number[]): Float64Array {
  const at = (i: number, j: number) => entries[i * n + j] ?? 0
  return Float64Array.from(
    { length: n * n },
    (_, k) => at(Math.floor(k / n), k % n) + at(k % n, Math.floor(k / n)),
  )
}

/** A Aᵀ + I / 10: positive definite whatever A. */
function definite(n: number, entries: readonly number[]): Float64Array {
  const a = rows(n, entries)
  const product = a.mmul(a.transpose())
  return Float64Array.from({ length: n * n }, (_, k) => {
    const [i, j] = [Math.floor(k / n), k % n]
    return product.get(i, j) + (i === j ? 0.1 : 0)
  })
}

describe('symmetricEigen', () => {
  // SOURCE ml-matrix (general-purpose library), an implementation of its own. 1e-12: rounding of n ≤ 9.
  it('gives the eigenvalues of a general-purpose library', () => {
    fc.assert(
      fc.property(square, ([n, entries]) => {
        const matrix = symmetric(n, entries)
        const work = symmetricEigenWork(n)
        expect(symmetricEigen(matrix, work)).toBe(true)
        const library = new EVD(rows(n, matrix), { assumeSymmetric: true })
        const expected = library.realEigenvalues.toSorted((a, b) => a - b)
        expected.forEach((value, r) => {
          expect(Math.abs((work.diagonal[r] ?? NaN) - value)).toBeLessThan(1e-12)
        })
      }),
    )
  })

  it('gives vectors with A v = lambda v, orthonormal, and leaves its input alone', () => {
    fc.assert(
      fc.property(square, ([n, entries]) => {
        const matrix = symmetric(n, entries)
        const before = Float64Array.from(matrix)
        const work = symmetricEigenWork(n)
        symmetricEigen(matrix, work)
        expect(matrix).toEqual(before)
        const v = (i: number, r: number) => work.vectors[i * n + r] ?? NaN
        for (let r = 0; r < n; r++) {
          for (let i = 0; i < n; i++) {
            let image = 0
            for (let j = 0; j < n; j++) image += (matrix[i * n + j] ?? 0) * v(j, r)
            expect(Math.abs(image - (work.diagonal[r] ?? NaN) * v(i, r))).toBeLessThan(1e-12)
          }
          for (let s = 0; s < n; s++) {
            let product = 0
            for (let i = 0; i < n; i++) product += v(i, r) * v(i, s)
            expect(Math.abs(product - (r === s ? 1 : 0))).toBeLessThan(1e-12)
          }
        }
      }),
    )
  })
})

describe('generalisedEigen', () => {
  it('gives mass-normalised shapes with K x = lambda M x', () => {
    fc.assert(
      fc.property(square, square, ([n, entries], [, others]) => {
        const mass = definite(n, entries)
        const stiffness = symmetric(n, others)
        const factor = new Float64Array(n * n)
        const inverse = new Float64Array(n * n)
        expect(cholesky(mass, n, factor)).toBe(true)
        invertLower(factor, n, inverse)
        const work = symmetricEigenWork(n)
        const shapes = new Float64Array(n * n)
        expect(generalisedEigen(stiffness, inverse, work, shapes, factor)).toBe(true)
        const times = (matrix: Float64Array, r: number, i: number) => {
          let sum = 0
          for (let j = 0; j < n; j++) sum += (matrix[i * n + j] ?? 0) * (shapes[r * n + j] ?? NaN)
          return sum
        }
        for (let r = 0; r < n; r++) {
          let norm = 0
          for (let i = 0; i < n; i++) {
            norm += (shapes[r * n + i] ?? NaN) * times(mass, r, i)
            // M may be as near to singular as 0.1 against 9, and shapes as large as 3
            expect(
              Math.abs(times(stiffness, r, i) - (work.diagonal[r] ?? NaN) * times(mass, r, i)),
            ).toBeLessThan(1e-10)
          }
          expect(Math.abs(norm - 1)).toBeLessThan(1e-11)
        }
      }),
    )
  })
})

describe('cholesky', () => {
  it('refuses a singular matrix and one that is indefinite', () => {
    expect(cholesky(Float64Array.of(1, 1, 1, 1), 2, new Float64Array(4))).toBe(false)
    expect(cholesky(Float64Array.of(1, 2, 2, 1), 2, new Float64Array(4))).toBe(false)
    expect(solvePositiveDefinite(Float64Array.of(0), [1])).toBeNull()
  })

  it('judges singularity without regard to units', () => {
    expect(cholesky(Float64Array.of(1e12, 0, 0, 1e-12), 2, new Float64Array(4))).toBe(true)
  })

  it('solves A x = b', () => {
    fc.assert(
      fc.property(square, ([n, entries]) => {
        const matrix = definite(n, entries)
        const right = Array.from({ length: n }, (_, i) => i - 1.5)
        const x = solvePositiveDefinite(matrix, right)
        right.forEach((value, i) => {
          let sum = 0
          for (let j = 0; j < n; j++) sum += (matrix[i * n + j] ?? 0) * (x?.[j] ?? NaN)
          expect(Math.abs(sum - value)).toBeLessThan(1e-10) // condition up to about 1e3
        })
      }),
    )
  })
})
