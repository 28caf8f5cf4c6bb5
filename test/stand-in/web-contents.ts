import { randomBytes } from 'node:crypto'
import { EventEmitter } from 'node:events'
import { readFileSync } from 'node:fs'
import { preventable } from './app.ts'
import type { Chromium } from './chromium.ts'
import type { Scheme } from './scheme.ts'
import type { Session } from './session.ts'
import { RECEIVER, pageScript, preloadScript, wireFormat } from './worlds.ts'

const WORLD = 'Electron Isolated Context'
const BINDING = '__toMain'
const wire = wireFormat()

/** What arrives from a preload. */
export interface Message {
  readonly channel: string
  readonly args: readonly unknown[]
  readonly invoke?: number
}
export type Receive = (contents: WebContents, message: Message) => void

export interface ContentsParts {
  readonly chromium: Chromium
  readonly scheme: Scheme
  readonly session: Session
  readonly receive: Receive
}

type OpenHandler = (details: { url: string }) => { action: 'allow' | 'deny' }

/**
 * One page of the browser with its preload in an isolated world. It stands from the first moment,
 * as main expects; what it is told before its page has been made waits for that.
 */
export class WebContents extends EventEmitter {
  readonly #parts: ContentsParts
  readonly id: number
  readonly session: Session
  readonly #attached: Promise<string>
  targetId = ''
  #cdpSession = ''
  #mainFrame = ''
  #url = 'about:blank'
  #world: number | null = null
  #openHandler: OpenHandler = () => ({ action: 'allow' })
  #expected: string | null = null
  #crashed = false
  #destroyed = false

  constructor(parts: ContentsParts, id: number, size: object, preload: string) {
    super()
    this.#parts = parts
    this.id = id
    this.session = parts.session
    this.#attached = this.#attach(size, preload)
  }

  async #attach(size: object, preload: string): Promise<string> {
    const { cdp } = this.#parts.chromium
    await this.session.apply(this.#parts.chromium)
    const { targetId } = await cdp.send<{ targetId: string }>('Target.createTarget', {
      url: 'about:blank',
      ...size,
    })
    this.targetId = targetId
    const { sessionId } = await cdp.send<{ sessionId: string }>('Target.attachToTarget', {
      targetId,
      flatten: true,
    })
    this.#cdpSession = sessionId
    this.#listen()
    const send = <T>(method: string, params: object = {}) => cdp.send<T>(method, params, sessionId)
    const { frameTree } = await send<{ frameTree: { frame: { id: string } } }>('Page.getFrameTree')
    this.#mainFrame = frameTree.frame.id
    for (const domain of ['Page', 'Runtime', 'Inspector']) await send(`${domain}.enable`)
    await send('Fetch.enable', { patterns: [{ urlPattern: '*' }] })
    await send('Runtime.addBinding', { name: BINDING, executionContextName: WORLD })
    const secret = randomBytes(16).toString('hex')
    const source = preloadScript(secret, BINDING, readFileSync(preload, 'utf8'))
    await send('Page.addScriptToEvaluateOnNewDocument', { source: pageScript(secret) })
    await send('Page.addScriptToEvaluateOnNewDocument', { source, worldName: WORLD })
    return sessionId
  }

  async #send<T>(method: string, params: object = {}): Promise<T> {
    return this.#parts.chromium.cdp.send<T>(method, params, await this.#attached)
  }

  #on<T>(method: string, listener: (params: T) => void): void {
    this.#parts.chromium.cdp.on(method, (params: never, session) => {
      if (session === this.#cdpSession) listener(params)
    })
  }

  #listen(): void {
    interface Context {
      context: { id: number; name: string; auxData: { frameId: string } }
    }
    this.#on<Context>('Runtime.executionContextCreated', ({ context }) => {
      if (context.name === WORLD && context.auxData.frameId === this.#mainFrame) this.#world = context.id
    })
    this.#on('Runtime.executionContextsCleared', () => (this.#world = null))
    this.#on<{ name: string; payload: string }>('Runtime.bindingCalled', ({ name, payload }) => {
      if (name === BINDING) this.#parts.receive(this, wire.decode(payload) as Message) // encoded by the preload's half
    })
    this.#on<{ frame: { id: string; url: string; parentId?: string } }>(
      'Page.frameNavigated',
      ({ frame }) => {
        if (frame.id === this.#mainFrame) this.#url = this.#parts.scheme.toMain(frame.url)
      },
    )
    this.#on('Page.domContentEventFired', () => this.emit('dom-ready'))
    this.#on('Page.loadEventFired', () => {
      if (this.#url === 'about:blank') return
      this.emit('did-finish-load')
      this.emit('ready-to-show')
    })
    this.#on('Inspector.targetCrashed', () => {
      this.#crashed = true
      this.emit('render-process-gone', {}, { reason: 'crashed', exitCode: 1 })
    })
    this.#on<{ url: string }>('Page.windowOpen', ({ url }) => {
      this.#openHandler({ url: this.#parts.scheme.toMain(url) })
    })
    this.#on<Paused>('Fetch.requestPaused', (paused) => void this.#decide(paused).catch(() => {}))
    const { cdp } = this.#parts.chromium
    cdp.on(
      'Target.targetCreated',
      ({ targetInfo }: { targetInfo: { targetId: string; openerId?: string } }) => {
        // this main opens no second window, so whatever its handler says, the answer is "deny"
        if (targetInfo.openerId === this.targetId)
          void cdp.send('Target.closeTarget', { targetId: targetInfo.targetId })
      },
    )
  }

  /** Navigation asks `will-navigate`, every request the session's own filter. */
  async #decide({ requestId, request, resourceType, frameId }: Paused): Promise<void> {
    const url = this.#parts.scheme.toMain(request.url)
    const refuse = (errorReason: string) => this.#send('Fetch.failRequest', { requestId, errorReason })
    if (resourceType === 'Document' && frameId === this.#mainFrame) {
      const expected = this.#expected === url
      this.#expected = null
      const event = preventable({ url })
      if (!expected) this.emit('will-navigate', event, url)
      if (event.defaultPrevented) return void (await refuse('Aborted'))
    }
    if (await this.#parts.session.cancels(url)) return void (await refuse('BlockedByClient'))
    await this.#send('Fetch.continueRequest', { requestId })
  }

  get mainFrame() {
    return { url: this.#url, parent: null }
  }

  getURL = (): string => this.#url
  isDestroyed = (): boolean => this.#destroyed
  isCrashed = (): boolean => this.#crashed

  async loadURL(url: string): Promise<void> {
    this.#expected = url
    await this.#send('Page.navigate', { url: this.#parts.scheme.toBrowser(url) })
  }

  reload(): void {
    this.#crashed = false
    this.#expected = this.#url
    void this.#send('Page.reload').catch(() => {})
  }

  setWindowOpenHandler(handler: OpenHandler): void {
    this.#openHandler = handler
  }

  forcefullyCrashRenderer(): void {
    void this.#send('Page.crash').catch(() => {})
  }

  async executeJavaScript(expression: string): Promise<unknown> {
    const wish = { expression, awaitPromise: true, returnByValue: true }
    return (await this.#send<{ result: { value: unknown } }>('Runtime.evaluate', wish)).result.value
  }

  send(channel: string, ...args: unknown[]): void {
    this.#deliver({ channel, args })
  }

  reply(invoke: number, outcome: object): void {
    this.#deliver({ reply: invoke, ...outcome })
  }

  #deliver(message: object): void {
    if (this.#world === null) return
    const expression = `${RECEIVER}(${JSON.stringify(wire.encode(message))})`
    void this.#send('Runtime.evaluate', { expression, contextId: this.#world }).catch(() => {})
  }

  /** as Playwright closes a page: through the window's own closing */
  close(): void {
    this.emit('stand-in-close')
  }

  async destroy(): Promise<void> {
    this.#destroyed = true
    await this.#attached.catch(() => {})
    await this.#parts.chromium.cdp.send('Target.closeTarget', { targetId: this.targetId }).catch(() => {})
    this.emit('destroyed')
  }
}

interface Paused {
  readonly requestId: string
  readonly request: { readonly url: string }
  readonly resourceType: string
  readonly frameId: string
}
