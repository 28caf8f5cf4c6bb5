import { EventEmitter } from 'node:events'

interface Answer {
  readonly id?: number
  readonly method?: string
  readonly params?: unknown
  readonly result?: unknown
  readonly error?: { readonly message: string }
  readonly sessionId?: string
}

/** A connection to a Chromium by its debugging protocol. Events of the browser itself have no session. */
export class Cdp extends EventEmitter<Record<string, [params: never, session: string | undefined]>> {
  readonly #socket: WebSocket
  readonly #waiting = new Map<number, { resolve: (result: never) => void; reject: (error: Error) => void }>()
  #last = 0

  private constructor(socket: WebSocket) {
    super()
    this.setMaxListeners(0)
    this.#socket = socket
    socket.addEventListener('message', ({ data }) => this.#receive(JSON.parse(String(data)) as Answer))
    socket.addEventListener('close', () => this.emit('closed', undefined as never, undefined))
  }

  static async connect(address: string): Promise<Cdp> {
    const socket = new WebSocket(address)
    await new Promise((resolve, reject) => {
      socket.addEventListener('open', resolve, { once: true })
      socket.addEventListener('error', reject, { once: true })
    })
    return new Cdp(socket)
  }

  /** @param T the shape of the result, by the protocol's documentation */
  send<T = unknown>(method: string, params: object = {}, sessionId?: string): Promise<T> {
    const id = ++this.#last
    this.#socket.send(JSON.stringify({ id, method, params, ...(sessionId ? { sessionId } : {}) }))
    return new Promise((resolve, reject) => this.#waiting.set(id, { resolve, reject }))
  }

  close(): void {
    this.#socket.close()
  }

  #receive({ id, method, params, result, error, sessionId }: Answer): void {
    if (method) this.emit(method, params as never, sessionId)
    const waiting = id === undefined ? undefined : this.#waiting.get(id)
    if (id === undefined || !waiting) return
    this.#waiting.delete(id)
    if (error) waiting.reject(new Error(error.message))
    else waiting.resolve(result as never)
  }
}
