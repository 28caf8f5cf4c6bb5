import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it, onTestFinished } from 'vitest'
import type { DesktopBridge } from '../../../electron/api/contract.ts'
import { RUNTIME, launchDesktop, type DesktopRun } from '../../setup/desktop.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { renamed, sampleProject } from '../projects.ts'

console.log(`runtime: ${RUNTIME}`)
type Shown = typeof globalThis & { stillbed: DesktopBridge }

async function desktopOf(): Promise<DesktopRun> {
  const desktop = await launchDesktop()
  onTestFinished(() => desktop.remove())
  return desktop
}

/** Answers of the person before the screen, in turn, by the words on the button. */
async function script({ app }: DesktopRun, answers: readonly string[], saveTo = ''): Promise<void> {
  await app.evaluate(
    ({ dialog }, { answers, saveTo }) => {
      const asked: string[] = []
      Object.assign(globalThis, { asked })
      dialog.showMessageBox = ((_window: unknown, options: { buttons: string[]; detail: string }) => {
        const answer = answers[asked.length] ?? ''
        asked.push(options.detail)
        return Promise.resolve({ response: options.buttons.indexOf(answer), checkboxChecked: false })
      }) as typeof dialog.showMessageBox // main uses only the signature with a window
      dialog.showSaveDialog = (() =>
        Promise.resolve({ canceled: saveTo === '', filePath: saveTo })) as typeof dialog.showSaveDialog
    },
    { answers, saveTo },
  )
}

const askedIn = ({ app }: DesktopRun) => app.evaluate(() => Reflect.get(globalThis, 'asked') as string[])

async function closeWindow({ app }: DesktopRun): Promise<void> {
  await app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0]?.close())
}

function ended({ process }: DesktopRun): Promise<void> {
  return new Promise((resolve) => process.once('exit', () => resolve()))
}

/** Pages whose save goes wrong `failures` times and then succeeds. */
async function failingPages({ page }: DesktopRun, failures: number): Promise<void> {
  await page.evaluate((count) => {
    let left = count
    ;(globalThis as Shown).stillbed.onClosing(() =>
      Promise.resolve(
        left-- > 0
          ? {
              saved: false as const,
              message: 'The disk is full.',
              fileName: 'fan.json',
              text: '{"kept":true}',
            }
          : { saved: true as const },
      ),
    )
  }, failures)
}

describe('closing the window', () => {
  it('waits for the pending save', async () => {
    const desktop = await desktopOf()
    const { id } = await desktop.page.evaluate(
      async (project) => {
        const made = await (globalThis as Shown).stillbed.shelfCreate({ project })
        if (!made.ok) throw new Error(made.error.message)
        return made.value
      },
      { ...sampleProject() },
    )
    await desktop.page.evaluate(
      ({ id, project }) => {
        const { stillbed } = globalThis as Shown
        stillbed.onClosing(async () => {
          await new Promise((resolve) => setTimeout(resolve, 400))
          await stillbed.shelfSave({ id, revision: 1, project })
          return { saved: true }
        })
      },
      { id, project: { ...renamed(sampleProject(), 'typed just before closing') } },
    )
    const gone = ended(desktop)
    await closeWindow(desktop)
    await gone
    const again = await launchDesktop({ data: desktop.data })
    onTestFinished(() => again.remove())
    const reply = await again.page.evaluate(
      (wanted) => (globalThis as Shown).stillbed.shelfOpen({ id: wanted }),
      id,
    )
    expect(reply).toMatchObject({
      ok: true,
      value: { revision: 2, project: { job: { name: 'typed just before closing' } } },
    })
  })

  it('closes at once when nothing is pending', async () => {
    const desktop = await desktopOf()
    const gone = ended(desktop)
    await closeWindow(desktop)
    await gone
    expect(desktop.process.exitCode).toBe(0)
  })

  it('asks when the save fails, and tries again', async () => {
    const desktop = await desktopOf()
    await failingPages(desktop, 2)
    await script(desktop, ['Try again', 'Try again'])
    const gone = ended(desktop)
    await closeWindow(desktop)
    await gone
  })

  it('stays open when told to, with what went wrong in the question', async () => {
    const desktop = await desktopOf()
    await failingPages(desktop, 1)
    await script(desktop, ['Stay'])
    await closeWindow(desktop)
    await expect.poll(() => askedIn(desktop)).toEqual(['The disk is full.'])
    expect(await desktop.app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows().length)).toBe(1)
    await desktop.page.getByText('Kiln exhaust fan').first().waitFor()
  })

  it('keeps a copy where the person wants it, and then closes', async () => {
    const desktop = await desktopOf()
    const file = join(temporaryFolder(), 'kept.json')
    await failingPages(desktop, 9)
    await script(desktop, ['Keep a copy…'], file)
    const gone = ended(desktop)
    await closeWindow(desktop)
    await gone
    expect(readFileSync(file, 'utf8')).toBe('{"kept":true}')
  })

  it('asks again when no place for the copy was chosen, and loses nothing by itself', async () => {
    const desktop = await desktopOf()
    await failingPages(desktop, 9)
    await script(desktop, ['Keep a copy…', 'Stay'])
    await closeWindow(desktop)
    await expect.poll(() => askedIn(desktop)).toHaveLength(2)
    expect(existsSync(join(desktop.data, 'library.sqlite'))).toBe(true)
  })

  it('closes without saving when that is wanted', async () => {
    const desktop = await desktopOf()
    await failingPages(desktop, 9)
    await script(desktop, ['Close without saving'])
    const gone = ended(desktop)
    await closeWindow(desktop)
    await gone
  })
})

describe('what the pages hand over', () => {
  it('is saved where the person wants it, proposed under its name in the documents', async () => {
    const desktop = await desktopOf()
    const file = join(temporaryFolder(), 'saved.json')
    await desktop.app.evaluate(({ session }, path) => {
      session.defaultSession.once('will-download', (_event, item) => {
        Object.assign(globalThis, { proposed: item.getSaveDialogOptions().defaultPath })
        item.setSavePath(path)
        item.once('done', (_done, state) => Object.assign(globalThis, { state }))
      })
    }, file)
    await desktop.page.evaluate(() => {
      const link = document.createElement('a')
      link.href = URL.createObjectURL(new Blob(['{"handed":"over"}'], { type: 'application/json' }))
      link.download = 'fan.stillbed.json'
      link.click()
    })
    await expect
      .poll(() => desktop.app.evaluate(() => Reflect.get(globalThis, 'state') as string))
      .toBe('completed')
    expect(readFileSync(file, 'utf8')).toBe('{"handed":"over"}')
    const proposed = await desktop.app.evaluate(() => Reflect.get(globalThis, 'proposed') as string)
    expect(proposed).toMatch(/[\\/]fan\.stillbed\.json$/)
  })
})

describe('a page that crashes', () => {
  it('is drawn again, and the library has everything that was saved', async () => {
    const desktop = await desktopOf()
    await desktop.page.evaluate((project) => (globalThis as Shown).stillbed.shelfCreate({ project }), {
      ...sampleProject(),
    })
    await desktop.app.evaluate(({ webContents }) => {
      const [contents] = webContents.getAllWebContents()
      Object.assign(globalThis, {
        again: new Promise<void>((resolve) => contents?.once('did-finish-load', () => resolve())),
      })
      contents?.forcefullyCrashRenderer()
    })
    await desktop.app.evaluate(() => Reflect.get(globalThis, 'again') as Promise<void>)
    const shown = await desktop.app.evaluate(({ webContents }) =>
      webContents
        .getAllWebContents()[0]
        ?.executeJavaScript("stillbed.shelfList({ query: 'sieve' }).then((r) => r.value.length)"),
    )
    expect(shown).toBe(1)
  })
})
