/**
 * The desktop host. What must precede readiness is done at once; the rest waits in a callback,
 * since a wait at the top level of this module would never end: Electron becomes ready only
 * after the module has been evaluated.
 */
import type { BrowserWindow } from 'electron'
import { app, dialog, session, shell } from 'electron'
import { readFile, stat } from 'node:fs/promises'
import { dirname, join, resolve } from 'node:path'
import { readProjectText } from '../core/project/read.ts'
import { createDispatch } from './api/dispatch.ts'
import { appRoot } from './app-root.ts'
import { answerCalls, sendEvent } from './ipc.ts'
import { dataFolder, defaultLibraryFile } from './library/data-folder.ts'
import { StorageError } from './library/errors.ts'
import { fillOnFirstStart } from './library/first-start.ts'
import { openLibrary, type Library } from './library/library.ts'
import { openLog, type Log } from './log.ts'
import { installMenu } from './menu.ts'
import { readMainArguments, type MainArguments } from './main-arguments.ts'
import { drawReportInProcess } from './report-process.ts'
import { lockNavigation, lockSession, registerPageScheme, servePages } from './security.ts'
import { appVersion } from './version.ts'
import { openWindow } from './window.ts'

/** A project file larger than this is not one [bytes]. */
const LARGEST_FILE = 20_000_000

const root = appRoot()
const wanted = readMainArguments(process.argv.slice(1), process.cwd())
let window: BrowserWindow | null = null

registerPageScheme()
app.enableSandbox()
app.setPath('userData', join(dataFolder(), 'desktop'))
if (app.requestSingleInstanceLock({ ...wanted })) {
  lockNavigation()
  app.on('window-all-closed', () => app.quit())
  void app
    .whenReady()
    .then(boot)
    .catch((error: unknown) => giveUp(error))
} else {
  app.quit()
}

async function boot(): Promise<void> {
  const file = wanted.library || defaultLibraryFile()
  const log = openLog(join(dirname(file), 'logs'))
  process.on('uncaughtException', (error) => log.record(`main: ${error.stack ?? error.message}`))
  process.on('unhandledRejection', (error) => log.record(`main: ${String(error)}`))
  const library = openLibrary(file, 'desktop')
  app.on('will-quit', () => library.close())
  fillOnFirstStart(library, join(root, 'resources'), (message) => log.warn(message))

  lockSession(session.defaultSession)
  offerDownloads()
  servePages(join(root, 'out', 'pages'))
  const contents = () => (window === null || window.isDestroyed() ? null : window.webContents)
  const version = appVersion(root)
  answerCalls(
    createDispatch({
      info: { version, host: 'desktop', libraryFile: file },
      library,
      log,
      drawReport: drawReportInProcess,
    }),
    contents,
  )
  installMenu(
    { platform: process.platform, packaged: app.isPackaged },
    {
      command: (command) => {
        const to = contents()
        if (to) sendEvent(to, 'menu:command', command)
      },
      showLog: () => shell.showItemInFolder(log.file),
      about: () => showAbout(version, file),
    },
  )
  window = openWindow({ shell: join(root, 'out', 'shell'), library, log })
  const opened = new Promise<void>((resolve) => window?.webContents.once('did-finish-load', () => resolve()))
  app.on('second-instance', (_event, _argv, _folder, data) => {
    void receiveSecondStart(data as MainArguments, library, log) // handed over by our own start, above
  })
  app.on('open-file', (event, path) => {
    event.preventDefault()
    void opened.then(() => bringIn(path, library, log))
  })
  if (wanted.file) void opened.then(() => bringIn(wanted.file, library, log))
}

async function receiveSecondStart(second: MainArguments, library: Library, log: Log): Promise<void> {
  if (window === null || window.isDestroyed()) return
  if (window.isMinimized()) window.restore()
  window.focus()
  if (second.library && resolve(second.library) !== resolve(library.file)) {
    await dialog.showMessageBox(window, {
      type: 'info',
      message: 'Stillbed is already open with another library.',
      detail: `Close this window first to open ${second.library}.`,
    })
  }
  if (second.file) await bringIn(second.file, library, log)
}

/** Puts a project file on the Shelf and shows it. */
async function bringIn(file: string, library: Library, log: Log): Promise<void> {
  if (window === null || window.isDestroyed()) return
  try {
    if ((await stat(file)).size > LARGEST_FILE) throw new Error('it is longer than any project file')
    const { id } = library.projects.create(readProjectText(await readFile(file, 'utf8')))
    sendEvent(window.webContents, 'project:show', { id })
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error)
    log.warn(`${file}: ${message}`)
    await dialog.showMessageBox(window, {
      type: 'error',
      message: `${file} cannot be opened.`,
      detail: message,
    })
  }
}

/** What the pages hand over as a download goes through the system's own dialog. */
function offerDownloads(): void {
  session.defaultSession.on('will-download', (_event, item) => {
    item.setSaveDialogOptions({ defaultPath: join(app.getPath('documents'), item.getFilename()) })
  })
}

function showAbout(version: string, library: string): void {
  const options = {
    type: 'info' as const,
    message: `Stillbed ${version}`,
    detail: `Library: ${library}\nResults support a qualified engineer's judgement and do not replace it; local codes come first.`,
  }
  if (window) void dialog.showMessageBox(window, options)
}

function giveUp(error: unknown): void {
  const words = error instanceof Error ? error.message : String(error)
  process.stderr.write(`${words}\n`)
  try {
    if (error instanceof StorageError) dialog.showErrorBox('Stillbed cannot open its library', words)
  } finally {
    app.exit(1)
  }
}
