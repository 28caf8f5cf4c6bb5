import { describe, expect, it } from 'vitest'
import { rigidBodyChecks } from '../../reference/checks/rigid-body.ts'

describe('a rigid body on a rigid support agrees with the reference', () => {
  it.each(rigidBodyChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // the tolerance is the file's own, stated beside each case
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
