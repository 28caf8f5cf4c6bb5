import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'

const ROOT = join(import.meta.dirname, '..', '..')
const PACKAGE = join(ROOT, 'node_modules', 'electron')

/**
 * Which runtime the desktop's tests run on: Electron's where its binary is installed and a display
 * is there, else the stand-in. The same tests run on either.
 */
export function chooseRuntime(): string {
  const pathFile = join(PACKAGE, 'path.txt')
  const installed =
    existsSync(pathFile) && existsSync(join(PACKAGE, 'dist', readFileSync(pathFile, 'utf8').trim()))
  const shown =
    process.platform !== 'linux' || Boolean(process.env['DISPLAY'] ?? process.env['WAYLAND_DISPLAY'])
  if (installed && shown) {
    const { version } = JSON.parse(readFileSync(join(PACKAGE, 'package.json'), 'utf8')) as { version: string } // npm's
    return `electron ${version}`
  }
  // Playwright asks the electron package for its executable, which looks here first
  process.env['ELECTRON_OVERRIDE_DIST_PATH'] = join(ROOT, 'test', 'stand-in')
  return 'stand-in'
}
