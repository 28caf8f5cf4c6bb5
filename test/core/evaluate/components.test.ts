import { describe, expect, it } from 'vitest'
import { airSpringChecks } from '../../reference/checks/air-springs.ts'
import { rubberPadChecks } from '../../reference/checks/rubber-pads.ts'
import { springChecks } from '../../reference/checks/springs.ts'

const componentChecks = [...springChecks, ...rubberPadChecks, ...airSpringChecks]

describe('springs, pads and air springs agree with the reference', () => {
  it.each(componentChecks.map((check) => [check.id, check] as const))('%s', (_, check) => {
    // the tolerance is the file's own, stated beside each case
    expect(Math.abs(check.ours() - check.expected)).toBeLessThanOrEqual(check.tolerance)
  })
})
