import { describe, expect, it } from 'vitest'
import { absorberChecks } from '../../reference/checks/absorber.ts'

describe('absorbers agree with the reference', () => {
  it.each(absorberChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // the tolerance is the file's own, stated beside each case
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
