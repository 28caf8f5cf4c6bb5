import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser } from '../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import { backToShelf, newProject, openProject, saved, type, visit, type Visit } from './at-the-desk.ts'

let browser: Browser
let run: LoopbackRun
let visitor: Visit

beforeAll(async () => {
  browser = await launchBrowser()
  run = await startLoopback()
  visitor = await visit(browser, run.address)
})
afterAll(async () => {
  await browser.close()
  await run.remove()
})

/** Names on the Shelf, from the top. */
async function names(page: Page): Promise<string[]> {
  return page
    .getByRole('table', { name: 'Projects' })
    .getByRole('rowheader')
    .getByRole('button')
    .filter({ hasNotText: /^(demo)$/ })
    .allInnerTexts()
}

const FAN = 'Kiln exhaust fan on the mezzanine'
const PUMP = 'Vacuum pump of the clay mill'

describe('the Shelf', () => {
  it('holds the demonstration works at the first start', async () => {
    const found = await names(visitor.page)
    for (const name of [FAN, PUMP, 'Glaze mixer', 'Air compressor of the spray booths'])
      expect(found).toContain(name)
  })

  it('searches as one types, over names, machines, tags and sites', async () => {
    const { page } = visitor
    const search = page.getByRole('searchbox', { name: 'Search projects' })
    await search.fill('mezz')
    await expect
      .poll(() => names(page).then((list) => list.filter((name) => [FAN, PUMP].includes(name))))
      .toEqual([FAN])
    await search.fill('clay" OR *')
    await expect.poll(() => page.getByRole('main').innerText()).not.toMatch(/error|fts5/i)
    await search.fill('')
    await expect.poll(() => names(page)).toContain(PUMP)
  })

  it('duplicates, renames, throws away and restores', async () => {
    const { page } = visitor
    await page.getByRole('button', { name: `Duplicate ${PUMP}` }).click()
    const copy = page.getByRole('button', {
      name: new RegExp(`^(?!Rename|Duplicate|Download|Put).*${PUMP}.*copy|copy.*${PUMP}`, 'i'),
    })
    await copy.first().waitFor()
    const copyName = await copy.first().innerText()
    await page.getByRole('button', { name: `Rename or tag ${copyName}` }).click()
    const field = page.getByRole('textbox', { name: /Name/ }).first()
    await field.fill('Second vacuum pump')
    await page.keyboard.press('Enter')
    await page.getByRole('button', { name: 'Second vacuum pump', exact: true }).waitFor()
    await page.getByRole('button', { name: 'Put Second vacuum pump into the wastebasket' }).click()
    await expect.poll(() => names(page)).not.toContain('Second vacuum pump')
    await page.getByRole('button', { name: /^Wastebasket/ }).click()
    await page.getByRole('button', { name: 'Put Second vacuum pump back' }).click()
    await page
      .getByRole('button', { name: /Back to the Shelf|Projects|Shelf/ })
      .first()
      .click()
    await expect.poll(() => names(page)).toContain('Second vacuum pump')
  })

  it('saves while one works: what was typed a moment ago is there after the program was killed', async () => {
    const { page } = visitor
    await newProject(page, 'Press bench', 'SI')
    await type(page, 'Mass', '412.5')
    await type(page, 'Running speed', '3/7*1000')
    await saved(page)
    await run.kill()
    await page.context().close()
    run = await run.restart()
    visitor = await visit(browser, run.address)
    await openProject(visitor.page, 'Press bench')
    const read = (label: string) =>
      visitor.page.getByRole('textbox', { name: label, exact: true }).inputValue()
    await expect.poll(() => read('Mass')).toBe('412.5')
    // twelve digits of 3000/7 are shown; all of them are kept
    expect(await read('Running speed')).toBe('428.571428571')
  })

  it('undoes and redoes every step of a session', async () => {
    const { page } = visitor
    const mass = page.getByRole('textbox', { name: 'Mass', exact: true })
    for (const text of ['500', '600', '700']) await type(page, 'Mass', text)
    await mass.blur()
    for (const text of ['600', '500', '412.5']) {
      await page.keyboard.press('Control+z')
      await expect.poll(() => mass.inputValue()).toBe(text)
    }
    for (const text of ['500', '600', '700']) {
      await page.keyboard.press('Control+Shift+z')
      await expect.poll(() => mass.inputValue()).toBe(text)
    }
    await saved(page)
  })

  it('shows the same value in either system, and switching back and forth changes nothing', async () => {
    const { page } = visitor
    const mass = page.getByRole('textbox', { name: 'Mass', exact: true })
    await type(page, 'Mass', '100 lb')
    // 100 x 0.45359237 kg (international pound, 1959)
    await expect.poll(() => mass.inputValue()).toBe('45.359237')
    for (let turn = 0; turn < 3; turn++) {
      await page.getByRole('navigation').getByText('US', { exact: true }).click()
      await expect.poll(() => mass.inputValue()).toBe('100')
      await page.getByRole('navigation').getByText('SI', { exact: true }).click()
      await expect.poll(() => mass.inputValue()).toBe('45.359237')
    }
    await backToShelf(page)
    expect(visitor.complaints).toEqual([])
  })
})
