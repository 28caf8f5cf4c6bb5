import type { DesktopBridge, Invoke, Reply, Value } from '../../electron/api/contract.ts'
import { bridgeName } from '../../electron/api/bridge-name.ts'
import { httpInvoke } from './bridge-http.ts'

declare global {
  interface Window {
    /** put there by the desktop's preload script; absent in a browser */
    readonly stillbed?: DesktopBridge
  }
}

/** Calls the host, whichever carries it. It never throws: what went wrong is in the reply. */
export const invoke: Invoke = async (endpoint, argument) => {
  try {
    const desktop = window.stillbed
    if (!desktop) return await httpInvoke(endpoint, argument)
    // the mapped type pairs name and endpoint, which indexing by a generic loses
    const call = desktop[bridgeName(endpoint)] as (given: unknown) => Promise<Reply<Value<typeof endpoint>>>
    return await call(argument)
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error)
    return { ok: false, error: { code: 'internal', message } }
  }
}
