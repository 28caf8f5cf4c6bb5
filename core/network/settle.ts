import { solvePositiveDefinite } from '../numerics/cholesky.ts'
import { addProduct } from './assemble.ts'
import type { SparseRow } from './kinematics.ts'
import { addScaled, rowTimes } from './statics.ts'

/** A spring that may be curved: its travel is row . q + offset, its force resists that travel. */
export interface RestoringSpring {
  readonly row: SparseRow
  /** travel where q is zero, from packing [m] */
  readonly offset: number
  readonly law: (travel: number) => { readonly force: number; readonly tangent: number }
}

export interface SettleProblem {
  readonly springs: readonly RestoringSpring[]
  /** force on each freedom */
  readonly load: Float64Array
  /** size of a force in each freedom that counts as large: the weight, and the weight times a length */
  readonly scale: Float64Array
  /** where to begin; left out: zero */
  readonly start?: Float64Array
  /** a further stiffness about a state, row-major */
  readonly further?: { readonly matrix: Float64Array; readonly about: Float64Array }
}

export interface Settled {
  readonly converged: boolean
  readonly displacement: Float64Array
  readonly iterations: number
  /** largest unbalanced force over its scale */
  readonly residual: number
  /** slack: some motion meets no resistance; slow: no balance found; empty when converged */
  readonly reason: '' | 'slack' | 'slow'
}

const MOST_ITERATIONS = 80
/** Balance to this share of the scale is wanted; to the second it is accepted when rounding ends the way. */
const WANTED = 1e-13
const ACCEPTED = 1e-9
/** A step is shortened while the force along it still turns round by more than this share. */
const TURNED = 0.9

/**
 * Rest position of a network with curved springs, by Newton's method with a line search. Springs
 * that stiffen or soften but never fall have one rest position only, and the search goes to it.
 */
export function settle(problem: SettleProblem): Settled {
  const n = problem.load.length
  let displacement = Float64Array.from(problem.start ?? new Float64Array(n))
  let state = unbalanced(problem, displacement)
  let residual = sizeOf(state, problem.scale)
  for (let iterations = 0; iterations < MOST_ITERATIONS; iterations++) {
    const done = (reason: Settled['reason']): Settled => ({
      converged: reason === '',
      displacement,
      iterations,
      residual,
      reason,
    })
    if (residual <= WANTED) return done('')
    const step = solvePositiveDefinite(tangentMatrix(problem, displacement), state)
    if (step === null) return done(residual <= ACCEPTED ? '' : 'slack')
    const along = dot(state, step)
    let size = 1
    let next = stepped(displacement, step, size)
    let after = unbalanced(problem, next)
    while (dot(after, step) < -TURNED * along && size > 1e-9) {
      size /= 2
      next = stepped(displacement, step, size)
      after = unbalanced(problem, next)
    }
    const left = sizeOf(after, problem.scale)
    if (residual <= ACCEPTED && left >= residual) return done('')
    displacement = next
    state = after
    residual = left
  }
  return { converged: false, displacement, iterations: MOST_ITERATIONS, residual, reason: 'slow' }
}

/** Load less what the springs bear at a displacement. */
function unbalanced({ springs, load, further }: SettleProblem, displacement: Float64Array): Float64Array {
  const left = Float64Array.from(load)
  for (const { row, offset, law } of springs) {
    addScaled(left, row, -law(rowTimes(row, displacement) + offset).force)
  }
  if (further) {
    const n = load.length
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const moved = (displacement[j] ?? 0) - (further.about[j] ?? 0)
        left[i] = (left[i] ?? 0) - (further.matrix[i * n + j] ?? 0) * moved
      }
    }
  }
  return left
}

function tangentMatrix({ springs, load, further }: SettleProblem, displacement: Float64Array): Float64Array {
  const n = load.length
  const matrix = further ? Float64Array.from(further.matrix) : new Float64Array(n * n)
  for (const { row, offset, law } of springs) {
    addProduct(matrix, n, row, law(rowTimes(row, displacement) + offset).tangent)
  }
  return matrix
}

function stepped(from: Float64Array, step: Float64Array, size: number): Float64Array<ArrayBuffer> {
  return Float64Array.from(from, (value, index) => value + size * (step[index] ?? 0))
}

function sizeOf(forces: Float64Array, scale: Float64Array): number {
  return forces.reduce((largest, force, index) => Math.max(largest, Math.abs(force) / (scale[index] ?? 1)), 0)
}

function dot(a: Float64Array, b: Float64Array): number {
  return a.reduce((sum, value, index) => sum + value * (b[index] ?? 0), 0)
}
