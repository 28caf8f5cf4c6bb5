export interface Notice {
  readonly id: number
  readonly text: string
  readonly kind: 'done' | 'problem'
  readonly action?: { readonly label: string; readonly run: () => void }
}

const SHOWN_FOR = 7000

/** Short lines about what has just happened; problems stay until they are put away. */
class Notices {
  #list = $state.raw<readonly Notice[]>([])
  #count = 0

  get list(): readonly Notice[] {
    return this.#list
  }

  say(text: string, action?: Notice['action']): void {
    const notice = this.#add(text, 'done', action)
    setTimeout(() => {
      this.dismiss(notice.id)
    }, SHOWN_FOR)
  }

  problem(text: string, action?: Notice['action']): void {
    if (!this.#list.some((notice) => notice.text === text)) this.#add(text, 'problem', action)
  }

  dismiss(id: number): void {
    this.#list = this.#list.filter((notice) => notice.id !== id)
  }

  #add(text: string, kind: Notice['kind'], action?: Notice['action']): Notice {
    this.#count += 1
    const notice = { id: this.#count, text, kind, ...(action ? { action } : {}) }
    this.#list = [...this.#list.slice(-3), notice]
    return notice
  }
}

export const notices = new Notices()
