import { blankProject } from '../../../core/project/create.ts'
import { readProjectText } from '../../../core/project/read.ts'
import type { UnitSystem } from '../../../core/units/dimensions.ts'
import type { Arg, EndpointName, ShelfRow, Value } from '../../../electron/api/contract.ts'
import { invoke } from '../../state/bridge.ts'
import { DeskError, desk } from '../../state/desk.svelte.ts'
import { notices } from '../../state/notices.svelte.ts'
import { downloadProject } from '../../state/project-file.ts'
import { route } from '../../state/route.svelte.ts'
import { importRefusal } from './import-words.ts'
import { sortRows, tagsOf, type ShelfOrder } from './shelf-order.ts'

/** What lies on the Shelf, as searched, sorted and filtered. */
export class Shelf {
  #query = $state('')
  #wastebasket = $state(false)
  #tag = $state<string | null>(null)
  #rows = $state.raw<readonly ShelfRow[]>([])
  #thrownAway = $state(0)
  #loaded = $state(false)
  #asked = 0
  order = $state.raw<ShelfOrder>({ column: 'changedAt', rising: false })

  get query(): string {
    return this.#query
  }

  get wastebasket(): boolean {
    return this.#wastebasket
  }

  get tag(): string | null {
    return this.#tag
  }

  /** False until the first answer: nothing is said about an empty Shelf before. */
  get loaded(): boolean {
    return this.#loaded
  }

  get thrownAway(): number {
    return this.#thrownAway
  }

  readonly tags = $derived(tagsOf(this.#rows))
  readonly rows = $derived(
    sortRows(
      this.#rows.filter((row) => this.#tag === null || row.tags.includes(this.#tag)),
      this.order,
    ),
  )

  search(query: string): void {
    this.#query = query
    void this.load()
  }

  showWastebasket(shown: boolean): void {
    this.#wastebasket = shown
    this.#tag = null
    this.#loaded = false
    void this.load()
  }

  chooseTag(tag: string): void {
    this.#tag = this.#tag === tag ? null : tag
  }

  async load(): Promise<void> {
    this.#asked += 1
    const asked = this.#asked
    const [reply, basket] = await Promise.all([
      invoke('shelf:list', { query: this.#query, wastebasket: this.#wastebasket }),
      invoke('shelf:list', { query: '', wastebasket: true }),
    ])
    if (asked !== this.#asked) return // a newer search is under way
    if (!reply.ok) {
      notices.problem(`The Shelf cannot be read: ${reply.error.message}`)
      return
    }
    this.#rows = reply.value
    if (basket.ok) this.#thrownAway = basket.value.length
    if (this.#tag !== null && !reply.value.some((row) => row.tags.includes(this.#tag ?? ''))) this.#tag = null
    this.#loaded = true
  }

  async create(name: string, units: UnitSystem): Promise<void> {
    const project = { ...blankProject(name), units }
    const created = await this.#ask('shelf:create', { project })
    if (created) await this.open(created.id)
  }

  async open(id: string): Promise<void> {
    try {
      await desk.open(id)
      route.goTo('machine')
    } catch (error) {
      if (!(error instanceof DeskError)) throw error
      notices.problem(error.message)
    }
  }

  /** Name and tags in one go. @returns whether they are stored */
  async describe(row: ShelfRow, name: string, tags: readonly string[]): Promise<boolean> {
    if (name.trim() === '') {
      notices.problem('A project needs a name.')
      return false
    }
    if (name !== row.name && !(await this.#ask('shelf:rename', { id: row.id, name }))) return false
    if (tags.join('\n') !== row.tags.join('\n')) {
      const stored = await this.#ask('shelf:open', { id: row.id })
      if (!stored) return false
      const project = structuredClone(stored.project)
      project.job.tags = [...tags]
      if (!(await this.#ask('shelf:save', { id: row.id, revision: stored.revision, project }))) return false
    }
    await this.load()
    return true
  }

  async duplicate(row: ShelfRow): Promise<void> {
    const copy = await this.#ask('shelf:duplicate', { id: row.id })
    if (copy) notices.say(`“${copy.name}” is on the Shelf.`)
    await this.load()
  }

  async remove(row: ShelfRow): Promise<void> {
    if (await this.#ask('shelf:remove', { id: row.id })) {
      notices.say(`“${row.name || 'Untitled'}” is in the wastebasket.`, {
        label: 'Put back',
        run: () => void this.restore(row),
      })
    }
    await this.load()
  }

  async restore(row: ShelfRow): Promise<void> {
    if (await this.#ask('shelf:restore', { id: row.id })) {
      notices.say(`“${row.name || 'Untitled'}” is back on the Shelf.`)
    }
    await this.load()
  }

  async erase(row: ShelfRow): Promise<void> {
    const reply = await invoke('shelf:erase', { id: row.id })
    if (reply.ok) notices.say(`“${row.name || 'Untitled'}” is erased.`)
    else notices.problem(reply.error.message)
    await this.load()
  }

  async exportFile(row: ShelfRow): Promise<void> {
    const stored = await this.#ask('shelf:open', { id: row.id })
    if (stored) downloadProject(stored.project)
  }

  async importFiles(files: readonly File[]): Promise<void> {
    for (const file of files) await this.#importFile(file)
    await this.load()
  }

  async #importFile(file: File): Promise<void> {
    try {
      const text = await file.text()
      readProjectText(text) // refuses here what the library would refuse, naming the field
      const row = await this.#ask('shelf:import', { text })
      if (row) notices.say(`“${row.name || 'Untitled'}” is on the Shelf.`)
    } catch (error) {
      notices.problem(`${file.name} was not taken. ${importRefusal(error)}`)
    }
  }

  async #ask<E extends EndpointName>(endpoint: E, argument: Arg<E>): Promise<Value<E> | null> {
    const reply = await invoke(endpoint, argument)
    if (reply.ok) return reply.value
    notices.problem(reply.error.message)
    return null
  }
}
