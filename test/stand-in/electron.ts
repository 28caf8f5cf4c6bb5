/** The `electron` module as main sees it in the stand-in runtime. */
import { EventEmitter } from 'node:events'
import { App } from './app.ts'
import { BrowserWindow as StandInWindow, setWindowHost } from './browser-window.ts'
import { startChromium, type Chromium } from './chromium.ts'
import { IpcMain } from './ipc-main.ts'
import { Menu as StandInMenu } from './menu.ts'
import { Scheme } from './scheme.ts'
import { Session } from './session.ts'

export { utilityProcess } from './utility-process.ts'
export { StandInWindow as BrowserWindow }

let chromium: Chromium | null = null
const scheme = new Scheme()
const defaultSession = new Session()

export const ipcMain = new IpcMain()
export const app = new App({ windows: () => StandInWindow.getAllWindows(), end: async () => chromium?.end() })
export const session = { defaultSession }

/** @returns the line by which the browser gives its debugging address */
export async function startBrowser(): Promise<string> {
  const started = await startChromium()
  chromium = started
  await scheme.listen()
  setWindowHost({
    chromium: started,
    scheme,
    session: defaultSession,
    isReady: app.isReady,
    receive: (contents, message) => ipcMain.receive(contents, message),
    contentsCreated: (contents) => app.emit('web-contents-created', {}, contents),
    windowClosed: () => app.windowClosed(),
  })
  return started.line
}

export const protocol = {
  registerSchemesAsPrivileged(schemes: readonly { scheme: string }[]): void {
    if (app.isReady())
      throw new Error('protocol.registerSchemesAsPrivileged should be called before app is ready')
    if (scheme.registered) throw new Error('protocol.registerSchemesAsPrivileged can be called only once')
    scheme.register(schemes[0]?.scheme ?? '')
  },
  handle(name: string, handler: (request: Request) => Response | Promise<Response>): void {
    if (!app.isReady()) throw new Error('protocol.handle cannot be used before app is ready')
    scheme.handle(name, handler)
  },
}

let applicationMenu: StandInMenu | null = null
export const Menu = {
  buildFromTemplate: (template: ConstructorParameters<typeof StandInMenu>[0]) =>
    new StandInMenu(template, { quit: app.quit, close: () => StandInWindow.getAllWindows()[0]?.close() }),
  setApplicationMenu: (menu: StandInMenu): void => {
    applicationMenu = menu
  },
  getApplicationMenu: (): StandInMenu | null => applicationMenu,
}

export const webContents = {
  getAllWebContents: () => StandInWindow.getAllWindows().map((window) => window.webContents),
  fromDevToolsTargetId: (id: string) =>
    webContents.getAllWebContents().find((contents) => contents.targetId === id) ?? null,
}

/** Nobody sits before a test: a dialog waits for an answer that only a test can have prepared. */
const unscripted = (name: string) => (): never => {
  process.stderr.write(`a dialog that no test scripted: ${name}\n`)
  throw new Error(`a dialog that no test scripted: ${name}`)
}
export const dialog = {
  showMessageBox: unscripted('showMessageBox'),
  showSaveDialog: unscripted('showSaveDialog'),
  showOpenDialog: unscripted('showOpenDialog'),
  showErrorBox: unscripted('showErrorBox'),
}

const outside = (name: string) => (): never => {
  throw new Error(`shell.${name} would leave the test`)
}
export const shell = { openExternal: outside('openExternal'), showItemInFolder: outside('showItemInFolder') }

export const nativeTheme = Object.assign(new EventEmitter(), {
  shouldUseDarkColors: false,
  themeSource: 'system',
})
export const screen = { getAllDisplays: () => [{ workArea: { x: 0, y: 0, width: 1920, height: 1080 } }] }
