import { describe, expect, it } from 'vitest'
import { minimax, type Pair, type Piece } from '../../../core/numerics/minimax.ts'
import { simplexSearch } from '../../../core/numerics/simplex-search.ts'

/** (p - centre)' diag(weights) (p - centre) + lift. */
const bowl =
  (centre: Pair, weights: Pair, lift = 0) =>
  ([x, y]: Pair): Piece => {
    const [dx, dy] = [x - centre[0], y - centre[1]]
    return {
      value: weights[0] * dx * dx + weights[1] * dy * dy + lift,
      gradient: [2 * weights[0] * dx, 2 * weights[1] * dy],
      hessian: [2 * weights[0], 0, 2 * weights[1]],
    }
  }
const plane =
  (slope: Pair, at: number) =>
  ([x, y]: Pair): Piece => ({
    value: slope[0] * x + slope[1] * y + at,
    gradient: slope,
    hessian: [0, 0, 0],
  })

describe('minimax of smooth pieces', () => {
  it('finds the bottom of one piece', () => {
    const found = minimax((p) => [bowl([0.3, -0.2], [1, 4], 7)(p)], [0, 0])
    expect(found.converged).toBe(true)
    expect(found.value).toBeCloseTo(7, 14)
    expect(found.parameters[0]).toBeCloseTo(0.3, 10)
  })

  it('settles where two pieces are level and push apart', () => {
    // by symmetry at the middle of the centres, height 1/4 of the distance squared
    const found = minimax((p) => [bowl([-1, 0], [1, 1])(p), bowl([1, 0], [1, 1])(p)], [0.4, 0.9])
    expect(found.converged).toBe(true)
    expect(found.value).toBeCloseTo(1, 12)
    expect(Math.hypot(...found.parameters)).toBeLessThan(1e-9) // the step at which it stops
    expect(found.iterations).toBeLessThan(12)
  })

  it('settles in a corner of three pieces', () => {
    const pieces = [plane([1, 0], 0), plane([0, 1], 0), plane([-1, -1], 3)]
    const found = minimax((p) => pieces.map((piece) => piece(p)), [0.1, 0.2])
    expect(found.converged).toBe(true)
    expect(found.value).toBeCloseTo(1, 12) // x = y = 3 - x - y
  })

  it('works with curvature that only the second piece has', () => {
    const found = minimax((p) => [plane([1, 0], 0)(p), bowl([2, 1], [1, 1])(p)], [0, 0])
    // on the axis of the bowl: x = (x - 2)²
    expect(found.converged).toBe(true)
    expect(found.value).toBeCloseTo(1, 12)
    expect(found.parameters[1]).toBeCloseTo(1, 9)
  })

  it('keeps inside where the pieces exist', () => {
    const found = minimax((p) => (p[0] > 0.5 ? null : [bowl([0.4, 0], [1, 1])(p)]), [-3, 0])
    expect(found.converged).toBe(true)
    expect(found.parameters[0]).toBeCloseTo(0.4, 9)
  })

  it('says that it did not converge when there is no bottom or no start', () => {
    expect(minimax((p) => [plane([1, 0], 0)(p)], [0, 0]).converged).toBe(false)
    const nowhere = minimax(() => null, [0, 0])
    expect(nowhere.converged).toBe(false)
    expect(Number.isFinite(nowhere.value)).toBe(true)
  })
})

describe('simplex search', () => {
  it('comes near the bottom of a function with a kink', () => {
    const found = simplexSearch(
      ([x, y]) => Math.max(Math.abs(x - 1), Math.abs(y + 2), x + y),
      [0, 0],
      0.5,
      400,
    )
    expect(found.value).toBeLessThan(1e-5) // its own edge tolerance is 1e-7
  })

  it('avoids places where the function is not defined', () => {
    const found = simplexSearch(([x, y]) => (x < 0 ? Infinity : (x - 0.1) ** 2 + y * y), [1, 1], 0.5, 400)
    expect(found.parameters[0]).toBeCloseTo(0.1, 4)
  })
})
