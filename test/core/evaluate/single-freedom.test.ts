import { describe, expect, it } from 'vitest'
import { singleFreedomChecks } from '../../reference/checks/single-freedom.ts'
import { textbookChecks } from '../../reference/checks/textbook.ts'

describe('one freedom agrees with the reference', () => {
  it.each([...singleFreedomChecks, ...textbookChecks].map((check) => [check.id, check] as const))(
    '%s',
    (_, check) => {
      // the tolerance is the file's own, stated beside each case
      expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
    },
  )
})
