import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { DesktopBridge } from '../../../electron/api/contract.ts'
import { RUNTIME, launchDesktop, type DesktopRun } from '../../setup/desktop.ts'

// Layer: the built main and preload in the runtime that this line names.
console.log(`runtime: ${RUNTIME}`)
let desktop: DesktopRun
beforeAll(async () => {
  desktop = await launchDesktop()
}, 90_000)
afterAll(() => desktop.remove())

type Shown = typeof globalThis & { stillbed: DesktopBridge; require?: unknown; process?: unknown }

describe('the window', () => {
  it('shows the Shelf with the demo projects', async () => {
    await desktop.page.getByText('Kiln exhaust fan').first().waitFor()
    expect(await desktop.page.title()).toBe('Stillbed')
  })

  it('shows only when its pages are drawn', async () => {
    const visible = await desktop.app.evaluate(({ BrowserWindow }) =>
      BrowserWindow.getAllWindows()[0]?.isVisible(),
    )
    expect(visible).toBe(true)
  })

  it('stands at our own scheme', async () => {
    const url = await desktop.app.evaluate(({ webContents }) => webContents.getAllWebContents()[0]?.getURL())
    expect(url).toMatch(/^stillbed:\/\/app\/index\.html/)
  })
})

describe('what the pages can reach', () => {
  it('is one frozen object of named functions, and nothing of Node or Electron', async () => {
    const seen = await desktop.page.evaluate(() => {
      const shown = globalThis as Shown
      return {
        kinds: [...new Set(Object.values(shown.stillbed).map((value) => typeof value))],
        frozen: Object.isFrozen(shown.stillbed),
        names: Object.keys(shown.stillbed).length,
        node: [typeof shown.require, typeof shown.process, typeof Reflect.get(globalThis, 'ipcRenderer')],
      }
    })
    // sixteen endpoints of the contract and three listeners
    expect(seen).toEqual({
      kinds: ['function'],
      frozen: true,
      names: 19,
      node: ['undefined', 'undefined', 'undefined'],
    })
  })

  it('calls the API through it', async () => {
    const reply = await desktop.page.evaluate(() =>
      (globalThis as Shown).stillbed.shelfList({ query: 'kiln' }),
    )
    expect(reply).toMatchObject({ ok: true, value: [{ name: 'Kiln exhaust fan on the mezzanine' }] })
  })

  it('gets errors as an envelope, with the field', async () => {
    const reply = await desktop.page.evaluate(() =>
      (globalThis as Shown).stillbed.shelfOpen({ id: 'nonsense' }),
    )
    expect(reply).toMatchObject({ ok: false, error: { code: 'invalid-input', field: 'id' } })
  })

  it('keeps NaN out of the library, which arrives as NaN and not as null', async () => {
    const reply = await desktop.page.evaluate(async () => {
      const { stillbed } = globalThis as Shown
      const list = await stillbed.shelfList({})
      const opened = await stillbed.shelfOpen({ id: list.ok ? (list.value[0]?.id ?? '') : '' })
      if (!opened.ok) return opened
      const { id, revision, project } = opened.value
      return stillbed.shelfSave({ id, revision, project: { ...project, analysis: { gravity: NaN } } })
    })
    expect(reply).toMatchObject({ ok: false, error: { code: 'invalid-input', field: 'analysis.gravity' } })
  })

  it('gets the report as bytes, drawn in a process of its own', async () => {
    const start = await desktop.page.evaluate(async () => {
      const { stillbed } = globalThis as Shown
      const list = await stillbed.shelfList({})
      const opened = await stillbed.shelfOpen({ id: list.ok ? (list.value[0]?.id ?? '') : '' })
      if (!opened.ok) return opened.error.message
      const report = await stillbed.reportPdf({ project: { ...opened.value.project } })
      if (!report.ok) return report.error.message
      return { bytes: report.value.bytes instanceof Uint8Array, head: [...report.value.bytes.subarray(0, 5)] }
    })
    // "%PDF-"
    expect(start).toEqual({ bytes: true, head: [0x25, 0x50, 0x44, 0x46, 0x2d] })
  })
})

describe('the lock on the pages', () => {
  it('runs no inline script, no inline handler, and loads nothing from outside', async () => {
    const ran = await desktop.page.evaluate(async () => {
      const done: string[] = []
      Object.assign(globalThis, { done })
      const script = document.createElement('script')
      script.textContent = "globalThis.done.push('inline script')"
      document.body.append(script)
      const button = document.createElement('button')
      button.setAttribute('onclick', "globalThis.done.push('inline handler')")
      document.body.append(button)
      button.click()
      button.remove()
      await fetch('https://example.org/').then(
        () => done.push('remote fetch'),
        () => {},
      )
      return done
    })
    expect(ran).toEqual([])
  })

  it('stays at its own pages', async () => {
    await desktop.page.evaluate(() => {
      location.href = 'https://example.org/'
    })
    await desktop.page.waitForTimeout(300)
    const url = await desktop.app.evaluate(({ webContents }) => webContents.getAllWebContents()[0]?.getURL())
    expect(url).toMatch(/^stillbed:\/\/app\//)
    await desktop.page.getByText('Kiln exhaust fan').first().waitFor()
  })

  it('opens no window, and outside only links to published sources', async () => {
    await desktop.app.evaluate(({ shell }) => {
      const opened: string[] = []
      Object.assign(globalThis, { opened })
      shell.openExternal = (url: string) => Promise.resolve(void opened.push(url))
    })
    await desktop.page.evaluate(() => {
      for (const url of [
        'https://example.org/',
        'http://doi.org/10.1000/1',
        'https://doi.org/10.1000/1',
        'file:///etc',
      ]) {
        window.open(url)
      }
    })
    const opened = () => desktop.app.evaluate(() => Reflect.get(globalThis, 'opened') as string[])
    await expect.poll(opened).toEqual(['https://doi.org/10.1000/1'])
    expect(await desktop.app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows().length)).toBe(1)
  })

  it('grants no permission', async () => {
    const states = await desktop.page.evaluate(async () => {
      const names = ['geolocation', 'notifications'] as const
      return Promise.all(names.map(async (name) => (await navigator.permissions.query({ name })).state))
    })
    expect(states).toEqual(['denied', 'denied'])
  })

  it('lets no webview in', async () => {
    const prevented = await desktop.app.evaluate(({ webContents }) => {
      let prevented = false
      const event = { preventDefault: () => (prevented = true) }
      // declared for the runtime's own use; as an emitter it takes any event
      const emit = (name: string, ...args: unknown[]) =>
        Reflect.apply(
          Reflect.get(webContents.getAllWebContents()[0] ?? {}, 'emit') as never,
          webContents.getAllWebContents()[0],
          [name, ...args],
        )
      emit('will-attach-webview', event, {}, {})
      return prevented
    })
    expect(prevented).toBe(true)
  })
})
