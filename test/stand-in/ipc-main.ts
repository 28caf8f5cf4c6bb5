import { EventEmitter } from 'node:events'
import type { Message, WebContents } from './web-contents.ts'

type Handler = (event: object, ...args: unknown[]) => unknown

/** Main's end of the channels. A thrown error loses all but its message on the way, as in Electron. */
export class IpcMain extends EventEmitter {
  readonly #handlers = new Map<string, Handler>()

  handle(channel: string, handler: Handler): void {
    if (this.#handlers.has(channel))
      throw new Error(`Attempted to register a second handler for '${channel}'`)
    this.#handlers.set(channel, handler)
  }

  receive(contents: WebContents, { channel, args, invoke }: Message): void {
    const event = { sender: contents, senderFrame: contents.mainFrame, frameId: 1, processId: 1 }
    if (invoke === undefined) this.emit(channel, event, ...args)
    else void this.#answer(contents, channel, invoke, event, args)
  }

  async #answer(
    contents: WebContents,
    channel: string,
    invoke: number,
    event: object,
    args: readonly unknown[],
  ): Promise<void> {
    const handler = this.#handlers.get(channel)
    try {
      if (!handler) throw new Error(`No handler registered for '${channel}'`)
      contents.reply(invoke, { value: await handler(event, ...args) })
    } catch (error) {
      const words = error instanceof Error ? error.message : String(error)
      contents.reply(invoke, { error: `Error invoking remote method '${channel}': ${words}` })
    }
  }
}
