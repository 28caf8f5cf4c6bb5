/**
 * What the pages of the desktop can reach: one function per endpoint and three listeners.
 * Bundled into one file without further modules, since a sandboxed preload cannot load any.
 */
import { contextBridge, ipcRenderer } from 'electron'
import { bridgeName } from './api/bridge-name.ts'
import type { ClosingAnswer, EndpointName } from './api/contract.ts'
import { CALL_CHANNEL, CLOSING_CHANNEL, EVENT_CHANNEL } from './channels.ts'

/** The keys of the contract's table, put in by the build. */
declare const ENDPOINT_NAMES: readonly EndpointName[]

const calls = Object.fromEntries(
  ENDPOINT_NAMES.map((endpoint) => [
    bridgeName(endpoint),
    (argument: unknown) => ipcRenderer.invoke(CALL_CHANNEL, endpoint, argument),
  ]),
)

type Listener = (detail: unknown) => void
const listeners = new Map<string, Set<Listener>>()

function listen(name: string): (listener: Listener) => () => void {
  return (listener) => {
    const known = listeners.get(name) ?? new Set()
    listeners.set(name, known.add(listener))
    return () => void known.delete(listener)
  }
}

let closing: (() => Promise<ClosingAnswer>) | null = null

async function answerClosing(): Promise<void> {
  // pages that have not come up yet, or have failed, hold nothing that could be lost
  const answer = closing ? await closing() : { saved: true }
  ipcRenderer.send(CLOSING_CHANNEL, answer)
}

ipcRenderer.on(EVENT_CHANNEL, (_event, name: string, detail: unknown) => {
  if (name === 'window:closing') void answerClosing()
  for (const listener of listeners.get(name) ?? []) listener(detail)
})

contextBridge.exposeInMainWorld('stillbed', {
  ...calls,
  onMenuCommand: listen('menu:command'),
  onProjectShow: listen('project:show'),
  onClosing: (listener: () => Promise<ClosingAnswer>) => {
    closing = listener
    return () => {
      if (closing === listener) closing = null
    }
  },
})
