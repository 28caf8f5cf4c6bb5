import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { speedsWithin, troubledSpan } from '../../../core/verdict/trial-span.ts'
import { CORNERS, sketchProject } from '../mounts/machine-project.ts'

const force = (id: string, speeds: 'running' | 'operating' | 'chart', limit: number) => ({
  kind: 'transmittedForce' as const,
  id,
  speeds,
  limit,
})
const project = sketchProject({
  places: CORNERS,
  more: {
    requirements: [
      force('met', 'chart', 1e6),
      force('running', 'running', 1e-3),
      force('operating', 'operating', 1e-3),
      { kind: 'mountLoad', id: 'load', limit: 1e-3 },
    ],
  },
})
const { verdicts } = evaluate(project)
const judged = (...ids: readonly string[]) => verdicts.filter(({ requirement }) => ids.includes(requirement))

describe('troubledSpan', () => {
  it('is the widest span of what fails, and leaves out what is met', () => {
    expect(troubledSpan(project, judged('met', 'running'))).toBe('running')
    expect(troubledSpan(project, judged('running', 'operating'))).toBe('operating')
    expect(troubledSpan(project, judged('met'))).toBeNull()
    expect(troubledSpan(project, judged('load'))).toBeNull()
  })
})

describe('speedsWithin', () => {
  const speeds = Float64Array.of(50, 80, 100, 120, 150)
  const range = {
    ...project,
    machine: { ...project.machine, duty: { ...project.machine.duty, lowestSpeed: 80, highestSpeed: 120 } },
  }

  it('keeps the speeds of a span with its ends', () => {
    expect([...speedsWithin(range, 'running', speeds)]).toEqual([100])
    expect([...speedsWithin(range, 'operating', speeds)]).toEqual([80, 100, 120])
    expect(speedsWithin(range, 'chart', speeds)).toEqual(speeds)
    expect(speedsWithin(range, null, speeds)).toHaveLength(0)
  })

  it('still lets a trial find the lever that helps', () => {
    const advised = verdicts.find(({ requirement }) => requirement === 'running')
    expect(advised?.advice).toContain('What helps most')
  })
})
