import type { Settings } from '../../electron/api/contract.ts'
import { invoke } from './bridge.ts'

/** How this person reads: the sheet and the units of the Shelf and of new projects. */
class ReaderSettings {
  #value = $state.raw<Settings>({ sheet: 'system', units: 'SI' })
  #systemIsDark = $state(false)

  get sheet(): Settings['sheet'] {
    return this.#value.sheet
  }

  get units(): Settings['units'] {
    return this.#value.units
  }

  /** The sheet that is on the screen. */
  get shownSheet(): 'light' | 'dark' {
    if (this.#value.sheet !== 'system') return this.#value.sheet
    return this.#systemIsDark ? 'dark' : 'light'
  }

  async load(): Promise<void> {
    const dark = matchMedia('(prefers-color-scheme: dark)')
    this.#systemIsDark = dark.matches
    dark.addEventListener('change', () => {
      this.#systemIsDark = dark.matches
    })
    const reply = await invoke('settings:get', null)
    if (reply.ok) this.#value = reply.value
  }

  async set(changed: Partial<Settings>): Promise<void> {
    this.#value = { ...this.#value, ...changed }
    await invoke('settings:set', this.#value)
  }
}

export const settings = new ReaderSettings()
