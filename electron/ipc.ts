import { ipcMain, type WebContents } from 'electron'
import type { ClosingAnswer, HostEvents, Reply } from './api/contract.ts'
import { isEndpoint, type Dispatch } from './api/dispatch.ts'
import { CALL_CHANNEL, CLOSING_CHANNEL, EVENT_CHANNEL } from './channels.ts'
import { isTrustedSender } from './origin.ts'

const refusal = (message: string): Reply<never> => ({ ok: false, error: { code: 'not-found', message } })

/**
 * The one door from the pages to the API. Untrusted senders and unknown endpoints get an answer
 * too: silence would leave a page waiting.
 * @param ours the contents of our window, null while there is none
 */
export function answerCalls(dispatch: Dispatch, ours: () => WebContents | null): void {
  ipcMain.handle(CALL_CHANNEL, async (event, endpoint: unknown, argument: unknown) => {
    if (!isTrustedSender(event, ours())) return refusal('Only the pages of Stillbed may call.')
    if (typeof endpoint !== 'string' || !isEndpoint(endpoint)) return refusal('There is no such endpoint.')
    return dispatch(endpoint, argument)
  })
}

export function sendEvent<E extends keyof HostEvents>(
  contents: WebContents,
  name: E,
  detail: HostEvents[E],
): void {
  contents.send(EVENT_CHANNEL, name, detail)
}

/**
 * Asks the pages to finish their pending save.
 * @param limit how long they may take [ms]
 * @returns null when no answer came in time
 */
export function askBeforeClosing(contents: WebContents, limit: number): Promise<ClosingAnswer | null> {
  return new Promise((resolve) => {
    const end = (answer: ClosingAnswer | null) => {
      clearTimeout(timer)
      ipcMain.off(CLOSING_CHANNEL, take)
      resolve(answer)
    }
    const take = (event: Electron.IpcMainEvent, answer: unknown) => {
      if (isTrustedSender(event, contents)) end(readAnswer(answer))
    }
    const timer = setTimeout(() => end(null), limit)
    ipcMain.on(CLOSING_CHANNEL, take)
    contents.send(EVENT_CHANNEL, 'window:closing', null)
  })
}

function readAnswer(raw: unknown): ClosingAnswer | null {
  if (typeof raw !== 'object' || raw === null || !('saved' in raw)) return null
  if (raw.saved === true) return { saved: true }
  const { message, fileName, text } = raw as Record<string, unknown> // an object, as tested above
  if (typeof message !== 'string' || typeof fileName !== 'string' || typeof text !== 'string') return null
  return { saved: false, message, fileName, text }
}
