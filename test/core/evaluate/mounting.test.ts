import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { readProject } from '../../../core/project/read.ts'
import { anyMounting } from './random-mounting.ts'

function assertFinite(value: unknown, path = 'evaluation'): void {
  if (typeof value === 'number') expect(Number.isFinite(value), path).toBe(true)
  else if (value instanceof Float64Array) expect(value.every(Number.isFinite), path).toBe(true)
  else if (typeof value === 'object' && value !== null) {
    for (const [key, member] of Object.entries(value)) assertFinite(member, `${path}.${key}`)
  }
}

describe('evaluate, on mounts of every kind', () => {
  it('comes to rest or says why not, without throwing and without a number that is not finite', () => {
    let atRest = 0
    fc.assert(
      fc.property(anyMounting, (input) => {
        const project = readProject(input)
        const result = evaluate(project, { sweepPoints: 60 })
        assertFinite(result)
        const designs = project.mounting.types.filter(({ design }) => design !== null)
        expect(result.components).toHaveLength(designs.length)
        const { statics } = result
        if (statics === null) {
          expect(result.problems.some(({ kind }) => kind !== 'caution')).toBe(true)
          return
        }
        atRest += 1
        // stiffnesses over seven decades and curves as steep: what a balance of 1e-6 leaves at the worst
        expect(statics.loadSumError).toBeLessThan(1e-6)
        expect(statics.lateral === null).toBe(project.analysis.lateralLoad === null)
        if (statics.setting === 'levelled') expect(statics.tilt).toEqual([0, 0])
      }),
      { numRuns: 300 },
    )
    expect(atRest).toBeGreaterThan(100)
  })
})
