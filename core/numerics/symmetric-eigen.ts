/**
 * Eigenvalues and vectors of small dense symmetric matrices, plain and generalised, in flat
 * typed arrays without allocation after `symmetricEigenWork`, so that thousands can be solved in turn.
 * Method: Householder reduction to tridiagonal form and implicit QL with Wilkinson's shift.
 * B. N. Parlett, The Symmetric Eigenvalue Problem, SIAM, 1998; J. H. Wilkinson and C. Reinsch,
 * Handbook for Automatic Computation II: Linear Algebra, Springer, 1971 (procedures tred2, tql2).
 */
export interface SymmetricEigenWork {
  readonly size: number
  readonly diagonal: Float64Array
  readonly beside: Float64Array
  /** row-major; after a solve column r is eigenvector r */
  readonly vectors: Float64Array
}

export function symmetricEigenWork(size: number): SymmetricEigenWork {
  return {
    size,
    diagonal: new Float64Array(size),
    beside: new Float64Array(size),
    vectors: new Float64Array(size * size),
  }
}

/** More rounds than this for one eigenvalue never happen with finite numbers. */
const MOST_ROUNDS = 60
/** Less than this is nothing: squares of smaller numbers lose digits or vanish. */
const NOTHING = 1e-130

/**
 * Solves A x = lambda x. `work.diagonal` receives the eigenvalues in rising order and
 * `work.vectors` the orthonormal eigenvectors as columns.
 * @param matrix symmetric, row-major; left as it is
 * @returns whether it converged (it always does for finite input)
 */
export function symmetricEigen(matrix: Float64Array, work: SymmetricEigenWork): boolean {
  work.vectors.set(matrix)
  tridiagonalise(work)
  const converged = implicitQl(work)
  sortRising(work)
  return converged
}

/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of size n by construction */
function tridiagonalise({ size: n, diagonal: d, beside: e, vectors: v }: SymmetricEigenWork): void {
  for (let j = 0; j < n; j++) d[j] = v[(n - 1) * n + j]!
  for (let i = n - 1; i > 0; i--) {
    let magnitude = 0
    let h = 0
    for (let k = 0; k < i; k++) magnitude += Math.abs(d[k]!)
    if (magnitude < NOTHING) {
      e[i] = d[i - 1]!
      for (let j = 0; j < i; j++) {
        d[j] = v[(i - 1) * n + j]!
        v[i * n + j] = 0
        v[j * n + i] = 0
      }
    } else {
      for (let k = 0; k < i; k++) {
        const x = d[k]! / magnitude
        d[k] = x
        h += x * x
      }
      let f = d[i - 1]!
      let g = f > 0 ? -Math.sqrt(h) : Math.sqrt(h)
      e[i] = magnitude * g
      h -= f * g
      d[i - 1] = f - g
      for (let j = 0; j < i; j++) e[j] = 0
      for (let j = 0; j < i; j++) {
        f = d[j]!
        v[j * n + i] = f
        g = e[j]! + v[j * n + j]! * f
        for (let k = j + 1; k < i; k++) {
          const x = v[k * n + j]!
          g += x * d[k]!
          e[k]! += x * f
        }
        e[j] = g
      }
      f = 0
      for (let j = 0; j < i; j++) {
        const x = e[j]! / h
        e[j] = x
        f += x * d[j]!
      }
      const hh = f / (h + h)
      for (let j = 0; j < i; j++) e[j]! -= hh * d[j]!
      for (let j = 0; j < i; j++) {
        f = d[j]!
        g = e[j]!
        for (let k = j; k < i; k++) v[k * n + j]! -= f * e[k]! + g * d[k]!
        d[j] = v[(i - 1) * n + j]!
        v[i * n + j] = 0
      }
    }
    d[i] = h
  }
  accumulate(n, d, v)
  e[0] = 0
}

function accumulate(n: number, d: Float64Array, v: Float64Array): void {
  for (let i = 0; i < n - 1; i++) {
    v[(n - 1) * n + i] = v[i * n + i]!
    v[i * n + i] = 1
    const h = d[i + 1]!
    if (h !== 0) {
      for (let k = 0; k <= i; k++) d[k] = v[k * n + i + 1]! / h
      for (let j = 0; j <= i; j++) {
        let g = 0
        for (let k = 0; k <= i; k++) g += v[k * n + i + 1]! * v[k * n + j]!
        for (let k = 0; k <= i; k++) v[k * n + j]! -= g * d[k]!
      }
    }
    for (let k = 0; k <= i; k++) v[k * n + i + 1] = 0
  }
  for (let j = 0; j < n; j++) {
    d[j] = v[(n - 1) * n + j]!
    v[(n - 1) * n + j] = 0
  }
  v[n * n - 1] = 1
}

function implicitQl({ size: n, diagonal: d, beside: e, vectors: v }: SymmetricEigenWork): boolean {
  for (let i = 1; i < n; i++) e[i - 1] = e[i]!
  e[n - 1] = 0
  let shift = 0
  let largest = 0
  for (let l = 0; l < n; l++) {
    largest = Math.max(largest, Math.abs(d[l]!) + Math.abs(e[l]!))
    const least = Math.max(NOTHING, Number.EPSILON * largest)
    let m = l
    while (m < n - 1 && Math.abs(e[m]!) > least) m++
    let rounds = 0
    while (m > l && Math.abs(e[l]!) > least) {
      if (++rounds > MOST_ROUNDS) return false
      let g = d[l]!
      let p = (d[l + 1]! - g) / (2 * e[l]!)
      let r = Math.sqrt(p * p + 1)
      if (p < 0) r = -r
      d[l] = e[l]! / (p + r)
      d[l + 1] = e[l]! * (p + r)
      const next = d[l + 1]!
      let h = g - d[l]!
      for (let i = l + 2; i < n; i++) d[i]! -= h
      shift += h
      p = d[m]!
      let c = 1
      let c2 = c
      let c3 = c
      const beyond = e[l + 1]!
      let s = 0
      let s2 = 0
      for (let i = m - 1; i >= l; i--) {
        c3 = c2
        c2 = c
        s2 = s
        g = c * e[i]!
        h = c * p
        r = Math.sqrt(p * p + e[i]! * e[i]!)
        e[i + 1] = s * r
        s = e[i]! / r
        c = p / r
        p = c * d[i]! - s * g
        d[i + 1] = h + s * (c * g + s * d[i]!)
        for (let k = 0; k < n; k++) {
          const at = k * n + i
          const x = v[at + 1]!
          const y = v[at]!
          v[at + 1] = s * y + c * x
          v[at] = c * y - s * x
        }
      }
      p = (-s * s2 * c3 * beyond * e[l]!) / next
      e[l] = s * p
      d[l] = c * p
    }
    d[l]! += shift
    e[l] = 0
  }
  return true
}

function sortRising({ size: n, diagonal: d, vectors: v }: SymmetricEigenWork): void {
  for (let i = 0; i < n - 1; i++) {
    let least = i
    for (let j = i + 1; j < n; j++) if (d[j]! < d[least]!) least = j
    if (least === i) continue
    const value = d[least]!
    d[least] = d[i]!
    d[i] = value
    for (let k = 0; k < n; k++) {
      const x = v[k * n + i]!
      v[k * n + i] = v[k * n + least]!
      v[k * n + least] = x
    }
  }
}

/**
 * Solves K x = lambda M x with M = L Lᵀ given through G = L⁻¹ (`invertLower`).
 * @param shapes receives the mass-normalised vectors, xᵀ M x = 1, one after the other (row r is vector r)
 * @param scratch of size n²
 * @returns whether it converged; eigenvalues in `work.diagonal`, rising
 */
export function generalisedEigen(
  stiffness: Float64Array,
  inverseFactor: Float64Array,
  work: SymmetricEigenWork,
  shapes: Float64Array,
  scratch: Float64Array,
): boolean {
  const n = work.size
  const { vectors } = work
  reduce(stiffness, inverseFactor, n, scratch, vectors)
  tridiagonalise(work)
  const converged = implicitQl(work)
  sortRising(work)
  for (let r = 0; r < n; r++) {
    for (let i = 0; i < n; i++) {
      let sum = 0
      for (let k = i; k < n; k++) sum += inverseFactor[k * n + i]! * vectors[k * n + r]!
      shapes[r * n + i] = sum
    }
  }
  return converged
}

/** target = G K Gᵀ, lower triangle and its mirror. */
function reduce(
  stiffness: Float64Array,
  g: Float64Array,
  n: number,
  scratch: Float64Array,
  target: Float64Array,
): void {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let sum = 0
      for (let k = 0; k <= i; k++) sum += g[i * n + k]! * stiffness[k * n + j]!
      scratch[i * n + j] = sum
    }
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0
      for (let k = 0; k <= j; k++) sum += scratch[i * n + k]! * g[j * n + k]!
      target[i * n + j] = sum
      target[j * n + i] = sum
    }
  }
}
