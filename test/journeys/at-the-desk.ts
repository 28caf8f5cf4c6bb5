/** A person at the pages: what a journey does is said in the words that stand on the screen. */
import { expect } from 'vitest'
import type { Browser, Locator, Page } from 'playwright-core'

const PATIENCE = 30_000
/** Longer than the interface takes from a change to its new verdicts on a busy machine [ms]. */
const STANDSTILL = 400

export interface Visit {
  readonly page: Page
  /** what the browser complained about so far: must stay empty */
  readonly complaints: string[]
}

export async function visit(browser: Browser, address: string, width = 1280, height = 800): Promise<Visit> {
  const context = await browser.newContext({ viewport: { width, height }, acceptDownloads: true })
  const page = await context.newPage()
  page.setDefaultTimeout(PATIENCE)
  const complaints: string[] = []
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text())
  })
  page.on('pageerror', (error) => complaints.push(error.message))
  await page.goto(address)
  await page.getByRole('heading', { name: 'Shelf', level: 1 }).waitFor()
  return { page, complaints }
}

export async function newProject(page: Page, name: string, units: 'SI' | 'US'): Promise<void> {
  await page.getByRole('button', { name: 'New project' }).click()
  const dialog = page.getByRole('dialog', { name: 'New project' })
  await dialog.getByLabel('Name').fill(name)
  await dialog.getByText(units, { exact: true }).click()
  await dialog.getByRole('button', { name: 'Create and open' }).click()
  await page.getByRole('heading', { name: 'Machine', level: 1 }).waitFor()
}

export async function openProject(page: Page, name: string): Promise<void> {
  await page.getByRole('button', { name, exact: true }).click()
  await page.getByRole('navigation', { name: 'Path of the job' }).waitFor()
}

export async function backToShelf(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Shelf' }).click()
  await page.getByRole('heading', { name: 'Shelf', level: 1 }).waitFor()
}

export async function goTo(
  page: Page,
  step: 'Machine' | 'Mounts' | 'Response' | 'Run-up' | 'Absorber' | 'Report',
): Promise<void> {
  await page
    .getByRole('navigation', { name: 'Path of the job' })
    .getByRole('button', { name: new RegExp(`^${step}\\b`) })
    .click()
  await page.getByRole('heading', { name: step, level: 1 }).waitFor()
}

/** Types into a field and leaves it with Enter, as one does. */
export async function type(scope: Page | Locator, label: string, text: string): Promise<void> {
  const field = scope.getByRole('textbox', { name: label, exact: true })
  await field.fill(text)
  await field.press('Enter')
}

export async function choose(scope: Page | Locator, group: string, option: string): Promise<void> {
  await scope.getByRole('group', { name: group }).getByText(option, { exact: true }).click()
}

export async function addRequirement(page: Page, kind: string): Promise<Locator> {
  const verdicts = page.getByRole('complementary', { name: 'Verdicts' })
  await verdicts.getByRole('combobox', { name: 'Add a requirement' }).selectOption(kind)
  return verdicts.getByRole('group', { name: 'Requirement', exact: true })
}

export function verdict(page: Page, title: RegExp): Locator {
  return page.getByRole('complementary', { name: 'Verdicts' }).getByRole('article', { name: title })
}

/**
 * All verdicts as they are read: "title: status" with the figures under it. Waits until there are
 * some and they stand still, since a project that has just been opened is still being computed.
 */
export async function verdictTexts(page: Page): Promise<string[]> {
  const cards = page.getByRole('complementary', { name: 'Verdicts' }).getByRole('article')
  await cards.first().waitFor()
  let texts = await cards.allInnerTexts()
  for (;;) {
    await page.waitForTimeout(STANDSTILL)
    const later = await cards.allInnerTexts()
    if (later.join() === texts.join()) return texts
    texts = later
  }
}

export async function saved(page: Page): Promise<void> {
  await expect
    .poll(
      () =>
        page
          .getByRole('status')
          .filter({ hasText: /^saved$/ })
          .count(),
      { timeout: PATIENCE },
    )
    .toBe(1)
}
