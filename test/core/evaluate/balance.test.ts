import { describe, expect, it } from 'vitest'
import { balanceChecks } from '../../reference/checks/balance.ts'

describe('balance grades and single frequencies agree with the reference', () => {
  it.each(balanceChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // the tolerance is the file's own, stated beside each case
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
