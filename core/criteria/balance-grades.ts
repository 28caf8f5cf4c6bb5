/**
 * Balance quality grades, eccentricity times angular speed.
 * ISO 21940-11:2016 (formerly ISO 1940-1:2003), table 1, from memory.
 */
export interface BalanceGrade {
  /** as spoken, such as "G 6.3" */
  readonly name: string
  /** e omega [m/s] */
  readonly grade: number
  /** kinds of rotor that are usually balanced so; empty where none was remembered */
  readonly typical: string
}

export const BALANCE_GRADE_SOURCE = {
  source: 'ISO 21940-11:2016 (formerly ISO 1940-1:2003), table 1',
  provenance: 'from memory',
} as const

const TYPICAL: readonly (readonly [figure: number, typical: string])[] = [
  [0.4, 'gyroscopes, spindles of the highest precision'],
  [1, 'drives of grinding machines, audio and video drives'],
  [2.5, 'turbines, compressors, fast motors, drives of machine tools'],
  [6.3, 'fans, pumps, electric motors, machinery in general'],
  [16, 'agricultural machines, crushers, cardan shafts with special requirements'],
  [40, ''],
  [100, ''],
  [250, ''],
  [630, ''],
  [1600, ''],
  [4000, ''],
]

export const balanceGrades: readonly BalanceGrade[] = TYPICAL.map(([figure, typical]) => ({
  name: `G ${figure}`,
  grade: figure / 1000,
  typical,
}))
