import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { ChildProcess } from 'node:child_process'
import { _electron, type ElectronApplication, type Page } from 'playwright-core'
import { chooseRuntime } from './runtime.ts'

const ROOT = join(import.meta.dirname, '..', '..')

/** `stand-in`, or `electron` and its version: which of them ran must stand with every result. */
export const RUNTIME = chooseRuntime()

export interface DesktopRun {
  readonly app: ElectronApplication
  readonly page: Page
  readonly process: ChildProcess
  /** the user's data folder of this run */
  readonly data: string
  /** what main has written on standard error */
  errors(): string
  /** quits and waits until the process has gone; the data stay */
  quit(): Promise<void>
  /** quits and removes the data */
  remove(): Promise<void>
}

export interface DesktopOptions {
  /** the data folder of an earlier run */
  readonly data?: string
  readonly args?: readonly string[]
}

/** The built main and preload in the chosen runtime, with its window on the Shelf. */
export async function launchDesktop({ data, args = [] }: DesktopOptions = {}): Promise<DesktopRun> {
  const folder = data ?? mkdtempSync(join(tmpdir(), 'stillbed-desktop-'))
  const app = await _electron.launch({
    args: [ROOT, ...args],
    env: { ...process.env, STILLBED_DATA: folder } as Record<string, string>, // unset variables are left out
    timeout: 60_000,
  })
  // Playwright forgets the process once it has ended
  const child = app.process()
  let errors = ''
  child.stderr?.on('data', (chunk) => (errors += String(chunk)))
  const page = await app.firstWindow({ timeout: 60_000 })
  await page.waitForURL(/index\.html/)
  await page.waitForLoadState('load')
  const quit = async () => {
    if (child.exitCode !== null || child.signalCode !== null) return
    const gone = new Promise((resolve) => child.once('exit', resolve))
    await app.close()
    await gone
  }
  return {
    app,
    page,
    process: child,
    data: folder,
    errors: () => errors,
    quit,
    remove: async () => {
      await quit()
      rmSync(folder, { recursive: true, force: true, maxRetries: 10 })
    },
  }
}
