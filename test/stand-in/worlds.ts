/**
 * What runs inside the page: the two halves of the bridge between the preload's isolated world
 * and the page's own. They share the document but no object; events carry structured clones
 * across at once, as Electron's contextBridge does. Each function below is put into the page as
 * text and must not refer to anything outside itself.
 */
interface Packed {
  readonly kind: 'value' | 'function' | 'promise' | 'array' | 'object'
  readonly value?: unknown
}
type Call = (...args: unknown[]) => unknown

function joinWorlds(secret: string, side: 'page' | 'preload') {
  const other = side === 'page' ? 'preload' : 'page'
  const functions: Call[] = []
  const promises: { resolve: (value: unknown) => void; reject: (error: unknown) => void }[] = []
  let answer: { value?: Packed; error?: string } = {}
  let lastPromise = 0

  const tell = (detail: object) => document.dispatchEvent(new CustomEvent(`${secret}-${other}`, { detail }))
  const pack = (value: unknown): Packed => {
    if (typeof value === 'function') return { kind: 'function', value: functions.push(value as Call) - 1 }
    if (value instanceof Promise) return { kind: 'promise', value: follow(value) }
    if (Array.isArray(value)) return { kind: 'array', value: value.map(pack) }
    if (typeof value === 'object' && value !== null && Object.getPrototypeOf(value) === Object.prototype) {
      return { kind: 'object', value: Object.entries(value).map(([key, part]) => [key, pack(part)]) }
    }
    return { kind: 'value', value }
  }
  const follow = (promise: Promise<unknown>): number => {
    const id = lastPromise++
    promise.then(
      (value) => tell({ settle: id, value: pack(value) }),
      (error: unknown) => tell({ settle: id, error: error instanceof Error ? error.message : String(error) }),
    )
    return id
  }
  const unpack = ({ kind, value }: Packed): unknown => {
    if (kind === 'function') return (...args: unknown[]) => call(value as number, args)
    if (kind === 'promise') {
      return new Promise((resolve, reject) => (promises[value as number] = { resolve, reject }))
    }
    if (kind === 'array') return (value as Packed[]).map(unpack)
    if (kind === 'object') {
      return Object.fromEntries((value as [string, Packed][]).map(([key, part]) => [key, unpack(part)]))
    }
    return value
  }
  const call = (id: number, args: unknown[]): unknown => {
    tell({ call: id, args: args.map(pack) })
    const { value, error } = answer
    if (error !== undefined) throw new Error(error)
    return value && unpack(value)
  }
  const run = (id: number, args: Packed[]): { value?: Packed; error?: string } => {
    try {
      return { value: pack(functions[id]?.(...args.map(unpack))) }
    } catch (error) {
      return { error: error instanceof Error ? error.message : String(error) }
    }
  }
  const freeze = (value: unknown): unknown => {
    if (typeof value === 'object' && value !== null) Object.values(value).forEach(freeze)
    return Object.freeze(value)
  }
  document.addEventListener(`${secret}-${side}`, (event) => {
    const detail = (event as CustomEvent).detail
    if ('call' in detail) tell({ reply: run(detail.call, detail.args) })
    else if ('reply' in detail) answer = detail.reply
    else if ('expose' in detail) {
      Object.defineProperty(window, detail.expose, { value: freeze(unpack(detail.value)), enumerable: true })
    } else if ('settle' in detail) {
      const waiting = promises[detail.settle]
      if (detail.error === undefined) waiting?.resolve(unpack(detail.value))
      else waiting?.reject(new Error(detail.error))
    }
  })
  return { exposeInMainWorld: (name: string, value: unknown) => tell({ expose: name, value: pack(value) }) }
}

/** Values as text between Node and the page: what a structured clone keeps and JSON would lose. */
export function wireFormat() {
  const ARRAYS = { Uint8Array, Int32Array, Float32Array, Float64Array }
  type ArrayName = keyof typeof ARRAYS
  const toText = (bytes: Uint8Array) => {
    let binary = ''
    for (let at = 0; at < bytes.length; at += 8192) {
      binary += String.fromCharCode(...bytes.subarray(at, at + 8192))
    }
    return btoa(binary)
  }
  const write = (value: unknown): unknown => {
    if (value === undefined) return { $: 'undefined' }
    if (typeof value === 'number' && (!Number.isFinite(value) || Object.is(value, -0))) {
      return { $: 'number', text: Object.is(value, -0) ? '-0' : String(value) }
    }
    if (typeof value === 'function' || typeof value === 'symbol')
      throw new Error('An object could not be cloned.')
    if (typeof value !== 'object' || value === null) return value
    if (Array.isArray(value)) return value.map(write)
    if (ArrayBuffer.isView(value)) {
      const name = Object.prototype.toString.call(value).slice(8, -1)
      return { $: name, text: toText(new Uint8Array(value.buffer, value.byteOffset, value.byteLength)) }
    }
    return Object.fromEntries(Object.entries(value).map(([key, part]) => [key, write(part)]))
  }
  const read = (value: unknown): unknown => {
    if (typeof value !== 'object' || value === null) return value
    if (Array.isArray(value)) return value.map(read)
    const { $: kind, text } = value as { $?: string; text?: string }
    if (kind === 'undefined') return undefined
    if (kind === 'number') return Number(text)
    if (kind) {
      const bytes = Uint8Array.from(atob(text ?? ''), (character) => character.charCodeAt(0))
      return new ARRAYS[kind as ArrayName](bytes.buffer)
    }
    return Object.fromEntries(Object.entries(value).map(([key, part]) => [key, read(part)]))
  }
  return {
    encode: (value: unknown) => JSON.stringify(write(value)),
    decode: (text: string) => read(JSON.parse(text)),
  }
}

type Wire = ReturnType<typeof wireFormat>

/** The `electron` that a sandboxed preload sees. `binding` carries text to Node. */
function preloadModule(bridge: ReturnType<typeof joinWorlds>, wire: Wire, binding: (text: string) => void) {
  const waiting = new Map<number, { resolve: (value: unknown) => void; reject: (error: Error) => void }>()
  const listeners = new Map<string, Call[]>()
  let last = 0
  const receive = (text: string) => {
    const message = wire.decode(text) as {
      channel?: string
      args?: unknown[]
      reply?: number
      value?: unknown
      error?: string
    }
    if (message.channel !== undefined) {
      for (const listener of listeners.get(message.channel) ?? []) listener({}, ...(message.args ?? []))
      return
    }
    const id = message.reply ?? 0
    const call = waiting.get(id)
    waiting.delete(id)
    if (message.error === undefined) call?.resolve(message.value)
    else call?.reject(new Error(message.error))
  }
  const ipcRenderer = {
    invoke: (channel: string, ...args: unknown[]) =>
      new Promise((resolve, reject) => {
        const id = ++last
        waiting.set(id, { resolve, reject })
        binding(wire.encode({ channel, args, invoke: id }))
      }),
    send: (channel: string, ...args: unknown[]) => binding(wire.encode({ channel, args })),
    on: (channel: string, listener: Call) => {
      listeners.set(channel, [...(listeners.get(channel) ?? []), listener])
      return ipcRenderer
    },
    off: (channel: string, listener: Call) => {
      listeners.set(
        channel,
        (listeners.get(channel) ?? []).filter((known) => known !== listener),
      )
      return ipcRenderer
    },
  }
  return { receive, module: { contextBridge: bridge, ipcRenderer } }
}

/** Name of the function in the preload's world that takes messages from Node. */
export const RECEIVER = '__receive'

/** Runs in the page's own world before any script of the page. */
export function pageScript(secret: string): string {
  return `(${joinWorlds})(${JSON.stringify(secret)}, 'page')`
}

/** Runs in the isolated world: the built preload with the only module that a sandbox gives it. */
export function preloadScript(secret: string, binding: string, source: string): string {
  return `(() => {
    const bridge = (${joinWorlds})(${JSON.stringify(secret)}, 'preload')
    const { receive, module } = (${preloadModule})(bridge, (${wireFormat})(), globalThis[${JSON.stringify(binding)}])
    globalThis[${JSON.stringify(RECEIVER)}] = receive
    const require = (name) => {
      if (name === 'electron') return module
      throw new Error('module not found: ' + name)
    }
    ;(function (require, exports, module) {
      ${source}
    })(require, {}, { exports: {} })
  })()`
}
