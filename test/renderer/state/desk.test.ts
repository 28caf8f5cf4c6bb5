import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { blankProject } from '../../../core/project/create.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Evaluation } from '../../../core/results.ts'
import type { EndpointName, Invoke } from '../../../electron/api/contract.ts'
import type { ComputeWorker } from '../../../renderer/compute/compute.ts'
import { DeskError, ProjectDesk } from '../../../renderer/state/desk.svelte.ts'

const ID = '11111111-2222-4333-8444-555555555555'
const OTHER = '99999999-2222-4333-8444-555555555555'

/** A host with one project in its library, and a worker that answers at once. */
function bench(options: { stale?: boolean } = {}) {
  const calls: { endpoint: EndpointName; argument: unknown }[] = []
  let stored: Project = { ...blankProject('Fan'), units: 'US' }
  let revision = 3
  const invoke = (async (endpoint: EndpointName, argument: unknown) => {
    calls.push({ endpoint, argument })
    await Promise.resolve()
    if (endpoint === 'shelf:open') return { ok: true, value: { id: ID, revision, project: stored } }
    if (endpoint === 'shelf:create') {
      const { project } = argument as { project: Project } // as the desk passed it
      return { ok: true, value: { id: OTHER, revision: 1, project } }
    }
    if (endpoint === 'shelf:save') {
      if (options.stale) return { ok: false, error: { code: 'stale', message: 'newer' } }
      stored = (argument as { project: Project }).project // as the desk passed it
      revision += 1
      return { ok: true, value: { revision, changedAt: '' } }
    }
    return { ok: true, value: { reference: 'R-1' } }
  }) as unknown as Invoke // one fake answers every endpoint
  const startWorker = (): ComputeWorker => {
    const worker: ComputeWorker = {
      onmessage: null,
      onerror: null,
      terminate: () => undefined,
      postMessage: ({ id }) => {
        const evaluation = { problems: [] } as unknown as Evaluation // only passed through
        queueMicrotask(() => worker.onmessage?.(new MessageEvent('message', { data: { id, evaluation } })))
      },
    }
    return worker
  }
  const desk = new ProjectDesk({ invoke, startWorker })
  return { desk, calls, stored: () => stored }
}

function setMass(desk: ProjectDesk, mass: number, gesture = ''): void {
  desk.change(
    'mass',
    (draft) => {
      if (draft.machine.massProperties.from === 'typed') draft.machine.massProperties.mass = mass
    },
    gesture,
  )
}

function massOf(project: Project): number | null {
  return project.machine.massProperties.from === 'typed' ? project.machine.massProperties.mass : null
}

describe('desk', () => {
  beforeEach(() => {
    vi.useFakeTimers()
  })
  afterEach(() => {
    vi.useRealTimers()
  })

  it('opens, changes, computes and saves a project within a second', async () => {
    const { desk, stored } = bench()
    await desk.open(ID)
    expect(desk.units).toBe('US')
    setMass(desk, 850)
    expect(desk.saveState).toBe('saving')
    await vi.advanceTimersByTimeAsync(1000)
    expect(desk.saveState).toBe('saved')
    expect(massOf(stored())).toBe(850)
    expect(desk.evaluatedProject).toBe(desk.project)
    expect(desk.evaluating).toBe(false)
  })

  it('refuses what could not be stored, and then changes nothing', async () => {
    const { desk, calls } = bench()
    await desk.open(ID)
    setMass(desk, 850)
    const before = desk.project
    expect(() => setMass(desk, 0)).toThrow(InputError)
    expect(() => setMass(desk, Number.NaN)).toThrow(InputError)
    expect(desk.project).toBe(before)
    await vi.advanceTimersByTimeAsync(1000)
    expect(calls.filter((call) => call.endpoint === 'shelf:save')).toHaveLength(1)
  })

  it('never edits the project in place and takes no step for a change that changes nothing', async () => {
    const { desk } = bench()
    await desk.open(ID)
    const before = desk.project
    setMass(desk, 850)
    expect(massOf(before)).toBeNull()
    const after = desk.project
    setMass(desk, 850)
    expect(desk.project).toBe(after)
    desk.undo()
    expect(desk.project).toBe(before)
    expect(desk.canUndo).toBeNull()
  })

  it('undoes one drag as one step and saves what undo brings back', async () => {
    const { desk, stored } = bench()
    await desk.open(ID)
    for (const mass of [100, 200, 300]) setMass(desk, mass, 'drag#1')
    desk.undo()
    expect(massOf(desk.project)).toBeNull()
    desk.redo()
    expect(massOf(desk.project)).toBe(300)
    await vi.advanceTimersByTimeAsync(1000)
    expect(massOf(stored())).toBe(300)
  })

  it('saves pending changes before it goes back to the Shelf', async () => {
    const { desk, stored } = bench()
    await desk.open(ID)
    setMass(desk, 850)
    await desk.close()
    expect(desk.id).toBeNull()
    expect(massOf(stored())).toBe(850)
  })

  it('keeps a stale project open, and can go on with it as a copy', async () => {
    const { desk, calls } = bench({ stale: true })
    await desk.open(ID)
    setMass(desk, 850)
    await expect(desk.close()).rejects.toThrow(DeskError)
    expect(desk.id).toBe(ID)
    expect(massOf(desk.project)).toBe(850)
    await desk.keepAsCopy()
    expect(desk.id).toBe(OTHER)
    expect(desk.saveState).toBe('saved')
    expect(desk.project.job.name).toBe('Fan (kept copy)')
    expect(calls.at(-1)?.endpoint).toBe('shelf:create')
  })

  it('stands at the running speed until it is moved, and there again when put back', async () => {
    const { desk } = bench()
    await desk.open(ID)
    expect(desk.cursorSpeed).toBe(0)
    desk.change('speed', (draft) => {
      draft.machine.duty.runningSpeed = 150
    })
    expect(desk.cursorSpeed).toBe(150)
    desk.setCursorSpeed(90)
    expect(desk.cursorSpeed).toBe(90)
    desk.setCursorSpeed(150)
    desk.change('speed', (draft) => {
      draft.machine.duty.runningSpeed = 160
    })
    expect(desk.cursorSpeed).toBe(160)
  })
})
