import { BrowserWindow, dialog, nativeTheme, screen } from 'electron'
import { writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import type { ClosingAnswer } from './api/contract.ts'
import { askBeforeClosing } from './ipc.ts'
import type { Library } from './library/library.ts'
import type { Log } from './log.ts'
import { START_PAGE } from './origin.ts'
import { usablePlace, type WindowPlace } from './window-place.ts'

/** How long a save may take before the window asks whether to go on waiting [ms]. */
const SAVE_LIMIT = 5000
/** A page that dies again within this time is not loaded once more [ms]. */
const RELOAD_PAUSE = 10_000

export interface WindowParts {
  /** folder of the built preload script */
  readonly shell: string
  readonly library: Library
  readonly log: Log
}

/** Opens the window on the pages; it shows when they are drawn. */
export function openWindow({ shell, library, log }: WindowParts): BrowserWindow {
  const place = usablePlace(
    library.settings.read('window'),
    screen.getAllDisplays().map((display) => display.workArea),
  )
  const window = new BrowserWindow({
    title: 'Stillbed',
    width: 1440,
    height: 900,
    minWidth: 800,
    minHeight: 560,
    ...(place ? { x: place.x, y: place.y, width: place.width, height: place.height } : {}),
    show: false,
    backgroundColor: isDark(library) ? '#191b1d' : '#f7f4ec',
    webPreferences: {
      preload: join(shell, 'preload.cjs'),
      contextIsolation: true,
      sandbox: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      webSecurity: true,
      allowRunningInsecureContent: false,
      webviewTag: false,
      navigateOnDragDrop: false,
      spellcheck: false,
    },
  })
  window.once('ready-to-show', () => {
    if (place?.maximized) window.maximize()
    window.show()
    // launch.mjs waits for this line
    process.stdout.write('Stillbed is open.\n')
  })
  guardClosing(window, library)
  reloadAfterCrash(window, log)
  void window.loadURL(START_PAGE)
  return window
}

function isDark(library: Library): boolean {
  const { sheet } = library.settings.get()
  return sheet === 'dark' || (sheet === 'system' && nativeTheme.shouldUseDarkColors)
}

/** Closing waits for the pending save; one that fails asks, and offers to keep a copy. */
function guardClosing(window: BrowserWindow, library: Library): void {
  let asking = false
  window.on('close', (event) => {
    event.preventDefault()
    if (asking) return
    asking = true
    void mayClose(window)
      .then((yes) => {
        if (!yes) return
        library.settings.write('window', placeOf(window))
        window.destroy()
      })
      .finally(() => (asking = false))
  })
}

function placeOf(window: BrowserWindow): WindowPlace {
  return { ...window.getNormalBounds(), maximized: window.isMaximized() }
}

async function mayClose(window: BrowserWindow): Promise<boolean> {
  for (;;) {
    if (window.webContents.isDestroyed() || window.webContents.isCrashed()) return true
    const answer = await askBeforeClosing(window.webContents, SAVE_LIMIT)
    if (answer?.saved) return true
    const choice = await askAboutUnsaved(window, answer)
    if (choice === 'leave') return true
    if (choice === 'stay') return false
  }
}

async function askAboutUnsaved(
  window: BrowserWindow,
  answer: Exclude<ClosingAnswer, { saved: true }> | null,
): Promise<'again' | 'stay' | 'leave'> {
  const buttons = ['Try again', 'Stay', ...(answer ? ['Keep a copy…'] : []), 'Close without saving']
  const { response } = await dialog.showMessageBox(window, {
    type: 'warning',
    message: 'The last changes are not saved yet.',
    detail: answer?.message ?? 'The pages have not answered.',
    buttons,
    defaultId: 0,
    cancelId: 1,
  })
  const chosen = buttons[response]
  if (chosen === 'Keep a copy…' && answer) return (await keepCopy(window, answer)) ? 'leave' : 'again'
  if (chosen === 'Close without saving') return 'leave'
  return chosen === 'Stay' ? 'stay' : 'again'
}

async function keepCopy(
  window: BrowserWindow,
  { fileName, text }: { fileName: string; text: string },
): Promise<boolean> {
  const { canceled, filePath } = await dialog.showSaveDialog(window, { defaultPath: fileName })
  if (canceled || !filePath) return false
  await writeFile(filePath, text, 'utf8')
  return true
}

/** Everything but the last second is in the library, so a page that dies is simply drawn again. */
function reloadAfterCrash(window: BrowserWindow, log: Log): void {
  let last = -Infinity
  window.webContents.on('render-process-gone', (_event, { reason }) => {
    if (reason === 'clean-exit') return
    const reference = log.record(`the pages' process ended: ${reason}`)
    const now = performance.now()
    if (now - last > RELOAD_PAUSE) window.webContents.reload()
    else dialog.showErrorBox('Stillbed cannot show its pages', `The log has it under ${reference}.`)
    last = now
  })
}
