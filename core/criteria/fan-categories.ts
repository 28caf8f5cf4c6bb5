/**
 * Application categories of industrial fans: balance grade and limits in the factory.
 * ISO 14694:2003, from memory, with medium confidence above all for BV-1 and BV-2. The limits in
 * place stand in severity.ts.
 */
export interface FanCategory {
  readonly id: 'BV-1' | 'BV-2' | 'BV-3' | 'BV-4' | 'BV-5'
  /** balance quality grade e omega [m/s] */
  readonly balanceGrade: number
  /** RMS velocity in the factory, rigidly and flexibly mounted [m/s] */
  readonly factory: { readonly rigid: number; readonly flexible: number }
}

export const FAN_CATEGORY_SOURCE = { source: 'ISO 14694:2003', provenance: 'from memory' } as const

const category = (id: FanCategory['id'], grade: number, rigid: number, flexible: number): FanCategory => ({
  id,
  balanceGrade: grade / 1000,
  factory: { rigid: rigid / 1000, flexible: flexible / 1000 },
})

export const fanCategories: readonly FanCategory[] = [
  category('BV-1', 16, 9, 11.2),
  category('BV-2', 16, 3.5, 5.6),
  category('BV-3', 6.3, 2.8, 3.5),
  category('BV-4', 2.5, 1.8, 2.8),
  category('BV-5', 1, 1.4, 1.8),
]
