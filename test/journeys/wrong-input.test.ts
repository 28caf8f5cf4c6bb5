import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser } from '../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import {
  backToShelf,
  goTo,
  openProject,
  saved,
  type,
  verdictTexts,
  visit,
  type Visit,
} from './at-the-desk.ts'

let browser: Browser
let run: LoopbackRun
let visitor: Visit

const FAN = 'Kiln exhaust fan on the mezzanine'

beforeAll(async () => {
  browser = await launchBrowser()
  run = await startLoopback()
  visitor = await visit(browser, run.address)
  await openProject(visitor.page, FAN)
})
afterAll(async () => {
  await browser.close()
  await run.remove()
})

describe('what cannot be used', () => {
  it.each([
    ['text', 'fast', 'enter a number'],
    ['zero', '0', 'greater than'],
    ['a negative speed', '-1450 rpm', 'greater than'],
    ['another quantity', '12 kg', 'enter a number'],
    ['an absurd speed', '1e12 rpm', 'must not be'],
    ['a division by zero', '1/0', 'enter a number'],
  ])('%s stays in its field with a word beside it, and nothing else changes', async (_what, text, words) => {
    const { page } = visitor
    await goTo(page, 'Machine')
    await expect
      .poll(() => page.getByRole('textbox', { name: 'Running speed', exact: true }).inputValue())
      .toBe('1450')
    const before = await verdictTexts(page)
    await type(page, 'Running speed', text)
    const field = page.getByRole('textbox', { name: 'Running speed', exact: true })
    expect(await field.inputValue()).toBe(text)
    expect(await field.getAttribute('aria-invalid')).toBe('true')
    await expect
      .poll(() => page.getByRole('region', { name: 'Shaft and speeds' }).innerText())
      .toMatch(new RegExp(words, 'i'))
    expect(await verdictTexts(page)).toEqual(before)
    // everything else keeps working while the wrong text stands there
    await type(page, 'Highest speed on charts', '1700')
    await saved(page)
    await page.keyboard.press('Control+z')
    await backToShelf(page)
    await openProject(page, FAN)
    await expect
      .poll(() => page.getByRole('textbox', { name: 'Running speed', exact: true }).inputValue())
      .toBe('1450')
    expect(await verdictTexts(page)).toEqual(before)
  })

  it('two mounts at one place are named, and undo parts them again', async () => {
    const { page } = visitor
    await goTo(page, 'Mounts')
    const before = await verdictTexts(page)
    const [x, y] = await Promise.all(
      ['M1 x', 'M1 y'].map((name) => page.getByRole('textbox', { name, exact: true }).inputValue()),
    )
    await type(page, 'M2 x', x ?? '')
    await type(page, 'M2 y', y ?? '')
    await expect.poll(() => page.getByRole('main').innerText()).toMatch(/M2 stands at the same point as M1/)
    await page.keyboard.press('Control+z')
    await page.keyboard.press('Control+z')
    await expect.poll(() => verdictTexts(page)).toEqual(before)
  })

  it('a machine that its mounts leave free says which way it can move', async () => {
    const { page } = visitor
    await goTo(page, 'Mounts')
    for (const mark of ['M2', 'M3', 'M4', 'M5', 'M6']) {
      await page.getByRole('button', { name: `Remove ${mark}`, exact: true }).click()
    }
    await expect.poll(() => page.getByRole('main').innerText()).toMatch(/free to/)
    for (const text of await verdictTexts(page)) expect(text).not.toMatch(/NaN|Infinity|undefined/)
    for (const step of ['Response', 'Absorber', 'Report'] as const) {
      await goTo(page, step)
      expect(await page.getByRole('main').innerText()).not.toMatch(/NaN|Infinity|undefined/)
    }
    for (let step = 0; step < 5; step++) await page.keyboard.press('Control+z')
    await goTo(page, 'Mounts')
    await expect.poll(() => page.getByRole('row', { name: /^Select M\d/ }).count()).toBe(6)
  })

  it('raised no complaint in the browser', () => {
    expect(visitor.complaints).toEqual([])
  })
})
