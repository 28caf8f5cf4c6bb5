import type { EndpointName, Invoke, Reply, Value } from '../../electron/api/contract.ts'
import { bridgeName, type BridgeName } from '../../electron/api/bridge-name.ts'
import { httpInvoke } from './bridge-http.ts'

/** What the preload script exposes: one named function per endpoint. */
type PreloadBridge = {
  readonly [E in EndpointName as BridgeName<E>]: (argument: unknown) => Promise<Reply<Value<E>>>
}

declare global {
  interface Window {
    readonly stillbed?: PreloadBridge
  }
}

/** Calls the host, whichever carries it. It never throws: what went wrong is in the reply. */
export const invoke: Invoke = async (endpoint, argument) => {
  try {
    const preload = window.stillbed
    if (!preload) return await httpInvoke(endpoint, argument)
    const call = preload[bridgeName(endpoint)] as (value: unknown) => Promise<Reply<Value<typeof endpoint>>> // the mapped type pairs name and endpoint, which indexing by a generic loses
    return await call(argument)
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error)
    return { ok: false, error: { code: 'internal', message } }
  }
}
