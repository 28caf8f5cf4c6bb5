import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it, onTestFinished } from 'vitest'
import { RUNTIME, launchDesktop, type DesktopRun } from '../../setup/desktop.ts'
import { temporaryFolder } from '../../setup/folder.ts'

// Layer: the built main, preload and pages together, in the runtime that this line names.
console.log(`runtime: ${RUNTIME}`)
const FAN = 'Kiln exhaust fan on the mezzanine'
let desktop: DesktopRun
beforeAll(async () => {
  desktop = await launchDesktop()
  await openFan(desktop.page)
}, 90_000)
afterAll(() => desktop.remove())

async function openFan(page: Page): Promise<void> {
  await page.getByRole('button', { name: FAN, exact: true }).click()
  await page.getByRole('heading', { name: 'Machine', level: 1 }).waitFor()
}

async function menu(id: string): Promise<string> {
  return desktop.app.evaluate(({ Menu }, wanted) => {
    const item = Menu.getApplicationMenu()?.getMenuItemById(wanted)
    if (!item) throw new Error(`no menu item ${wanted}`)
    item.click()
    return item.label
  }, id)
}

const jobNumber = (page: Page) => page.getByRole('textbox', { name: 'Job number' })

describe('the menus on the pages', () => {
  it.each([1, 2, 3, 4, 5])('step %d is the sheet that the menu calls it', async (step) => {
    const label = await menu(`step:${step}`)
    await desktop.page.getByRole('heading', { name: label, level: 1, exact: true }).waitFor()
  })

  it('undo and redo a change', async () => {
    await menu('step:1')
    await jobNumber(desktop.page).fill('KF-99')
    await jobNumber(desktop.page).press('Enter')
    await menu('edit:undo')
    await expect.poll(() => jobNumber(desktop.page).inputValue()).toBe('KF-07')
    await menu('edit:redo')
    await expect.poll(() => jobNumber(desktop.page).inputValue()).toBe('KF-99')
    await menu('edit:undo')
  })

  it('turn the sheet', async () => {
    const sheet = () => desktop.page.evaluate(() => document.documentElement.dataset['sheet'])
    await menu('sheet:dark')
    await expect.poll(sheet).toBe('dark')
    await menu('sheet:light')
    await expect.poll(sheet).toBe('light')
  })

  it('go back to the Shelf and from there to a new project', async () => {
    await menu('shelf:show')
    await desktop.page.getByRole('heading', { name: 'Shelf', level: 1 }).waitFor()
    await menu('project:new')
    await desktop.page.getByRole('dialog', { name: 'New project' }).waitFor()
    await desktop.page.getByRole('button', { name: 'Cancel' }).click()
    await openFan(desktop.page)
  })
})

it('saves the report where the person wants it', async () => {
  const file = join(temporaryFolder(), 'report.pdf')
  await desktop.app.evaluate(({ session }, path) => {
    session.defaultSession.once('will-download', (_event, item) => {
      item.setSavePath(path)
    })
  }, file)
  await menu('step:6')
  await desktop.page.getByRole('button', { name: 'Make the PDF' }).click()
  await expect.poll(() => existsSync(file), { timeout: 25_000 }).toBe(true)
  const bytes = readFileSync(file)
  expect(bytes.subarray(0, 5).toString()).toBe('%PDF-')
  expect(bytes.subarray(-8).toString()).toContain('%%EOF')
})

it('keeps what was typed in the moment before the window closed', async () => {
  const first = await launchDesktop()
  onTestFinished(() => first.remove())
  await openFan(first.page)
  const gone = new Promise((resolve) => first.process.once('exit', resolve))
  await jobNumber(first.page).fill('KF-08')
  await jobNumber(first.page).press('Enter')
  await first.app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0]?.close())
  await gone
  const second = await launchDesktop({ data: first.data })
  onTestFinished(() => second.remove())
  await second.page.getByRole('cell', { name: 'KF-08' }).waitFor()
})
