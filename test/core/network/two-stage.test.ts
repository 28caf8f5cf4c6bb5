import { describe, expect, it } from 'vitest'
import { twoStageChecks } from '../../reference/checks/two-stage.ts'

describe('a machine on a raft agrees with the reference', () => {
  it.each(twoStageChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // the tolerance is the file's own, stated beside each case
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
