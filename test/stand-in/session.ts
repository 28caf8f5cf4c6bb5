import { EventEmitter } from 'node:events'
import { copyFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Chromium } from './chromium.ts'

type PermissionHandler = (contents: unknown, permission: string, answer: (granted: boolean) => void) => void
type RequestHandler = (details: { url: string }, answer: (decision: { cancel?: boolean }) => void) => void

/** What a page may ask for; Electron and Chromium spell these alike. */
const PERMISSIONS = ['geolocation', 'notifications', 'midi'] as const

/** The default session: permissions, requests and downloads as main decides them. */
export class Session extends EventEmitter {
  #filter: RequestHandler = (_details, answer) => answer({})
  #permission: PermissionHandler = (_contents, _permission, answer) => answer(true)

  readonly webRequest = {
    onBeforeRequest: (handler: RequestHandler) => {
      this.#filter = handler
    },
  }

  setPermissionRequestHandler(handler: PermissionHandler): void {
    this.#permission = handler
  }
  setPermissionCheckHandler(): void {}
  setDevicePermissionHandler(): void {}

  cancels(url: string): Promise<boolean> {
    return new Promise((resolve) => this.#filter({ url }, ({ cancel = false }) => resolve(cancel)))
  }

  /** For the first window: by then main has set its handlers, and Playwright its own way with downloads. */
  async apply({ cdp, folder }: Chromium): Promise<void> {
    for (const name of PERMISSIONS) {
      const granted = await new Promise<boolean>((resolve) => this.#permission(null, name, resolve))
      const setting = granted ? 'granted' : 'denied'
      await cdp.send('Browser.setPermission', { permission: { name }, setting })
    }
    await cdp.send('Browser.setDownloadBehavior', {
      behavior: 'allowAndName',
      downloadPath: folder,
      eventsEnabled: true,
    })
    const items = new Map<string, DownloadItem>()
    cdp.on('Browser.downloadWillBegin', (begin: { guid: string; suggestedFilename: string }) => {
      if (items.has(begin.guid)) return
      const item = new DownloadItem(begin.suggestedFilename)
      items.set(begin.guid, item)
      this.emit('will-download', {}, item)
    })
    cdp.on('Browser.downloadProgress', ({ guid, state }: { guid: string; state: string }) => {
      if (state === 'completed') items.get(guid)?.finish(join(folder, guid))
    })
  }
}

class DownloadItem extends EventEmitter {
  readonly #name: string
  #path: string | null = null
  options: object = {}

  constructor(name: string) {
    super()
    this.#name = name
  }

  getFilename = (): string => this.#name
  setSavePath = (path: string): void => {
    this.#path = path
  }
  setSaveDialogOptions = (options: object): void => {
    this.options = options
  }
  getSaveDialogOptions = (): object => this.options

  finish(from: string): void {
    if (this.#path === null) {
      process.stderr.write('a dialog that no test scripted: where to save a download\n')
      return void this.emit('done', {}, 'cancelled')
    }
    copyFileSync(from, this.#path)
    this.emit('done', {}, 'completed')
  }
}
