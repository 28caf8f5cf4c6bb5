import { describe, expect, it } from 'vitest'
import { dataFolder } from '../../../electron/library/data-folder.ts'

describe('dataFolder', () => {
  const on = (platform: NodeJS.Platform, env: Record<string, string> = {}) =>
    dataFolder({ platform, home: '/home/me', env })

  // SOURCE  XDG Base Directory Specification: $XDG_DATA_HOME, else ~/.local/share; relative paths are ignored.
  it('follows the XDG specification on Linux', () => {
    expect(on('linux')).toBe('/home/me/.local/share/stillbed')
    expect(on('linux', { XDG_DATA_HOME: '/data' })).toBe('/data/stillbed')
    expect(on('linux', { XDG_DATA_HOME: 'data' })).toBe('/home/me/.local/share/stillbed')
  })

  it('uses the application data of the user on Windows and macOS', () => {
    expect(on('darwin')).toBe('/home/me/Library/Application Support/Stillbed')
    expect(on('win32', { APPDATA: '/roaming' })).toBe('/roaming/Stillbed')
  })

  it('lets STILLBED_DATA override all', () => {
    expect(on('linux', { STILLBED_DATA: '/elsewhere', XDG_DATA_HOME: '/data' })).toBe('/elsewhere')
  })
})
