/**
 * Elastic constants of natural rubber from its hardness.
 * [1] P. B. Lindley, Engineering Design with Natural Rubber (NRPRA/MRPRA): table of hardness against
 *     E0, G, k and bulk modulus, written down from memory.
 * [2] A. N. Gent, On the relation between indentation hardness and Young's modulus, Trans. Institution
 *     of the Rubber Industry 34, 1958, from memory.
 * The two differ by up to a quarter at one hardness, and compounds of one hardness differ as much:
 * measured moduli come first.
 */
export const RUBBER_SOURCE = {
  source: 'P. B. Lindley, Engineering Design with Natural Rubber',
  provenance: 'from memory',
} as const

export interface RubberModuli {
  /** Young's modulus at small strain [Pa] */
  readonly youngsModulus: number
  /** [Pa] */
  readonly shearModulus: number
  /** k in the compression modulus E0 (1 + 2 k S²) */
  readonly compressionFactor: number
  /** [Pa] */
  readonly bulkModulus: number
}

/** Rows of [1]: IRHD, E0 [MPa], G [MPa], k, bulk modulus [MPa]. */
export const rubberTable: readonly (readonly [
  hardness: number,
  youngs: number,
  shear: number,
  factor: number,
  bulk: number,
])[] = [
  [30, 0.92, 0.3, 0.93, 1000],
  [35, 1.18, 0.37, 0.89, 1000],
  [40, 1.5, 0.45, 0.85, 1000],
  [45, 1.8, 0.54, 0.8, 1000],
  [50, 2.2, 0.64, 0.73, 1030],
  [55, 3.25, 0.81, 0.64, 1090],
  [60, 4.45, 1.06, 0.57, 1150],
  [65, 5.85, 1.37, 0.54, 1210],
  [70, 7.35, 1.73, 0.53, 1270],
  [75, 9.4, 2.22, 0.52, 1330],
]

const MEGA = 1e6

/**
 * Moduli at a hardness, straight between the rows of the table.
 * @param hardness [IRHD]
 * @returns null outside 30 to 75 IRHD
 */
export function rubberModuli(hardness: number): RubberModuli | null {
  const above = rubberTable.findIndex(([row]) => row >= hardness)
  const high = rubberTable[above]
  const low = rubberTable[Math.max(0, above - 1)]
  if (!high || !low || !(hardness >= low[0])) return null
  const share = high === low ? 0 : (hardness - low[0]) / (high[0] - low[0])
  const between = (column: 1 | 2 | 3 | 4) => low[column] + share * (high[column] - low[column])
  return {
    youngsModulus: MEGA * between(1),
    shearModulus: MEGA * between(2),
    compressionFactor: between(3),
    bulkModulus: MEGA * between(4),
  }
}

/**
 * Young's modulus [Pa] from Shore A hardness by [2]: 0.0981 (56 + 7.62336 A) / (0.137505 (254 - 2.54 A)) MPa.
 * IRHD and Shore A figures are nearly the same in the middle of the scale.
 */
export function youngsModulusFromShore(shore: number): number {
  return (MEGA * 0.0981 * (56 + 7.62336 * shore)) / (0.137505 * (254 - 2.54 * shore))
}
