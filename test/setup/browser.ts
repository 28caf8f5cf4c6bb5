/**
 * A Chromium to test with: an installed Chrome, Chromium or Edge, else the one inside
 * @sparticuz/chromium, unpacked once into node_modules/.cache together with its libraries and
 * fonts, so that npm alone brings all that a bare machine needs.
 */
import { execFile } from 'node:child_process'
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { delimiter, join } from 'node:path'
import { promisify } from 'node:util'
import { chromium, type Browser } from 'playwright-core'

export interface BrowserProgram {
  readonly executable: string
  readonly args: readonly string[]
  readonly env: Readonly<Record<string, string>>
}

/**
 * Software WebGL for the drawing, and glyphs placed alike on every machine. What the package itself
 * suggests is not taken: it puts everything into one process and turns off the web's own security.
 */
const ARGS = [
  '--font-render-hinting=none',
  '--ignore-gpu-blocklist',
  '--use-gl=angle',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
]

const INSTALLED: Readonly<Partial<Record<NodeJS.Platform, readonly string[]>>> = {
  linux: ['google-chrome-stable', 'google-chrome', 'chromium', 'chromium-browser', 'microsoft-edge'].flatMap(
    (name) => (process.env['PATH'] ?? '').split(delimiter).map((folder) => join(folder, name)),
  ),
  darwin: ['Google Chrome', 'Chromium', 'Microsoft Edge'].map(
    (name) => `/Applications/${name}.app/Contents/MacOS/${name}`,
  ),
  win32: ['Google\\Chrome\\Application\\chrome.exe', 'Microsoft\\Edge\\Application\\msedge.exe'].flatMap(
    (path) =>
      [process.env['ProgramFiles'], process.env['ProgramFiles(x86)'], process.env['LOCALAPPDATA']]
        .filter((folder) => folder !== undefined)
        .map((folder) => join(folder, path)),
  ),
}

/** Finds or unpacks the browser; the first call on a machine takes a few seconds. */
export async function browserProgram(): Promise<BrowserProgram> {
  const installed = INSTALLED[process.platform]?.find((file) => existsSync(file))
  if (installed) return { executable: installed, args: ARGS, env: {} }
  const folder = await unpacked()
  return {
    executable: join(folder, 'chromium'),
    args: ARGS,
    env: {
      LD_LIBRARY_PATH: [join(folder, 'al2023', 'lib'), process.env['LD_LIBRARY_PATH'] ?? '']
        .filter((path) => path !== '')
        .join(delimiter),
      FONTCONFIG_PATH: join(folder, 'fonts'),
    },
  }
}

/** A headless browser; close it when done. */
export async function launchBrowser(): Promise<Browser> {
  const { executable, args, env } = await browserProgram()
  return chromium.launch({
    executablePath: executable,
    args: [...args],
    env: { ...process.env, ...env } as Record<string, string>, // unset variables are left out by the system
  })
}

const MODULES = join(import.meta.dirname, '..', '..', 'node_modules')

/** Unpacked in a process of its own, since the package writes into the folder for temporary files. */
async function unpacked(): Promise<string> {
  const source = join(MODULES, '@sparticuz', 'chromium')
  const { version } = JSON.parse(readFileSync(join(source, 'package.json'), 'utf8')) as { version: string } // npm's
  const folder = join(MODULES, '.cache', `chromium-${version}`)
  if (existsSync(folder)) return folder
  const next = `${folder}.${process.pid}`
  mkdirSync(next, { recursive: true })
  const script = `
    const { inflate } = await import('@sparticuz/chromium')
    const pack = (name) => inflate(${JSON.stringify(join(source, 'bin'))} + '/' + name)
    await Promise.all(['chromium.br', 'fonts.tar.br', 'swiftshader.tar.br', 'al2023.tar.br'].map(pack))`
  await promisify(execFile)(process.execPath, ['--input-type=module', '--eval', script], {
    cwd: join(MODULES, '..'),
    env: { ...process.env, TMPDIR: next },
  })
  writeFileSync(join(next, 'fonts', 'fonts.conf'), fontSettings(join(folder, 'fonts')))
  try {
    renameSync(next, folder) // whole or not at all: another run may be unpacking too
  } catch (error) {
    if (!existsSync(folder)) throw error
    rmSync(next, { recursive: true })
  }
  return folder
}

const fontSettings = (folder: string) => `<?xml version="1.0"?>
<!DOCTYPE fontconfig SYSTEM "fonts.dtd">
<fontconfig>
  <dir>${folder}</dir>
  <dir>/usr/share/fonts</dir>
  <cachedir>${folder}/cache</cachedir>
</fontconfig>
`
