import { spawn } from 'node:child_process'
import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it, onTestFinished } from 'vitest'
import type { DesktopBridge } from '../../../electron/api/contract.ts'
import { RUNTIME, launchDesktop, type DesktopOptions, type DesktopRun } from '../../setup/desktop.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { startLoopback } from '../../setup/loopback.ts'
import { renamed, sampleProject } from '../projects.ts'

console.log(`runtime: ${RUNTIME}`)
type Shown = typeof globalThis & { stillbed: DesktopBridge }

async function desktopOf(options: DesktopOptions = {}): Promise<DesktopRun> {
  const desktop = await launchDesktop(options)
  onTestFinished(() => desktop.remove())
  return desktop
}

const rowsOf = ({ page }: DesktopRun, query: string) =>
  page.evaluate(async (text) => {
    const reply = await (globalThis as Shown).stillbed.shelfList({ query: text })
    return reply.ok ? reply.value.map(({ name }) => name) : []
  }, query)

describe('starting again', () => {
  it("finds the library and the window's place as they were left", async () => {
    const first = await desktopOf()
    await first.page.evaluate((project) => (globalThis as Shown).stillbed.shelfCreate({ project }), {
      ...sampleProject(),
    })
    await first.app.evaluate(({ BrowserWindow }) =>
      BrowserWindow.getAllWindows()[0]?.setBounds({ x: 40, y: 30, width: 1100, height: 700 }),
    )
    await first.quit()
    const second = await desktopOf({ data: first.data })
    expect(await rowsOf(second, 'sieve drive')).toEqual(['Sieve drive'])
    const place = await second.app.evaluate(({ BrowserWindow }) =>
      BrowserWindow.getAllWindows()[0]?.getNormalBounds(),
    )
    expect(place).toMatchObject({ x: 40, y: 30, width: 1100, height: 700 })
  })

  it('opens another library when told to', async () => {
    const library = join(temporaryFolder(), 'other.sqlite')
    const desktop = await desktopOf({ args: ['--library', library] })
    const info = await desktop.page.evaluate(() => (globalThis as Shown).stillbed.appInfo(null))
    expect(info).toEqual({ ok: true, value: { version: '0.1.0', host: 'desktop', libraryFile: library } })
  })

  it('brings in the project file that it is started with', async () => {
    const file = join(temporaryFolder(), 'mill.stillbed.json')
    writeFileSync(file, JSON.stringify(renamed(sampleProject(), 'Hammer mill')))
    const desktop = await desktopOf({ args: [file] })
    await expect.poll(() => rowsOf(desktop, 'hammer')).toEqual(['Hammer mill'])
  })
})

describe('a second start', () => {
  it('ends at once and hands its project file to the first, which shows it', async () => {
    const first = await desktopOf()
    await first.page.evaluate(() => {
      const shown: string[] = []
      Object.assign(globalThis, { shown })
      ;(globalThis as Shown).stillbed.onProjectShow(({ id }) => void shown.push(id))
    })
    const file = join(temporaryFolder(), 'press.json')
    writeFileSync(file, JSON.stringify(renamed(sampleProject(), 'Tile press')))
    expect(await startSecond(first, [file])).toBe(0)
    await expect.poll(() => rowsOf(first, 'tile press')).toEqual(['Tile press'])
    expect(await first.page.evaluate(() => (Reflect.get(globalThis, 'shown') as string[]).length)).toBe(1)
  })

  it('says so when the file is no project', async () => {
    const first = await desktopOf()
    await scriptMessages(first)
    const file = join(temporaryFolder(), 'letter.json')
    writeFileSync(file, '{"dear":"Sir"}')
    await startSecond(first, [file])
    await expect.poll(() => messagesOf(first)).toEqual([`${file} cannot be opened.`])
  })

  it('says that another library has to wait', async () => {
    const first = await desktopOf()
    await scriptMessages(first)
    await startSecond(first, ['--library', join(temporaryFolder(), 'other.sqlite')])
    await expect.poll(() => messagesOf(first)).toEqual(['Stillbed is already open with another library.'])
  })
})

describe('a library that cannot be had', () => {
  it('is said on standard error when a browser host has it, and the desktop ends', async () => {
    const folder = temporaryFolder()
    const host = await startLoopback(join(folder, 'library.sqlite'))
    onTestFinished(() => host.remove())
    const { code, errors } = await startAlone(folder, [])
    expect(code).not.toBe(0)
    expect(errors).toContain('Stillbed already runs with the library')
    expect(errors).toContain(host.origin)
  })
})

/** Another start on the same data folder. @returns its exit code */
async function startSecond(first: DesktopRun, args: readonly string[]): Promise<number | null> {
  return (await startAlone(first.data, args)).code
}

/** The runtime without Playwright: it is expected to end by itself. */
async function startAlone(data: string, args: readonly string[]) {
  const child = spawn(runtimeFile(), [join(import.meta.dirname, '../../..'), ...args], {
    env: { ...process.env, STILLBED_DATA: data },
  })
  let errors = ''
  child.stderr.on('data', (chunk) => (errors += String(chunk)))
  const code = await new Promise<number | null>((resolve) => child.once('exit', resolve))
  return { code, errors }
}

function runtimeFile(): string {
  const override = process.env['ELECTRON_OVERRIDE_DIST_PATH']
  if (override) return join(override, 'electron')
  const electron = join(import.meta.dirname, '../../../node_modules/electron')
  return join(electron, 'dist', readFileSync(join(electron, 'path.txt'), 'utf8').trim())
}

async function scriptMessages({ app }: DesktopRun): Promise<void> {
  await app.evaluate(({ dialog }) => {
    const messages: string[] = []
    Object.assign(globalThis, { messages })
    dialog.showMessageBox = ((_window: unknown, { message }: { message: string }) => {
      messages.push(message)
      return Promise.resolve({ response: 0, checkboxChecked: false })
    }) as typeof dialog.showMessageBox // main uses only the signature with a window
  })
}

const messagesOf = ({ app }: DesktopRun) =>
  app.evaluate(() => Reflect.get(globalThis, 'messages') as string[])
