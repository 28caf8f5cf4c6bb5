import { blankProject } from '../../core/project/create.ts'
import type { Project } from '../../core/project/project.ts'
import { readProject } from '../../core/project/read.ts'
import type { Evaluation } from '../../core/results.ts'
import type { ApiError, Invoke } from '../../electron/api/contract.ts'
import { Compute, startWorker, type ComputeWorker } from '../compute/compute.ts'
import { invoke } from './bridge.ts'
import type { Desk } from './desk-types.ts'
import { History } from './history.ts'
import { Saver, type SaveState } from './saver.ts'
import { settings } from './settings.svelte.ts'

const RPM = (2 * Math.PI) / 60

export interface DeskParts {
  readonly invoke: Invoke
  readonly startWorker: () => ComputeWorker
}

/** The open project, its history, its results and its way to the library. */
export class ProjectDesk implements Desk {
  readonly #parts: DeskParts
  readonly #compute: Compute
  #saver: Saver | null = null
  #history = new History<Project>()
  #id = $state<string | null>(null)
  #project = $state.raw<Project>(blankProject())
  #evaluation = $state.raw<Evaluation | null>(null)
  #evaluatedProject = $state.raw<Project | null>(null)
  #evaluating = $state(false)
  #computeFailure = $state<string | null>(null)
  #saveState = $state.raw<SaveState>('saved')
  #cursor = $state<number | null>(null)
  #canUndo = $state<string | null>(null)
  #canRedo = $state<string | null>(null)

  constructor(parts: DeskParts) {
    this.#parts = parts
    this.#compute = new Compute({
      start: parts.startWorker,
      onResult: (project, evaluation) => {
        this.#evaluation = evaluation
        this.#evaluatedProject = project
        this.#computeFailure = null
        this.#evaluating = project !== this.#project
      },
      onFailure: (failure) => {
        this.#evaluating = false
        void this.#reportFailure(failure)
      },
    })
  }

  get id(): string | null {
    return this.#id
  }

  get project(): Project {
    return this.#project
  }

  get evaluation(): Evaluation | null {
    return this.#evaluation
  }

  get evaluatedProject(): Project | null {
    return this.#evaluatedProject
  }

  get evaluating(): boolean {
    return this.#evaluating
  }

  get computeFailure(): string | null {
    return this.#computeFailure
  }

  get saveState(): SaveState {
    return this.#saveState
  }

  get hasUnsaved(): boolean {
    return this.#saver?.hasUnsaved ?? false
  }

  get units(): Project['units'] {
    return this.#id === null ? settings.units : this.#project.units
  }

  get cursorSpeed(): number {
    const duty = this.#project.machine.duty
    return this.#cursor ?? duty.runningSpeed ?? duty.highestSpeed ?? 0
  }

  /** At the running speed the cursor stays with it when it changes. */
  setCursorSpeed(speed: number): void {
    const running = this.#project.machine.duty.runningSpeed
    const atRunning = running !== null && Math.abs(speed - running) < 0.5 * RPM
    this.#cursor = atRunning || !Number.isFinite(speed) ? null : Math.max(0, speed)
  }

  /** @throws InputError when the changed project could not be stored; nothing changes then */
  change(what: string, recipe: (draft: Project) => void, gesture = ''): void {
    const draft = structuredClone(this.#project)
    recipe(draft)
    const changed = readProject(draft)
    if (JSON.stringify(changed) === JSON.stringify(this.#project)) return
    this.#history.record(what, this.#project, gesture, Date.now())
    this.#show(changed)
  }

  get canUndo(): string | null {
    return this.#canUndo
  }

  get canRedo(): string | null {
    return this.#canRedo
  }

  undo(): void {
    const state = this.#history.undo(this.#project)
    if (state) this.#show(state)
  }

  redo(): void {
    const state = this.#history.redo(this.#project)
    if (state) this.#show(state)
  }

  async open(id: string): Promise<void> {
    await this.flush()
    const reply = await this.#parts.invoke('shelf:open', { id })
    if (!reply.ok) throw new DeskError(reply.error)
    this.#settleOn(reply.value.id, reply.value.revision)
    this.#history = new History()
    this.#evaluation = null
    this.#evaluatedProject = null
    this.#computeFailure = null
    this.#cursor = null
    this.#compute.reset()
    this.#project = reply.value.project
    this.#refresh()
  }

  /** @throws DeskError when the last changes could not be saved; the project then stays open */
  async close(): Promise<void> {
    const safe = await this.flush()
    if (!safe && typeof this.#saveState === 'object') throw new DeskError(this.#saveState)
    this.abandon()
  }

  /** Leaves the project without saving what could not be saved. */
  abandon(): void {
    this.#saver?.stop()
    this.#saver = null
    this.#compute.reset()
    this.#id = null
    this.#saveState = 'saved'
    this.#evaluation = null
    this.#evaluating = false
    this.#project = blankProject()
  }

  /** Saves what is pending now. @returns whether everything is safe */
  async flush(): Promise<boolean> {
    return (await this.#saver?.flush()) ?? true
  }

  /** Goes on under a new entry of the library, with history and all; the stored one stays as it is. */
  async keepAsCopy(): Promise<void> {
    const project = structuredClone(this.#project)
    project.job.name = `${project.job.name || 'Untitled'} (kept copy)`
    const reply = await this.#parts.invoke('shelf:create', { project })
    if (!reply.ok) throw new DeskError(reply.error)
    this.#settleOn(reply.value.id, reply.value.revision)
    this.#project = reply.value.project
    this.#refresh()
  }

  #settleOn(id: string, revision: number): void {
    this.#saver?.stop()
    this.#saver = new Saver(id, revision, {
      save: (savedId, savedRevision, project) =>
        this.#parts.invoke('shelf:save', { id: savedId, revision: savedRevision, project }),
      onState: (state) => {
        if (this.#id === id) this.#saveState = state
      },
    })
    this.#id = id
    this.#saveState = 'saved'
  }

  #show(project: Project): void {
    this.#project = project
    this.#saver?.push(project)
    this.#refresh()
  }

  #refresh(): void {
    this.#canUndo = this.#history.canUndo
    this.#canRedo = this.#history.canRedo
    this.#evaluating = true
    this.#compute.request(this.#project)
  }

  async #reportFailure(failure: { readonly message: string; readonly stack: string }): Promise<void> {
    this.#computeFailure = failure.message
    const reply = await this.#parts.invoke('app:log', {
      message: `evaluation: ${failure.message}`.slice(0, 5000),
      stack: failure.stack.slice(0, 20_000),
    })
    if (reply.ok) this.#computeFailure = `${failure.message} (reference ${reply.value.reference})`
  }
}

/** A refusal of the host, in its words. */
export class DeskError extends Error {
  readonly error: ApiError

  constructor(error: ApiError) {
    super(error.message)
    this.name = 'DeskError'
    this.error = error
  }
}

export const desk = new ProjectDesk({ invoke, startWorker })
