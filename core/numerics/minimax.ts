/**
 * Least worst of several smooth functions of two parameters: minimise max_i v_i(p).
 * Sequential quadratic programming on the exact derivatives: each step minimises t + d'Wd/2 subject to
 * v_i + g_i d <= t, with W the multiplier-weighted Hessian. At an optimum with equal peaks the step is
 * Newton's method on the optimality conditions (equal values, opposed gradients), so it converges
 * quadratically; away from it a growing shift of W shortens the step until it is an improvement.
 * Method: J. Nocedal and S. J. Wright, Numerical Optimization, 2nd ed., 2006 (sequential quadratic
 * programming), in the minimax form; with two parameters the active set is found by trying them all.
 */

export type Pair = readonly [number, number]

/** One of the functions at the present parameters. */
export interface Piece {
  readonly value: number
  readonly gradient: Pair
  /** second derivatives 11, 12, 22 */
  readonly hessian: readonly [number, number, number]
}

export interface MinimaxResult {
  readonly parameters: Pair
  /** the least worst value found */
  readonly value: number
  readonly converged: boolean
  readonly iterations: number
  /** length of the last step that the optimality conditions asked for */
  readonly residual: number
}

interface Step {
  readonly d: Pair
  readonly length: number
  readonly predicted: number
}

const MOST_ITERATIONS = 60
/** Quadratic convergence leaves the square of this. */
const STEP_TOLERANCE = 1e-9

/**
 * @param pieces every function that can be the largest near p; null or empty where p is not usable
 * @param start a usable pair of parameters
 * @param longest longest step allowed
 */
export function minimax(
  pieces: (p: Pair) => readonly Piece[] | null,
  start: Pair,
  longest = 0.5,
): MinimaxResult {
  let p = start
  let here = pieces(p)
  if (here === null || here.length === 0) {
    return { parameters: p, value: Number.MAX_VALUE, converged: false, iterations: 0, residual: longest }
  }
  let shift = 0
  let best = largest(here)
  let step = nextStep(here, shift, longest)
  for (let iteration = 1; iteration <= MOST_ITERATIONS; iteration++) {
    const trial: Pair = [p[0] + step.d[0], p[1] + step.d[1]]
    const there = pieces(trial)
    if (there !== null && there.length > 0) {
      const value = largest(there)
      const after = nextStep(there, shift, longest)
      const improves = value < best + 1e-4 * step.predicted
      // near the optimum the worst value is level to rounding: there the shrinking step decides
      if (improves || (after.length < 0.5 * step.length && value - best < 1e-3)) {
        if (step.length < STEP_TOLERANCE && shift === 0) {
          return { parameters: trial, value, converged: true, iterations: iteration, residual: after.length }
        }
        p = trial
        here = there
        best = value
        shift = shift < 1e-3 ? 0 : shift / 10
        step = shift === 0 && after.length <= longest ? after : nextStep(here, shift, longest)
        continue
      }
      if (step.length < STEP_TOLERANCE && shift === 0 && Math.abs(value - best) < 1e-12) {
        return { parameters: p, value: best, converged: true, iterations: iteration, residual: step.length }
      }
    }
    shift = shift === 0 ? 0.1 : shift * 4
    if (shift > 1e12) break
    step = nextStep(here, shift, longest)
  }
  return {
    parameters: p,
    value: best,
    converged: false,
    iterations: MOST_ITERATIONS,
    residual: nextStep(here, 0, longest).length,
  }
}

function largest(pieces: readonly Piece[]): number {
  return pieces.reduce((most, piece) => Math.max(most, piece.value), -Infinity)
}

function nextStep(pieces: readonly Piece[], shift: number, longest: number): Step {
  let size = 0
  for (const { hessian } of pieces) size = Math.max(size, Math.abs(hessian[0]) + Math.abs(hessian[2]))
  const scale = size > 0 ? size : 1
  // first-order multipliers, then the Lagrangian's curvature with them
  const first = quadraticStep(pieces, [scale, 0, scale])
  const w: [number, number, number] = [0, 0, 0]
  pieces.forEach(({ hessian }, index) => {
    const weight = first.multipliers[index] ?? 0
    w[0] += weight * hessian[0]
    w[1] += weight * hessian[1]
    w[2] += weight * hessian[2]
  })
  let extra = shift * scale
  for (let attempt = 0; attempt < 40; attempt++) {
    const found = quadraticStep(pieces, [w[0] + extra, w[1], w[2] + extra])
    const length = Math.hypot(found.d[0], found.d[1])
    if (found.valid && length <= longest) return { d: found.d, length, predicted: found.predicted }
    extra = extra === 0 ? 1e-2 * scale : extra * 3
  }
  const length = Math.hypot(first.d[0], first.d[1])
  const short = Math.min(1, longest / length)
  return {
    d: [first.d[0] * short, first.d[1] * short],
    length: length * short,
    predicted: first.predicted * short,
  }
}

interface QuadraticStep {
  readonly d: Pair
  readonly multipliers: readonly number[]
  /** change of the worst value that the model promises, negative */
  readonly predicted: number
  readonly valid: boolean
}

/** Solves the quadratic subproblem by trying every active set of one, two and three pieces. */
function quadraticStep(pieces: readonly Piece[], w: readonly [number, number, number]): QuadraticStep {
  const worst = largest(pieces)
  let best: QuadraticStep = { d: [0, 0], multipliers: [], predicted: 0, valid: false }
  let bestModel = Infinity
  const consider = (active: readonly number[], d: Pair, lambda: readonly number[]) => {
    if (lambda.some((value) => !(value >= -1e-12))) return
    const lead = pieces[active[0] ?? 0]
    if (!lead || !Number.isFinite(d[0]) || !Number.isFinite(d[1])) return
    const level = lead.value + dot(lead.gradient, d)
    const slack = 1e-10 * (1 + Math.abs(level - worst))
    for (const { value, gradient } of pieces) if (value + dot(gradient, d) > level + slack) return
    const model = level + (w[0] * d[0] * d[0] + 2 * w[1] * d[0] * d[1] + w[2] * d[1] * d[1]) / 2
    if (model >= bestModel) return
    bestModel = model
    const multipliers = pieces.map(() => 0)
    active.forEach((piece, index) => (multipliers[piece] = lambda[index] ?? 0))
    best = { d, multipliers, predicted: Math.min(0, model - worst), valid: true }
  }
  pieces.forEach((one, i) => {
    const alone = solveAlone(one, w)
    if (alone) consider([i], alone, [1])
    for (let j = i + 1; j < pieces.length; j++) {
      const two = pieces[j]
      if (!two) continue
      const pair = solvePair(one, two, w)
      if (pair) consider([i, j], pair.d, pair.lambda)
      for (let k = j + 1; k < pieces.length; k++) {
        const three = pieces[k]
        const corner = three && solveCorner(one, two, three, w)
        if (corner) consider([i, j, k], corner.d, corner.lambda)
      }
    }
  })
  return best
}

function solveAlone({ gradient: g }: Piece, w: readonly [number, number, number]): Pair | null {
  const det = w[0] * w[2] - w[1] * w[1]
  if (!(det > 0 && w[0] > 0)) return null
  return [(-w[2] * g[0] + w[1] * g[1]) / det, (w[1] * g[0] - w[0] * g[1]) / det]
}

function solvePair(
  one: Piece,
  two: Piece,
  w: readonly [number, number, number],
): { d: Pair; lambda: Pair } | null {
  const e: Pair = [one.gradient[0] - two.gradient[0], one.gradient[1] - two.gradient[1]]
  const square = dot(e, e)
  if (!(square > 0)) return null
  const n: Pair = [-e[1], e[0]]
  const curvature = dot(n, times(w, n))
  if (!(curvature > 0)) return null
  const along = (two.value - one.value) / square
  const fixed: Pair = [along * e[0], along * e[1]]
  const s = -(dot(n, two.gradient) + dot(n, times(w, fixed))) / curvature
  const d: Pair = [fixed[0] + s * n[0], fixed[1] + s * n[1]]
  const wd = times(w, d)
  const lambda = -(e[0] * (wd[0] + two.gradient[0]) + e[1] * (wd[1] + two.gradient[1])) / square
  return { d, lambda: [lambda, 1 - lambda] }
}

function solveCorner(
  one: Piece,
  two: Piece,
  three: Piece,
  w: readonly [number, number, number],
): { d: Pair; lambda: readonly [number, number, number] } | null {
  const a: Pair = [one.gradient[0] - three.gradient[0], one.gradient[1] - three.gradient[1]]
  const b: Pair = [two.gradient[0] - three.gradient[0], two.gradient[1] - three.gradient[1]]
  const det = a[0] * b[1] - a[1] * b[0]
  if (det === 0) return null
  const r = three.value - one.value
  const s = three.value - two.value
  const d: Pair = [(r * b[1] - s * a[1]) / det, (a[0] * s - b[0] * r) / det]
  const wd = times(w, d)
  const right: Pair = [-wd[0] - three.gradient[0], -wd[1] - three.gradient[1]]
  const first = (right[0] * b[1] - right[1] * b[0]) / det
  const second = (a[0] * right[1] - a[1] * right[0]) / det
  return { d, lambda: [first, second, 1 - first - second] }
}

function dot(a: Pair, b: Pair): number {
  return a[0] * b[0] + a[1] * b[1]
}

function times(w: readonly [number, number, number], d: Pair): Pair {
  return [w[0] * d[0] + w[1] * d[1], w[1] * d[0] + w[2] * d[1]]
}
