import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { blankProject } from '../../../core/project/create.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Evaluation } from '../../../core/results.ts'
import { Compute, type ComputeWorker } from '../../../renderer/compute/compute.ts'
import type { ComputeReply, ComputeRequest } from '../../../renderer/compute/messages.ts'

/** Results are passed through untouched, so their content plays no part here. */
const NOTHING: Evaluation = {
  problems: [],
  massSummary: null,
  sourceSummaries: [],
  statics: null,
  modes: null,
  modesWithAbsorbers: null,
  response: null,
  absorbers: [],
  verdicts: [],
} as unknown as Evaluation // further members are added to results as the core grows

class FakeWorker implements ComputeWorker {
  onmessage: ((event: MessageEvent<ComputeReply>) => void) | null = null
  onerror: ((event: ErrorEvent) => void) | null = null
  readonly requests: ComputeRequest[] = []
  ended = false

  postMessage(request: ComputeRequest): void {
    this.requests.push(request)
  }

  terminate(): void {
    this.ended = true
  }

  answer(id = this.requests.at(-1)?.id ?? 0): void {
    this.onmessage?.(new MessageEvent('message', { data: { id, evaluation: NOTHING } }))
  }

  die(message: string): void {
    this.onerror?.({ message } as ErrorEvent) // the one member that is read
  }
}

function bench() {
  const workers: FakeWorker[] = []
  const results: string[] = []
  const failures: string[] = []
  const compute = new Compute({
    start: () => {
      const worker = new FakeWorker()
      workers.push(worker)
      return worker
    },
    onResult: (project) => results.push(project.job.name),
    onFailure: (failure) => failures.push(failure.message),
    limit: 1000,
  })
  const ask = (name: string): Project => {
    const project = blankProject(name)
    compute.request(project)
    return project
  }
  return { compute, workers, results, failures, ask }
}

describe('compute', () => {
  beforeEach(() => {
    vi.useFakeTimers()
  })
  afterEach(() => {
    vi.useRealTimers()
  })

  it('computes one at a time and drops what a newer request supersedes', () => {
    const { workers, results, ask } = bench()
    ask('a')
    ask('b')
    ask('c')
    const [worker] = workers
    expect(worker?.requests.map((request) => request.project.job.name)).toEqual(['a'])
    worker?.answer()
    expect(worker?.requests.map((request) => request.project.job.name)).toEqual(['a', 'c'])
    worker?.answer()
    expect(results).toEqual(['a', 'c'])
  })

  it('replaces a worker that dies, says so, and goes on with the newest request', () => {
    const { workers, results, failures, ask } = bench()
    ask('a')
    ask('b')
    workers[0]?.die('out of memory')
    expect(failures).toEqual(['out of memory'])
    expect(workers[0]?.ended).toBe(true)
    expect(workers).toHaveLength(2)
    workers[1]?.answer()
    expect(results).toEqual(['b'])
  })

  it('ends a computation that hangs', () => {
    const { compute, workers, failures, ask } = bench()
    ask('a')
    vi.advanceTimersByTime(1001)
    expect(workers[0]?.ended).toBe(true)
    expect(failures).toHaveLength(1)
    expect(compute.busy).toBe(false)
  })

  it('passes on a failure in words and takes the next request', () => {
    const { workers, results, failures, ask } = bench()
    ask('a')
    const id = workers[0]?.requests[0]?.id ?? 0
    workers[0]?.onmessage?.(
      new MessageEvent('message', { data: { id, failure: { message: 'a bug', stack: '' } } }),
    )
    expect(failures).toEqual(['a bug'])
    ask('b')
    workers[0]?.answer()
    expect(results).toEqual(['b'])
  })

  it('ignores the late answer of a project that has been left', () => {
    const { compute, workers, results, ask } = bench()
    ask('a')
    compute.reset()
    expect(compute.busy).toBe(false)
    ask('b')
    workers[0]?.answer(1)
    expect(results).toEqual([])
    workers[1]?.answer()
    expect(results).toEqual(['b'])
  })
})
