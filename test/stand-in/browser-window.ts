import { EventEmitter } from 'node:events'
import { preventable } from './app.ts'
import { WebContents, type ContentsParts } from './web-contents.ts'

interface WindowOptions {
  readonly title?: string
  readonly width?: number
  readonly height?: number
  readonly x?: number
  readonly y?: number
  readonly show?: boolean
  readonly webPreferences: { readonly preload: string }
}

/** What the window needs of the rest; set once by `electron.ts`. */
export interface WindowHost extends ContentsParts {
  readonly isReady: () => boolean
  readonly contentsCreated: (contents: unknown) => void
  readonly windowClosed: () => void
}

let host: WindowHost | null = null
export function setWindowHost(parts: WindowHost): void {
  host = parts
}

const windows: BrowserWindow[] = []
let last = 0

export class BrowserWindow extends EventEmitter {
  readonly options: WindowOptions
  readonly webContents: WebContents
  readonly #place: { x: number; y: number; width: number; height: number }
  #visible: boolean
  #destroyed = false
  #maximized = false

  constructor(options: WindowOptions) {
    super()
    if (!host?.isReady()) throw new Error('Cannot create BrowserWindow before app is ready')
    this.options = options
    this.#visible = options.show ?? true
    const { x = 0, y = 0, width = 800, height = 600 } = options
    this.#place = { x, y, width, height }
    this.webContents = new WebContents(host, ++last, { width, height }, options.webPreferences.preload)
    this.webContents.on('ready-to-show', () => this.emit('ready-to-show'))
    this.webContents.on('stand-in-close', () => this.close())
    windows.push(this)
    host.contentsCreated(this.webContents)
  }

  static getAllWindows = (): readonly BrowserWindow[] => [...windows]
  static fromWebContents = (contents: unknown): BrowserWindow | null =>
    windows.find((window) => window.webContents === contents) ?? null

  loadURL = (url: string): Promise<void> => this.webContents.loadURL(url)
  show = (): void => void (this.#visible = true)
  focus = (): void => void this.emit('focus')
  restore = (): void => {}
  maximize = (): void => void (this.#maximized = true)
  isVisible = (): boolean => this.#visible
  isMinimized = (): boolean => false
  isMaximized = (): boolean => this.#maximized
  isDestroyed = (): boolean => this.#destroyed
  getTitle = (): string => this.options.title ?? ''
  getNormalBounds = () => ({ ...this.#place })
  setBounds = (place: object): void => void Object.assign(this.#place, place)

  close(): void {
    const event = preventable()
    this.emit('close', event)
    if (!event.defaultPrevented) this.destroy()
  }

  destroy(): void {
    if (this.#destroyed) return
    this.#destroyed = true
    windows.splice(windows.indexOf(this), 1)
    void this.webContents.destroy().then(() => {
      this.emit('closed')
      host?.windowClosed()
    })
  }
}
