import type { Pair } from './minimax.ts'

/**
 * Downhill simplex search in two parameters, for functions with kinks: needs values only and always gets
 * somewhere, though not to the last digit.
 * Source: J. A. Nelder and R. Mead, A simplex method for function minimization, Computer Journal 7, 1965.
 * @param value may be Infinity where p is not usable
 * @param size edge of the first simplex
 */
export function simplexSearch(
  value: (p: Pair) => number,
  start: Pair,
  size: number,
  mostEvaluations: number,
): { readonly parameters: Pair; readonly value: number } {
  const at = (p: Pair) => ({ p, v: value(p) })
  let corners = [at(start), at([start[0] + size, start[1]]), at([start[0], start[1] + size])]
  for (let evaluations = 3; evaluations < mostEvaluations;) {
    corners = corners.toSorted((one, other) => one.v - other.v)
    const [best, middle, worst] = corners
    if (!best || !middle || !worst) break
    const edge = Math.max(Math.abs(worst.p[0] - best.p[0]), Math.abs(worst.p[1] - best.p[1]))
    if (edge < 1e-7) break
    const centre: Pair = [(best.p[0] + middle.p[0]) / 2, (best.p[1] + middle.p[1]) / 2]
    const along = (factor: number) =>
      at([centre[0] + factor * (worst.p[0] - centre[0]), centre[1] + factor * (worst.p[1] - centre[1])])
    const reflected = along(-1)
    evaluations++
    if (reflected.v < best.v) {
      const stretched = along(-2)
      evaluations++
      corners = [best, middle, stretched.v < reflected.v ? stretched : reflected]
    } else if (reflected.v < middle.v) {
      corners = [best, middle, reflected]
    } else {
      const drawn = along(reflected.v < worst.v ? -0.5 : 0.5)
      evaluations++
      if (drawn.v < Math.min(reflected.v, worst.v)) corners = [best, middle, drawn]
      else {
        const towards = (p: Pair) => at([(p[0] + best.p[0]) / 2, (p[1] + best.p[1]) / 2])
        corners = [best, towards(middle.p), towards(worst.p)]
        evaluations += 2
      }
    }
  }
  const [first] = corners.toSorted((one, other) => one.v - other.v)
  return first ? { parameters: first.p, value: first.v } : { parameters: start, value: Infinity }
}
