import { describe, expect, it } from 'vitest'
import { curvedMountChecks } from '../../reference/checks/curved-mounts.ts'
import { deflectionRuleChecks } from '../../reference/checks/deflection-rule.ts'

describe('rest on curved, packed and levelled mounts agrees with the reference', () => {
  const checks = [...curvedMountChecks, ...deflectionRuleChecks]
  it.each(checks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // 1e-8 of the largest in its list: both sides go on until only rounding is unbalanced
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
