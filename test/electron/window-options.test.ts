import { describe, expect, it } from 'vitest'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { readMainArguments } from '../../electron/main-arguments.ts'
import { usablePlace } from '../../electron/window-place.ts'

const SCREEN = { x: 0, y: 0, width: 1920, height: 1080 }
const PLACE = { x: 100, y: 50, width: 1200, height: 800, maximized: false }

describe('usablePlace', () => {
  it('is the stored place while it is on a screen', () => {
    expect(usablePlace(PLACE, [SCREEN])).toEqual(PLACE)
    const second = { x: 1920, y: -200, width: 1280, height: 1024 }
    expect(usablePlace({ ...PLACE, x: 2000, y: -150 }, [SCREEN, second])).not.toBeNull()
  })

  it.each([
    ['on a screen that has gone', { ...PLACE, x: 2500 }],
    ['above every screen', { ...PLACE, y: -900 }],
    ['too far down to be caught hold of', { ...PLACE, y: 1075 }],
    ['too small', { ...PLACE, width: 10 }],
    ['not a place', { x: 'left' }],
    ['nothing', null],
  ])("is the system's choice when what is stored is %s", (_what, stored) => {
    expect(usablePlace(stored, [SCREEN])).toBeNull()
  })
})

describe('readMainArguments', () => {
  it("takes the library and a project file from among the runtime's own switches", () => {
    expect(
      readMainArguments(['.', '--no-sandbox', '--library', 'b.sqlite', 'fan.stillbed.json'], '/home/me'),
    ).toEqual({
      library: '/home/me/b.sqlite',
      file: '/home/me/fan.stillbed.json',
    })
  })

  it('does without', () => {
    expect(readMainArguments(['.'], '/home/me')).toEqual({ library: '', file: '' })
    expect(readMainArguments(['--library'], '/home/me')).toEqual({ library: '', file: '' })
  })
})

// A setting that no runtime here can show to be missing: it is read where it is written.
describe("the window's settings in the built main", () => {
  const main = readFileSync(join(import.meta.dirname, '../../out/shell/main.js'), 'utf8')

  it.each([
    'contextIsolation: true',
    'sandbox: true',
    'nodeIntegration: false',
    'webSecurity: true',
    'webviewTag: false',
  ])('%s', (setting) => {
    expect(main).toContain(setting)
  })

  it('turns no protection off', () => {
    expect(main).not.toMatch(
      /contextIsolation: false|sandbox: false|nodeIntegration\w*: true|webSecurity: false/,
    )
    expect(main).toContain('app.enableSandbox()')
  })

  it('gives the preload one file that needs nothing but Electron', () => {
    const preload = readFileSync(join(import.meta.dirname, '../../out/shell/preload.cjs'), 'utf8')
    expect([...preload.matchAll(/require\(([^)]*)\)/g)].map(([, name]) => name)).toEqual(['"electron"'])
    expect(preload).not.toContain('ZodError')
  })
})
