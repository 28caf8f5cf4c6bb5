/** Dash patterns in the order of use [px]; curves are told apart by these before any colour. */
export const DASHES: readonly (readonly number[])[] = [
  [],
  [9, 4],
  [2, 3],
  [12, 4, 2, 4],
  [5, 3],
  [14, 3, 2, 3, 2, 3],
  [1, 5],
  [18, 6],
]

export function dashOf(index: number): readonly number[] {
  return DASHES[index % DASHES.length] ?? []
}
