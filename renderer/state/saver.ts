import type { ApiError, Reply } from '../../electron/api/contract.ts'
import type { Project } from '../../core/project/project.ts'

export type SaveState = 'saved' | 'saving' | ApiError

interface SaverOptions {
  readonly save: (id: string, revision: number, project: Project) => Promise<Reply<{ revision: number }>>
  readonly onState: (state: SaveState) => void
  /** after the last change [ms] */
  readonly wait?: number
  /** after the first change not yet saved, however busily it goes on [ms] */
  readonly longest?: number
  /** until a failed save is tried again [ms] */
  readonly retry?: number
}

/**
 * Saves the newest state of one project, soon after each change and one save at a time.
 * A failed save is kept and tried again; a stale one waits for a person to decide.
 */
export class Saver {
  readonly #options: Required<SaverOptions>
  readonly #id: string
  #revision: number
  #unsaved: Project | null = null
  #unsavedSince = 0
  #timer: ReturnType<typeof setTimeout> | null = null
  #running: Promise<void> | null = null
  #halted = false

  constructor(id: string, revision: number, options: SaverOptions) {
    this.#id = id
    this.#revision = revision
    this.#options = { wait: 350, longest: 800, retry: 4000, ...options }
  }

  get hasUnsaved(): boolean {
    return this.#unsaved !== null || this.#running !== null
  }

  push(project: Project): void {
    const now = Date.now()
    if (this.#unsaved === null) this.#unsavedSince = now
    this.#unsaved = project
    if (this.#halted) return
    this.#options.onState('saving')
    const latest = this.#unsavedSince + this.#options.longest - now
    this.#schedule(Math.max(0, Math.min(this.#options.wait, latest)))
  }

  /** Saves what is pending now. @returns whether everything is safe afterwards */
  async flush(): Promise<boolean> {
    this.#clear()
    await this.#running
    if (this.#unsaved !== null && !this.#halted) await this.#save()
    return this.#unsaved === null
  }

  /** No further saves: the project has been left or goes on under another id. */
  stop(): void {
    this.#halted = true
    this.#clear()
  }

  #schedule(delay: number): void {
    this.#clear()
    this.#timer = setTimeout(() => {
      this.#timer = null
      if (this.#running === null) void this.#save()
    }, delay)
  }

  #clear(): void {
    if (this.#timer !== null) clearTimeout(this.#timer)
    this.#timer = null
  }

  #save(): Promise<void> {
    const project = this.#unsaved
    if (project === null) return Promise.resolve()
    this.#unsaved = null
    this.#options.onState('saving')
    const finished = this.#options
      .save(this.#id, this.#revision, project)
      .then((reply) => this.#settle(project, reply))
      .finally(() => {
        this.#running = null
        if (this.#unsaved !== null && this.#timer === null && !this.#halted) this.#schedule(0)
      })
    this.#running = finished
    return finished
  }

  #settle(project: Project, reply: Reply<{ revision: number }>): void {
    if (reply.ok) {
      this.#revision = reply.value.revision
      if (this.#unsaved === null) this.#options.onState('saved')
      return
    }
    this.#unsaved ??= project
    this.#options.onState(reply.error)
    if (reply.error.code === 'stale' || reply.error.code === 'not-found') this.#halted = true
    else this.#schedule(this.#options.retry)
  }
}
