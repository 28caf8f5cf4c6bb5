/** Changes of one gesture that follow each other within this time are one step of undo [ms]. */
export const GESTURE_PAUSE = 1000

interface Step<T> {
  readonly what: string
  readonly state: T
  readonly gesture: string
  at: number
}

let gestureCount = 0

/**
 * Name of one drag from press to release: its changes are one step however long it rests
 * in between, and never join the drag before it.
 */
export function newGesture(name: string): string {
  gestureCount += 1
  return `${name}#${gestureCount}`
}

/** Undo without limit over immutable states: what was, what came after, and in which words. */
export class History<T> {
  #past: Step<T>[] = []
  #future: Step<T>[] = []
  #open = false

  get canUndo(): string | null {
    return this.#past.at(-1)?.what ?? null
  }

  get canRedo(): string | null {
    return this.#future.at(-1)?.what ?? null
  }

  /**
   * @param what the change in plain words, as shown on the undo button
   * @param before state before the change
   * @param gesture empty: always a step of its own
   * @param now [ms]
   */
  record(what: string, before: T, gesture: string, now: number): void {
    this.#future = []
    const last = this.#past.at(-1)
    if (last && this.#open && joins(last, gesture, now)) {
      last.at = now
      return
    }
    this.#past.push({ what, state: before, gesture, at: now })
    this.#open = true
  }

  /** @returns the state to go back to, or null when there is none */
  undo(present: T): T | null {
    return this.#move(this.#past, this.#future, present)
  }

  redo(present: T): T | null {
    return this.#move(this.#future, this.#past, present)
  }

  #move(from: Step<T>[], to: Step<T>[], present: T): T | null {
    const step = from.pop()
    if (!step) return null
    to.push({ ...step, state: present })
    this.#open = false
    return step.state
  }
}

function joins<T>(last: Step<T>, gesture: string, now: number): boolean {
  if (gesture === '' || gesture !== last.gesture) return false
  return gesture.includes('#') || now - last.at <= GESTURE_PAUSE
}
