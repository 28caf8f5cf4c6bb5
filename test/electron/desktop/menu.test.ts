import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { MENU_COMMANDS, type DesktopBridge } from '../../../electron/api/contract.ts'
import { RUNTIME, launchDesktop, type DesktopRun } from '../../setup/desktop.ts'

console.log(`runtime: ${RUNTIME}`)
let desktop: DesktopRun
beforeAll(async () => {
  desktop = await launchDesktop()
}, 90_000)
afterAll(() => desktop.remove())

async function click(id: string): Promise<void> {
  await desktop.app.evaluate(({ Menu }, wanted) => {
    const item = Menu.getApplicationMenu()?.getMenuItemById(wanted)
    if (!item) throw new Error(`no menu item ${wanted}`)
    item.click()
  }, id)
}

describe('the menus', () => {
  it('give every command of the contract to the pages, or none at all', async () => {
    const ids = await desktop.app.evaluate(({ Menu }) => {
      const idsOf = (items: readonly Electron.MenuItem[]): string[] =>
        items.flatMap((item) => [item.id, ...(item.submenu ? idsOf(item.submenu.items) : [])])
      return idsOf(Menu.getApplicationMenu()?.items ?? [])
    })
    // the steps that are still to come have no item yet
    const steps = ['step:7', 'step:8', 'step:9']
    for (const command of MENU_COMMANDS)
      expect([command, ids.includes(command)]).toEqual([command, !steps.includes(command)])
  })

  it('reach the pages as commands, and no longer once they have stopped listening', async () => {
    await desktop.page.evaluate(() => {
      const { stillbed } = globalThis as typeof globalThis & { stillbed: DesktopBridge }
      const heard: string[] = []
      const stop = stillbed.onMenuCommand((command) => {
        heard.push(command)
        if (command === 'sheet:dark') stop()
      })
      Object.assign(globalThis, { heard })
    })
    for (const id of ['sheet:light', 'units:US', 'sheet:dark', 'units:SI']) await click(id)
    const heard = () => desktop.page.evaluate(() => Reflect.get(globalThis, 'heard') as string[])
    await expect.poll(heard).toEqual(['sheet:light', 'units:US', 'sheet:dark'])
  })

  it('say about the program what it is and what it is not', async () => {
    await desktop.app.evaluate(({ dialog }) => {
      const shown: unknown[] = []
      Object.assign(globalThis, { shown })
      dialog.showMessageBox = ((_window: unknown, options: unknown) => {
        shown.push(options)
        return Promise.resolve({ response: 0, checkboxChecked: false })
      }) as typeof dialog.showMessageBox // one of its two signatures is all that main uses
    })
    await click('help:about')
    const shown = await desktop.app.evaluate(
      () => Reflect.get(globalThis, 'shown') as { message: string; detail: string }[],
    )
    expect(shown[0]?.message).toBe('Stillbed 0.1.0')
    expect(shown[0]?.detail).toContain('qualified engineer')
  })

  it('show the log file where it lies', async () => {
    await desktop.app.evaluate(({ shell }) => {
      shell.showItemInFolder = (file: string) => void Object.assign(globalThis, { file })
    })
    await click('help:log')
    expect(await desktop.app.evaluate(() => Reflect.get(globalThis, 'file') as string)).toMatch(
      /stillbed\.log$/,
    )
  })
})
