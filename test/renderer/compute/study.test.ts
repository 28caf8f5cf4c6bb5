import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { blankProject } from '../../../core/project/create.ts'
import { readProject } from '../../../core/project/read.ts'
import type { Project } from '../../../core/project/project.ts'
import { demoProjects } from '../../core/demo/demo-files.ts'
import { runStudy, type StudyWorker } from '../../../renderer/compute/study.ts'
import type { StudyReply, StudyRequest } from '../../../renderer/compute/study-messages.ts'
import { withDuration } from '../../../renderer/compute/with-duration.ts'
import { FACTORS, tradeLimits, tradeSeries } from '../../../renderer/pages/run-up/duration-trade.ts'

class FakeWorker implements StudyWorker {
  onmessage: ((event: MessageEvent<StudyReply>) => void) | null = null
  onerror: ((event: ErrorEvent) => void) | null = null
  readonly requests: StudyRequest[] = []
  ended = false
  postMessage(request: StudyRequest): void {
    this.requests.push(request)
  }
  terminate(): void {
    this.ended = true
  }
  say(reply: StudyReply): void {
    this.onmessage?.(new MessageEvent('message', { data: reply }))
  }
}

describe('a study', () => {
  const request = { kind: 'durations', project: blankProject('x'), factors: [1] } as const
  const begin = () => {
    const worker = new FakeWorker()
    const heard: StudyReply[] = []
    const stop = runStudy(request, { onreply: (reply) => heard.push(reply) }, () => worker)
    return { worker, heard, stop }
  }
  const answer: StudyReply = { kind: 'duration', factor: 1, runUp: { up: null, down: null } }

  it('hands over each answer and ends its thread with the last', () => {
    const { worker, heard } = begin()
    expect(worker.requests).toEqual([request])
    worker.say(answer)
    expect(worker.ended).toBe(false)
    worker.say({ kind: 'end' })
    expect(worker.ended).toBe(true)
    expect(heard).toEqual([answer, { kind: 'end' }])
  })

  it('says nothing more once it is stopped', () => {
    const { worker, heard, stop } = begin()
    stop()
    worker.say(answer)
    expect([worker.ended, heard]).toEqual([true, []])
  })

  it('says that it failed when its thread dies', () => {
    const { worker, heard } = begin()
    worker.onerror?.({ message: 'out of memory' } as ErrorEvent) // the one member that is read
    expect(heard).toEqual([{ kind: 'failure', message: 'out of memory' }])
    expect(worker.ended).toBe(true)
  })
})

const fan = demoProjects().find(({ file }) => file.startsWith('kiln'))?.project
if (!fan) throw new Error('the fan is among the demonstrations')
const judged: Project = { ...fan, requirements: fan.requirements.filter(({ kind }) => kind === 'runUpForce') }
const runUpOf = (project: Project) =>
  evaluate({ ...project, requirements: [] }, { sweepPoints: 2 }).runUp ?? { up: null, down: null }

describe('other durations', () => {
  const ramps = readProject({
    ...fan,
    runUp: {
      enabled: true,
      up: { law: { by: 'table', entries: [0, 1, 5].map((time) => ({ time, speed: 30 * time })) } },
      down: { law: { by: 'ramp', time: 20 } },
    },
  })

  it.each([
    ['torque', fan],
    ['ramp and table', ramps],
  ])('are the given ones times the factor, by %s', (_, project) => {
    const given = runUpOf(project)
    const longer = runUpOf(withDuration(project, 2.5))
    for (const side of ['up', 'down'] as const) {
      // a few roundings
      expect((longer[side]?.duration ?? NaN) / (given[side]?.duration ?? NaN)).toBeCloseTo(2.5, 12)
    }
  })

  it('leave the project as it is', () => {
    const before = structuredClone(fan)
    withDuration(fan, 3)
    expect(fan).toEqual(before)
  })

  it('begin with the given one and go outwards', () => {
    expect(FACTORS[0]).toBe(1)
    expect([Math.min(...FACTORS), Math.max(...FACTORS)]).toEqual([0.125, 8])
  })

  it('draw the hardest loaded mount of each passage, in rising order, under its limit', () => {
    const trials = [1, 0.5].map((factor) => ({ factor, runUp: runUpOf(withDuration(judged, factor)) }))
    const series = tradeSeries(judged, trials, 'force')
    expect(series.map(({ label, x }) => [label, [...x]])).toEqual([
      ['run-up', [0.5, 1]],
      ['coast-down', [0.5, 1]],
    ])
    const largest = Math.max(
      ...(trials[0]?.runUp.down?.mounts ?? []).map(({ force }) => force.resultant.value),
    )
    expect(series[1]?.y[1]).toBe(largest)
    // a quicker passage leaves less time to build up
    expect(series[1]?.y[0]).toBeLessThan(largest)
    expect(tradeLimits(judged, 'force').map(({ y }) => y)).toEqual([90])
    expect(tradeLimits(judged, 'travel')).toEqual([])
  })
})
