import { AxeBuilder } from '@axe-core/playwright'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser } from '../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import { goTo, openProject, visit } from './at-the-desk.ts'

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

const STEPS = ['Machine', 'Mounts', 'Response', 'Run-up', 'Absorber', 'Report'] as const

/** Serious and critical findings of the accessibility rules (WCAG 2.1 A and AA, contrast included). */
async function findings(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa'])
    .analyze()
  return violations.flatMap(({ id, nodes }) => nodes.map((node) => `${id}: ${node.html.slice(0, 160)}`))
}

/** Text that runs out of its box, and pages that scroll sideways. */
function overflows(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const found: string[] = []
    if (document.documentElement.scrollWidth > window.innerWidth + 1) found.push('the page scrolls sideways')
    for (const element of document.querySelectorAll<HTMLElement>('button, label, h1, h2, th, td, p')) {
      const style = getComputedStyle(element)
      if (
        style.overflowX === 'visible' &&
        style.display !== 'inline' &&
        element.scrollWidth > element.clientWidth + 2 &&
        element.clientWidth > 0 &&
        !element.closest('.visually-hidden')
      ) {
        found.push(`${element.tagName}: ${element.innerText.slice(0, 60)}`)
      }
    }
    return found
  })
}

describe.each([
  ['light', 1280, 800],
  ['dark', 1280, 800],
  ['light', 1920, 1080],
  // 200 % zoom of 1280 x 800
  ['dark', 640, 400],
] as const)('on the %s sheet at %d x %d', (sheet, width, height) => {
  it('every page reads well and is open to all', async () => {
    const { page, complaints } = await visit(browser, run.address, width, height)
    await page.emulateMedia({ colorScheme: sheet })
    expect(await findings(page), 'Shelf').toEqual([])
    await openProject(page, 'Kiln exhaust fan on the mezzanine')
    for (const step of STEPS) {
      if (width >= 1280) await goTo(page, step)
      else await page.keyboard.press(`Alt+${STEPS.indexOf(step) + 1}`)
      await page.getByRole('heading', { name: step, level: 1 }).waitFor()
      expect(await findings(page), step).toEqual([])
      expect(await overflows(page), step).toEqual([])
      expect(await page.locator('body').innerText(), step).not.toMatch(/NaN|Infinity|undefined|\[object/)
    }
    expect(complaints).toEqual([])
    await page.context().close()
  })
})
