import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser } from '../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import { choose, goTo, openProject, saved, type, visit } from './at-the-desk.ts'

let browser: Browser
let run: LoopbackRun

beforeAll(async () => {
  browser = await launchBrowser()
  run = await startLoopback()
})
afterAll(async () => {
  await browser.close()
  await run.remove()
})

/** Longer than a change takes to its result on a busy machine [ms]. */
const PATIENCE = { timeout: 30_000 }

function typeCard(page: Page): Locator {
  return page.getByRole('region', { name: 'Mount types' }).getByRole('article').first()
}

/** The text beside a figure's label. */
function figure(scope: Locator, label: string): Locator {
  return scope.locator('dl > div').filter({ hasText: label }).locator('dd')
}

/** Frequency of the lowest mode as the Response page shows it [Hz]. */
async function lowestMode(page: Page): Promise<number> {
  await goTo(page, 'Response')
  const text = await page.locator('tbody tr').first().locator('td').nth(1).innerText()
  await goTo(page, 'Mounts')
  return Number(text)
}

describe('mounts by their laws', () => {
  it('a designed spring, a measured curve and the load sideways show what they do', async () => {
    const { page, complaints } = await visit(browser, run.address)
    await openProject(page, 'Vacuum pump of the clay mill')
    await goTo(page, 'Mounts')
    const card = typeCard(page)
    const before = await lowestMode(page)
    expect(before).toBeGreaterThan(0)

    await choose(card, 'Described by', 'dimensions')
    await type(card, 'Tensile strength', '1400')
    await type(card, 'Wire diameter', '6.5')
    await type(card, 'Mean coil diameter', '35.75')
    await type(card, 'Active coils', '6.45')
    await type(card, 'Free length', '84')
    const figures = card.getByRole('region', { name: 'Figures of the helical spring' })
    // SOURCE G d⁴ / (8 D³ n) and 8 F D K / (π d³) with K = (4w - 1)/(4w - 4) + 0.615/w (A. M. Wahl,
    // Mechanical Springs), by hand for G = 79.3 GPa and w = 5.5: 60.04 N/mm, K = 1.2785
    await expect.poll(() => figure(figures, 'Rate along').innerText(), PATIENCE).toMatch(/^60\.04 N\/mm/)
    const load = Number(await card.getByRole('textbox', { name: 'Design load', exact: true }).inputValue())
    const stress = (8 * load * 0.03575 * 1.27848) / (Math.PI * 0.0065 ** 3) / 1e6
    const shown = await figure(figures, 'Shear stress').innerText()
    // four digits are shown
    expect(Math.abs(Number.parseFloat(shown) / stress - 1)).toBeLessThan(1e-3)
    expect(shown).toContain('of 784 MPa')

    // softer in every direction than the rubber that it replaces
    const sprung = await lowestMode(page)
    expect(sprung).toBeGreaterThan(0)
    expect(sprung).toBeLessThan(before)

    await type(card, 'Wanted rate', '90')
    await card.getByRole('button', { name: 'Design to this rate' }).click()
    await card.getByRole('list', { name: 'Designs that serve' }).getByRole('button').first().click()
    await expect.poll(() => figure(figures, 'Rate along').innerText(), PATIENCE).toMatch(/^90 N\/mm/)

    await choose(card, 'Described by', 'measured curve')
    await type(card, 'Point 1 Deflection', '2')
    await type(card, 'Point 1 Load', '500')
    await type(card, 'Point 2 Load', '3000')
    const working = card.getByRole('table', { name: /^Working points/ })
    await working.getByRole('row').nth(4).waitFor()
    expect(await working.getByRole('row').count()).toBe(5)
    expect(await working.innerText()).not.toMatch(/NaN|Infinity|undefined/)

    const sideways = page.getByRole('region', { name: 'Static load sideways' })
    await choose(sideways, 'Equivalent load', 'part of the weight')
    await type(sideways, 'Load over weight', '0.5')
    // 460 kg times 9.80665 m/s², half of it
    await expect.poll(() => sideways.innerText(), PATIENCE).toMatch(/2256 N through the CG/)
    expect(await sideways.getByRole('table').getByRole('row').count()).toBe(5)
    expect(await sideways.innerText()).toMatch(/local code and a licensed engineer/)

    await saved(page)
    expect(complaints).toEqual([])
    await page.context().close()
  })
})
