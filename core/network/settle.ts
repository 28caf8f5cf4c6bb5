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
  /** stiffness that stands for the law where its tangent is no guide, above zero unless it is slack throughout */
  readonly usual: number
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
  /** what each spring bears there, in the order of the springs */
  readonly forces: readonly number[]
  readonly iterations: number
  /** largest unbalanced force over its scale */
  readonly residual: number
  /** slack: some motion meets no resistance; slow: no balance found; empty when converged */
  readonly reason: '' | 'slack' | 'slow'
}

const MOST_ITERATIONS = 80
/** Balance to this share of the scale is wanted. */
const WANTED = 1e-13
/**
 * Where springs differ by many decades, rounding leaves more than that: a balance this good is accepted
 * once steps no longer halve what is left.
 */
const ACCEPTED = 1e-6
/** What may be left of the force along a step, as a share. */
const LOST = 0.5
const MOST_TRIALS = 60

/**
 * Rest position of a network with curved springs, by Newton's method with a line search. Springs
 * that stiffen or soften but never fall have one rest position only, and the search goes to it.
 */
export function settle(problem: SettleProblem): Settled {
  const { springs, scale, load } = problem
  let displacement: Float64Array = Float64Array.from(problem.start ?? new Float64Array(load.length))
  let state = unbalanced(problem, displacement)
  let residual = sizeOf(state, scale)
  const outcome = (iterations: number, reason: Settled['reason']): Settled => ({
    converged: reason === '',
    displacement,
    forces: springs.map(({ row, offset, law }) => law(rowTimes(row, displacement) + offset).force),
    iterations,
    residual,
    reason,
  })
  let flat = false
  for (let iterations = 0; iterations < MOST_ITERATIONS; iterations++) {
    if (residual <= WANTED) return outcome(iterations, '')
    // a curve may begin flat: there the usual stiffness leads on
    const newton = solvePositiveDefinite(tangentMatrix(problem, displacement), state)
    const step = newton ?? solvePositiveDefinite(usualMatrix(problem), state)
    flat = newton === null
    if (step === null) return outcome(iterations, residual <= ACCEPTED ? '' : 'slack')
    const next = along(problem, displacement, state, step)
    const left = sizeOf(next.state, scale)
    if (residual <= ACCEPTED && left > residual / 2) return outcome(iterations, '')
    displacement = next.displacement
    state = next.state
    residual = left
  }
  return outcome(MOST_ITERATIONS, flat ? 'slack' : 'slow')
}

/**
 * The step, or the part of it at which the force along it has lost at least half of its size without
 * turning round by more: what a spring that never falls always allows.
 */
function along(
  problem: SettleProblem,
  from: Float64Array,
  state: Float64Array,
  step: Float64Array,
): { readonly displacement: Float64Array; readonly state: Float64Array } {
  const force = dot(state, step)
  let [low, high] = [0, Infinity]
  let size = 1
  for (let trial = 0; ; trial++) {
    const displacement = from.map((value, index) => value + size * (step[index] ?? 0))
    const after = unbalanced(problem, displacement)
    const left = dot(after, step)
    // a whole step that falls short is for the next iteration to lengthen
    const fits = left >= -LOST * force && (left <= LOST * force || high === Infinity)
    if (fits || trial === MOST_TRIALS) return { displacement, state: after }
    if (left < 0) high = size
    else low = size
    size = (low + high) / 2
  }
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

function tangentMatrix(problem: SettleProblem, displacement: Float64Array): Float64Array {
  return stiffnessMatrix(problem, ({ row, offset, law }) => law(rowTimes(row, displacement) + offset).tangent)
}

function usualMatrix(problem: SettleProblem): Float64Array {
  return stiffnessMatrix(problem, ({ usual }) => usual)
}

function stiffnessMatrix(
  { springs, load, further }: SettleProblem,
  stiffness: (spring: RestoringSpring) => number,
): Float64Array {
  const n = load.length
  const matrix = further ? Float64Array.from(further.matrix) : new Float64Array(n * n)
  for (const spring of springs) addProduct(matrix, n, spring.row, stiffness(spring))
  return matrix
}

function sizeOf(forces: Float64Array, scale: Float64Array): number {
  return forces.reduce((largest, force, index) => Math.max(largest, Math.abs(force) / (scale[index] ?? 1)), 0)
}

function dot(a: Float64Array, b: Float64Array): number {
  return a.reduce((sum, value, index) => sum + value * (b[index] ?? 0), 0)
}
