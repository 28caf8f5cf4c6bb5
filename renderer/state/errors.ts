import { invoke } from './bridge.ts'
import { notices } from './notices.svelte.ts'

const seen = new Set<string>()

/** Anything that was not expected: logged with a reference, said in one line, the project stays. */
export async function reportError(error: unknown): Promise<void> {
  const known = error instanceof Error
  const message = known ? error.message : String(error)
  if (message.includes('ResizeObserver loop')) return
  if (seen.has(message)) return
  seen.add(message)
  const reply = await invoke('app:log', {
    message: message.slice(0, 5000),
    stack: (known ? (error.stack ?? '') : '').slice(0, 20_000),
  })
  const reference = reply.ok ? ` Reference ${reply.value.reference}.` : ''
  notices.problem(`Something went wrong: ${message}. Your project is still here.${reference}`)
}

/** @see reportError */
export function watchErrors(): void {
  window.addEventListener('error', (event) => {
    void reportError(event.error ?? event.message)
  })
  window.addEventListener('unhandledrejection', (event) => {
    void reportError(event.reason)
  })
}
