/** Everything outside the project that an absorber is checked against. */
import type { Check } from '../check-type.ts'
import { absorberAppliedChecks } from './absorber-applied.ts'
import { absorberCornerChecks } from './absorber-corner.ts'
import { absorberTableChecks } from './absorber-tables.ts'
import { absorberTextbookChecks } from './absorber-textbook.ts'

export const absorberChecks: readonly Check[] = [
  ...absorberTableChecks,
  ...absorberAppliedChecks,
  ...absorberCornerChecks,
  ...absorberTextbookChecks,
]
