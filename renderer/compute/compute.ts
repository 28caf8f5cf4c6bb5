import type { Project } from '../../core/project/project.ts'
import type { Evaluation } from '../../core/results.ts'
import type { ComputeReply, ComputeRequest } from './messages.ts'

/** The part of a Worker that is used here, so that tests can stand in for one. */
export interface ComputeWorker {
  postMessage(request: ComputeRequest): void
  terminate(): void
  onmessage: ((event: MessageEvent<ComputeReply>) => void) | null
  onerror: ((event: ErrorEvent) => void) | null
}

interface ComputeOptions {
  readonly start: () => ComputeWorker
  readonly onResult: (project: Project, evaluation: Evaluation) => void
  readonly onFailure: (failure: { readonly message: string; readonly stack: string }) => void
  /** after this a computation counts as hung and is ended [ms] */
  readonly limit?: number
}

/**
 * Runs evaluations off the interface's thread, one at a time. While one runs only the newest
 * request waits: those in between are dropped. A worker that dies or hangs is replaced.
 */
export class Compute {
  readonly #options: Required<ComputeOptions>
  #worker: ComputeWorker | null = null
  #running: ComputeRequest | null = null
  #waiting: Project | null = null
  #guard: ReturnType<typeof setTimeout> | null = null
  #count = 0

  constructor(options: ComputeOptions) {
    this.#options = { limit: 30_000, ...options }
  }

  get busy(): boolean {
    return this.#running !== null
  }

  request(project: Project): void {
    this.#waiting = project
    if (this.#running === null) this.#next()
  }

  /** Forgets what runs and waits; late answers are ignored. */
  reset(): void {
    this.#waiting = null
    if (this.#running !== null) this.#discardWorker()
  }

  #next(): void {
    const project = this.#waiting
    if (project === null) return
    this.#waiting = null
    this.#count += 1
    this.#running = { id: this.#count, project }
    this.#worker ??= this.#startWorker()
    this.#worker.postMessage(this.#running)
    this.#guard = setTimeout(() => {
      this.#fail('The computation took too long and was stopped.', '')
    }, this.#options.limit)
  }

  #startWorker(): ComputeWorker {
    const worker = this.#options.start()
    worker.onmessage = (event) => {
      this.#receive(event.data)
    }
    worker.onerror = (event) => {
      this.#fail(event.message || 'The computation stopped unexpectedly.', '')
    }
    return worker
  }

  #receive(reply: ComputeReply): void {
    const request = this.#running
    if (request === null || reply.id !== request.id) return
    this.#finish()
    if ('evaluation' in reply) this.#options.onResult(request.project, reply.evaluation)
    else this.#options.onFailure(reply.failure)
    if (this.#running === null) this.#next()
  }

  #fail(message: string, stack: string): void {
    this.#discardWorker()
    this.#options.onFailure({ message, stack })
    if (this.#running === null) this.#next()
  }

  #discardWorker(): void {
    this.#worker?.terminate()
    this.#worker = null
    this.#finish()
  }

  #finish(): void {
    if (this.#guard !== null) clearTimeout(this.#guard)
    this.#guard = null
    this.#running = null
  }
}

export function startWorker(): ComputeWorker {
  return new Worker(new URL('./worker.ts', import.meta.url), { type: 'module', name: 'evaluate' })
}
