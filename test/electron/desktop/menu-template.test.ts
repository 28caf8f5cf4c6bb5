import { beforeAll, describe, expect, it, vi } from 'vitest'
import type { MenuItemConstructorOptions } from 'electron'
import type { menuTemplate as MenuTemplate } from '../../../electron/menu.ts'

// Layer: the template as data, for every platform; nothing of Electron runs.
vi.mock('electron', () => ({ Menu: {} }))
let menuTemplate: typeof MenuTemplate
beforeAll(async () => {
  menuTemplate = (await import('../../../electron/menu.ts')).menuTemplate
})

const ACTIONS = { command: () => {}, showLog: () => {}, about: () => {} }

function itemsOf(template: readonly MenuItemConstructorOptions[]): MenuItemConstructorOptions[] {
  return template.flatMap((item) => [item, ...(Array.isArray(item.submenu) ? itemsOf(item.submenu) : [])])
}

function leaves(platform: NodeJS.Platform, packaged = false): MenuItemConstructorOptions[] {
  return itemsOf(menuTemplate({ platform, packaged }, ACTIONS)).filter(
    (item) => item.type !== 'separator' && !item.submenu,
  )
}

describe.each(['linux', 'win32', 'darwin'] as const)('on %s', (platform) => {
  it('every item has an id and a key of its own', () => {
    const items = leaves(platform)
    for (const { id, accelerator, label } of items)
      expect([label, Boolean(id), Boolean(accelerator)]).toEqual([label, true, true])
    expect(new Set(items.map(({ id }) => id)).size).toBe(items.length)
    const keys = items.map(({ accelerator }) =>
      String(accelerator).replace('CmdOrCtrl', platform === 'darwin' ? 'Cmd' : 'Ctrl'),
    )
    expect(new Set(keys).size).toBe(keys.length)
  })

  // common practice, no source: what the systems keep for windows, screens and sessions; Ctrl with Alt is
  // AltGr on many Windows keyboards, where it types letters.
  it('takes no key that the system keeps', () => {
    const kept = {
      linux: /^(Alt\+(F\d+|Tab|Space)|Ctrl\+Alt\+.*|Super\+.*|PrintScreen)$/,
      win32: /^(Alt\+(F4|Tab|Space|Esc)|Ctrl\+Alt\+.*|Super\+.*|F10)$/,
      darwin: /^(Cmd\+(H|M|Tab|Space|F[1-5]|Alt\+Esc|Shift\+[3-5])|Ctrl\+F[1-8])$/,
    }[platform]
    const meta = platform === 'darwin' ? 'Cmd' : 'Ctrl'
    const taken = leaves(platform).map(({ accelerator }) => String(accelerator).replace('CmdOrCtrl', meta))
    expect(taken.filter((key) => kept.test(key))).toEqual([])
  })

  it('offers developer tools only where it is not packaged', () => {
    const has = (packaged: boolean) =>
      leaves(platform, packaged).some(({ role }) => role === 'toggleDevTools')
    expect([has(false), has(true)]).toEqual([true, false])
  })
})
