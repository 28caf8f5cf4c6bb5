import { cholesky, invertLower } from '../numerics/cholesky.ts'
import { generalisedEigen, symmetricEigenWork } from '../numerics/symmetric-eigen.ts'
import type { System } from './assemble.ts'

/** Undamped natural modes: K phi = omega² M phi, phiᵀ M phi = 1. */
export interface UndampedModes {
  readonly count: number
  /** rising [rad²/s²]; negative where the network is unstable */
  readonly omegaSquared: Float64Array
  /** mass-normalised shapes one after the other: freedom i of mode r at r * count + i */
  readonly shapes: Float64Array
}

/**
 * Undamped modes of a network. Elements whose stiffness changes with frequency count with their
 * static stiffness.
 * @returns null when the mass matrix is not positive definite
 */
export function undampedModes(system: System): UndampedModes | null {
  const n = system.freedoms.count
  const factor = new Float64Array(n * n)
  const inverse = new Float64Array(n * n)
  if (!cholesky(system.mass, n, factor)) return null
  invertLower(factor, n, inverse)
  const work = symmetricEigenWork(n)
  const shapes = new Float64Array(n * n)
  if (!generalisedEigen(system.stiffness, inverse, work, shapes, factor)) return null
  return { count: n, omegaSquared: work.diagonal, shapes }
}

/** Shapeᵀ · matrix · shape for every pair of modes, row-major. */
export function modalMatrix(matrix: Float64Array, { count: n, shapes }: UndampedModes): Float64Array {
  const half = new Float64Array(n * n)
  const result = new Float64Array(n * n)
  for (let i = 0; i < n; i++) {
    for (let r = 0; r < n; r++) {
      let sum = 0
      for (let j = 0; j < n; j++) sum += (matrix[i * n + j] ?? 0) * (shapes[r * n + j] ?? 0)
      half[i * n + r] = sum
    }
  }
  for (let r = 0; r < n; r++) {
    for (let s = 0; s <= r; s++) {
      let sum = 0
      for (let i = 0; i < n; i++) sum += (shapes[r * n + i] ?? 0) * (half[i * n + s] ?? 0)
      result[r * n + s] = sum
      result[s * n + r] = sum
    }
  }
  return result
}

/**
 * Share of kinetic energy of mode r in each freedom, phi_i (M phi)_i: products of inertia count
 * half to each of their two freedoms, so that a share may be slightly negative. Sums to 1.
 */
export function energyShares(
  system: System,
  { count: n, shapes }: UndampedModes,
  mode: number,
): Float64Array {
  return Float64Array.from({ length: n }, (_, i) => {
    let momentum = 0
    for (let j = 0; j < n; j++) momentum += (system.mass[i * n + j] ?? 0) * (shapes[mode * n + j] ?? 0)
    return (shapes[mode * n + i] ?? 0) * momentum
  })
}
