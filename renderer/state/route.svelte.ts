import { tick } from 'svelte'

export const STEPS = ['machine', 'mounts', 'response', 'run-up', 'absorber', 'report'] as const
export type Step = (typeof STEPS)[number]

export const STEP_NAMES: Readonly<Record<Step, string>> = {
  machine: 'Machine',
  mounts: 'Mounts',
  response: 'Response',
  'run-up': 'Run-up',
  absorber: 'Absorber',
  report: 'Report',
}

/** Which sheet lies on the desk. The address keeps it, so that a reload comes back to it. */
class Route {
  #step = $state<Step>('machine')

  get step(): Step {
    return this.#step
  }

  /** @param field path of a field in the project that shall take the focus there */
  goTo(step: Step, field?: string): void {
    this.#step = step
    if (field !== undefined) void focusField(field)
  }
}

export const route = new Route()

/** The step on which a field of the project is edited. */
export function stepOfField(field: string): Step {
  if (field.startsWith('mounting')) return 'mounts'
  if (field.startsWith('runUp')) return 'run-up'
  if (field.startsWith('absorbers')) return 'absorber'
  if (field.startsWith('requirements')) return 'response'
  return 'machine'
}

/**
 * Puts the focus on the element with `data-field` of this path, or of the nearest path around it
 * (`mounting.placed[2].position[0]`, then `mounting.placed[2].position`, ...).
 */
export async function focusField(field: string): Promise<void> {
  await tick()
  for (let path = field; path !== ''; path = path.replace(/(\[[^[\]]*\]|\.?[^.[\]]+)$/, '')) {
    const found = document.querySelector<HTMLElement>(`[data-field="${CSS.escape(path)}"]`)
    if (!found) continue
    const target = found.matches(FOCUSABLE) ? found : found.querySelector<HTMLElement>(FOCUSABLE)
    found.scrollIntoView({ block: 'center' })
    target?.focus()
    return
  }
}

const FOCUSABLE = 'input, select, textarea, button, [tabindex]'

/** Project and step in the address: `#/project/<id>/mounts`; null for the Shelf. */
export function readAddress(hash: string): { readonly id: string; readonly step: Step } | null {
  const match = /^#\/project\/([0-9a-f-]{36})(?:\/([a-z-]+))?$/.exec(hash)
  if (!match?.[1]) return null
  return { id: match[1], step: STEPS.find((step) => step === match[2]) ?? 'machine' }
}

export function addressOf(id: string | null, step: Step): string {
  return id === null ? '#/shelf' : `#/project/${id}/${step}`
}
