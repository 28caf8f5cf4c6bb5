import { describe, expect, it } from 'vitest'
import { runUpChecks } from '../../reference/checks/run-up.ts'

describe('run-up and coast-down agree with the reference', () => {
  it.each(runUpChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // the tolerance is the file's own, stated beside each case
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
