import { EventEmitter } from 'node:events'
import { mkdirSync, readFileSync, rmSync, watch, writeFileSync } from 'node:fs'
import { homedir, tmpdir } from 'node:os'
import { join } from 'node:path'

/** What of the other modules the app needs: it closes windows and ends the browser. */
export interface AppParts {
  readonly windows: () => readonly { close(): void; isDestroyed(): boolean }[]
  readonly end: () => Promise<void>
}

export class App extends EventEmitter {
  readonly isPackaged = false
  readonly commandLine = { appendSwitch: () => {} }
  readonly #parts: AppParts
  readonly #paths = new Map<string, string>([
    ['home', homedir()],
    ['temp', tmpdir()],
    ['documents', join(homedir(), 'Documents')],
    ['userData', join(tmpdir(), 'stand-in-user-data')],
  ])
  readonly #readiness = Promise.withResolvers<undefined>()
  #ready = false
  #folder = ''
  #version = ''
  #quitting = false
  #lock: string | null = null

  constructor(parts: AppParts) {
    super()
    this.#parts = parts
  }

  setManifest(folder: string, version: string): void {
    this.#folder = folder
    this.#version = version
  }

  getAppPath = (): string => this.#folder
  getVersion = (): string => this.#version
  isReady = (): boolean => this.#ready
  whenReady = () => this.#readiness.promise

  /** After main has been evaluated, never before: as in Electron. */
  becomeReady(): void {
    if (this.#quitting) return
    this.#ready = true
    this.#readiness.resolve(undefined)
    this.emit('ready', {}, {})
  }

  enableSandbox(): void {
    if (this.#ready) throw new Error('app.enableSandbox() can only be called before app is ready')
  }

  getPath(name: string): string {
    const path = this.#paths.get(name)
    if (!path) throw new Error(`Failed to get '${name}' path`)
    return path
  }

  setPath(name: string, path: string): void {
    mkdirSync(path, { recursive: true })
    this.#paths.set(name, path)
  }

  /** A lock by process id in `userData`; a later start leaves its data beside it and is told no. */
  requestSingleInstanceLock(data: unknown = {}): boolean {
    const folder = this.getPath('userData')
    const lock = join(folder, 'stand-in.lock')
    const first = holderOf(lock)
    if (first !== null) {
      writeFileSync(
        join(folder, 'second-start.json'),
        JSON.stringify({ argv: process.argv, cwd: process.cwd(), data }),
      )
      return false
    }
    writeFileSync(lock, String(process.pid))
    this.#lock = lock
    watch(folder, (_event, name) => {
      if (name === 'second-start.json') this.#hearSecondStart(join(folder, name))
    }).unref()
    return true
  }

  #hearSecondStart(file: string): void {
    try {
      const { argv, cwd, data } = JSON.parse(readFileSync(file, 'utf8')) as Record<string, unknown> // written above
      rmSync(file)
      this.emit('second-instance', {}, argv, cwd, data)
    } catch {
      // seen half-written or already taken: the next notice has it whole
    }
  }

  quit = (): void => {
    this.#quitting = true
    this.emit('before-quit', preventable())
    const windows = this.#parts.windows()
    if (windows.length === 0) return this.#leave(0)
    for (const window of windows) window.close()
  }

  exit = (code = 0): void => this.#leave(code)

  windowClosed(): void {
    if (this.#parts.windows().length > 0) return
    if (this.#quitting) this.#leave(0)
    else if (!this.emit('window-all-closed')) this.quit()
  }

  #leave(code: number): void {
    this.emit('will-quit', preventable())
    this.emit('quit', {}, code)
    if (this.#lock) rmSync(this.#lock, { force: true })
    void this.#parts.end().finally(() => process.exit(code))
  }
}

/** The event object of everything that a listener may prevent. */
export function preventable<T extends object>(more?: T) {
  const event = {
    ...(more as T), // absent only where T is empty
    defaultPrevented: false,
    preventDefault: () => {
      event.defaultPrevented = true
    },
  }
  return event
}

function holderOf(lock: string): number | null {
  try {
    const pid = Number(readFileSync(lock, 'utf8'))
    process.kill(pid, 0)
    return pid
  } catch {
    return null
  }
}
