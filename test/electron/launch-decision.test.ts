import { describe, expect, it } from 'vitest'
import {
  decideHost,
  nodeIsRecentEnough,
  parseLaunchArguments,
  whyNoWindow,
} from '../../electron/launch-decision.mjs'

describe('decideHost', () => {
  const runtime = '/somewhere/electron'

  it('opens the window wherever it can', () => {
    expect(decideHost({ wanted: 'any', noWindow: null, runtime })).toEqual({
      host: 'desktop',
      runtime,
      reason: '',
    })
    expect(decideHost({ wanted: 'desktop', noWindow: null, runtime }).host).toBe('desktop')
  })

  it('serves the browser where there is no runtime or no display, and says so', () => {
    expect(decideHost({ wanted: 'any', noWindow: null, runtime: null })).toMatchObject({
      host: 'browser',
      reason: expect.stringContaining("Electron's runtime") as string,
    })
    expect(decideHost({ wanted: 'any', noWindow: 'there is no display', runtime })).toEqual({
      host: 'browser',
      reason: 'there is no display',
    })
  })

  it('obeys --browser even where a window could be had', () => {
    expect(decideHost({ wanted: 'browser', noWindow: null, runtime }).host).toBe('browser')
  })

  it('gives up on a --desktop that cannot be met', () => {
    expect(decideHost({ wanted: 'desktop', noWindow: null, runtime: null }).host).toBe('none')
    expect(decideHost({ wanted: 'desktop', noWindow: 'there is no display', runtime }).host).toBe('none')
  })
})

describe('whyNoWindow', () => {
  it.each([
    ['linux', {}, 1000, 'there is no display'],
    ['linux', { DISPLAY: '' }, 1000, 'there is no display'],
    ['linux', { DISPLAY: ':0' }, 1000, null],
    ['linux', { WAYLAND_DISPLAY: 'wayland-0' }, 1000, null],
    ['linux', { DISPLAY: ':0' }, 0, "the desktop window's sandbox does not run as root"],
    ['darwin', {}, 501, null],
    ['win32', {}, null, null],
  ])('on %s with %j as user %s: %s', (platform, env, uid, reason) => {
    expect(whyNoWindow({ platform, env, uid })).toBe(reason)
  })
})

describe('nodeIsRecentEnough', () => {
  it.each([
    ['20.20.2', false],
    ['22.11.9', false],
    ['22.12.0', true],
    ['23.0.0', true],
    ['24.13.0', true],
  ])('%s: %s', (version, enough) => {
    expect(nodeIsRecentEnough(version)).toBe(enough)
  })
})

describe('parseLaunchArguments', () => {
  it('reads every option', () => {
    expect(
      parseLaunchArguments(['--browser', '--library', 'a.sqlite', '--port', '8080', '--no-open']),
    ).toEqual({
      host: 'browser',
      library: 'a.sqlite',
      port: 8080,
      open: false,
      help: false,
    })
    expect(parseLaunchArguments([])).toEqual({ host: 'any', library: '', port: 0, open: true, help: false })
  })

  it.each([
    [['--window'], 'unknown option --window'],
    [['project.json'], 'unknown option project.json'],
    [['--library'], '--library needs a file'],
    [['--library', '--no-open'], '--library needs a file'],
    [['--port', 'many'], '--port takes 1 to 65535, not many'],
    [['--port', '0'], '--port takes 1 to 65535, not 0'],
    [['--port', '70000'], '--port takes 1 to 65535, not 70000'],
    [['--browser', '--desktop'], '--browser and --desktop exclude each other'],
  ])('refuses %j', (args, message) => {
    expect(() => parseLaunchArguments(args)).toThrow(message)
  })
})
