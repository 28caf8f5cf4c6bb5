import { homedir } from 'node:os'
import { join } from 'node:path'

interface Machine {
  readonly platform: NodeJS.Platform
  readonly home: string
  readonly env: Readonly<Record<string, string | undefined>>
}

/**
 * The folder for what Stillbed keeps, by the custom of each system: `%APPDATA%` on Windows,
 * `Library/Application Support` on macOS, and elsewhere `$XDG_DATA_HOME` or `~/.local/share`
 * (XDG Base Directory Specification). `STILLBED_DATA` overrides all.
 */
export function dataFolder(
  machine: Machine = { platform: process.platform, home: homedir(), env: process.env },
): string {
  const { platform, home, env } = machine
  if (env['STILLBED_DATA']) return env['STILLBED_DATA']
  if (platform === 'win32') return join(env['APPDATA'] || join(home, 'AppData', 'Roaming'), 'Stillbed')
  if (platform === 'darwin') return join(home, 'Library', 'Application Support', 'Stillbed')
  const xdg = env['XDG_DATA_HOME']
  // the specification tells to ignore a relative path
  return join(xdg?.startsWith('/') ? xdg : join(home, '.local', 'share'), 'stillbed')
}

/** The library that is opened when no other is named. */
export function defaultLibraryFile(): string {
  return join(dataFolder(), 'library.sqlite')
}
