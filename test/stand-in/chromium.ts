import { spawn, type ChildProcess } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { browserProgram } from '../setup/browser.ts'
import { Cdp } from './cdp.ts'

/** The Chromium that shows the pages, and the connection to it. */
export interface Chromium {
  readonly cdp: Cdp
  readonly folder: string
  /** the line by which Chromium gives its debugging address */
  readonly line: string
  end(): Promise<void>
}

export async function startChromium(): Promise<Chromium> {
  const folder = mkdtempSync(join(tmpdir(), 'stillbed-stand-in-'))
  const { executable, args, env } = await browserProgram()
  const child = spawn(
    executable,
    [
      ...args,
      '--headless',
      '--remote-debugging-port=0',
      `--user-data-dir=${join(folder, 'profile')}`,
      '--no-first-run',
      '--no-startup-window',
      '--no-default-browser-check',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-dev-shm-usage',
      '--mute-audio',
      ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
    ],
    { env: { ...process.env, ...env }, stdio: ['ignore', 'ignore', 'pipe'] },
  )
  const line = await debuggingLine(child)
  const cdp = await Cdp.connect(line.replace('DevTools listening on ', ''))
  const gone = new Promise((resolve) => child.once('exit', resolve))
  const end = async () => {
    child.kill('SIGKILL')
    await gone
    rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 50 })
  }
  // however this process ends, the browser goes with it
  process.once('exit', () => child.kill('SIGKILL'))
  return { cdp, folder, line, end }
}

function debuggingLine(child: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = ''
    child.stderr?.on('data', (chunk) => {
      said += String(chunk)
      const line = /^DevTools listening on ws:\S+$/m.exec(said)?.[0]
      if (line) resolve(line)
    })
    child.once('close', (code) => reject(new Error(`Chromium ended with ${code}:\n${said}`)))
  })
}
