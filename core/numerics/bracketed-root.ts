/**
 * The place between `low` and `high` where a function changes its sign, by halving, to the last
 * bit: for the short searches of component design, where safety counts and speed does not.
 * @returns null when both ends have the same sign or a value is not a number
 */
export function bracketedRoot(f: (x: number) => number, low: number, high: number): number | null {
  let [left, right] = [low, high]
  const start = f(left)
  if (start === 0) return left
  if (!(start * f(right) <= 0)) return null
  for (;;) {
    const middle = left + (right - left) / 2
    if (middle <= left || middle >= right) return middle
    const value = f(middle)
    if (Number.isNaN(value)) return null
    if (value * start > 0) left = middle
    else right = middle
  }
}
