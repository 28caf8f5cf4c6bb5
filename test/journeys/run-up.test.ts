import { readFileSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { evaluate } from '../../core/evaluate.ts'
import { readProjectText } from '../../core/project/read.ts'
import { formatNumber, formatQuantity } from '../../core/units/format.ts'
import { launchBrowser } from '../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import { addRequirement, choose, goTo, openProject, saved, type, verdict, visit } from './at-the-desk.ts'

/** Longer than a change takes to its new verdicts on a busy machine [ms]. */
const PATIENT = { timeout: 20_000 }

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

/** What the core makes of the project as the pages hand it out. */
async function inCore(page: Page) {
  await goTo(page, 'Report')
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Project file' }).click(),
  ])
  return evaluate(readProjectText(readFileSync(await download.path(), 'utf8')))
}

it('finds that a mixer that coasts down slowly moves too far, and that a brake helps', async () => {
  const { page, complaints } = await visit(browser, run.address)
  await openProject(page, 'Glaze mixer') // kept in US customary units

  // what must hold; not known as long as nobody has said how the shaft comes to speed
  const clearance = await addRequirement(page, 'Displacement during run-up and coast-down')
  await type(clearance, 'Clearance, zero to peak', '0.6 mm')
  await clearance.getByRole('button', { name: 'Done' }).click()
  const card = verdict(page, /^Displacement across the mounts/)
  await expect.poll(() => card.innerText(), PATIENT).toContain('Switch the run-up on')
  await card.getByRole('button', { name: /not known/ }).click()
  await page.getByRole('heading', { name: 'Run-up', level: 1 }).waitFor()

  await page.getByRole('button', { name: 'Take in run-up and coast-down' }).click()
  const up = page.getByRole('region', { name: 'Run-up', exact: true })
  const down = page.getByRole('region', { name: 'Coast-down', exact: true })
  await expect.poll(() => up.innerText(), PATIENT).toContain('Give the time of the run-up')
  await type(up, 'Within', '4')
  await type(down, 'Within', '1 min')

  // the peak is told in words, in the table and by the verdict: always the same
  await expect.poll(() => verdict(page, /^Displacement across.*: fails/).count(), PATIENT).toBe(1)
  const told = page.getByRole('list', { name: 'What governs' })
  await expect
    .poll(() => told.innerText(), PATIENT)
    .toMatch(/^Coast-down governs across the mounts: M1 moves/)
  const words = await told.innerText()
  const table = await page.getByRole('table', { name: 'Peaks during run-up and coast-down' }).innerText()
  const drawn = page.getByRole('img', { name: /Coast-down: .* moves most/ })
  await drawn.waitFor()
  await saved(page)
  const slow = await inCore(page)
  const peak = slow.runUp?.down?.mounts[0]?.travel.resultant
  expect(words).toContain(formatQuantity(peak?.value, 'deflection', 'US', 3))
  expect(words).toContain(formatQuantity(peak?.speed, 'shaftSpeed', 'US', 3))
  expect(table).toContain(formatNumber(peak?.value, 'deflection', 'US'))
  const value = slow.verdicts.find(({ kind }) => kind === 'runUpMotion')?.value
  expect(value).toBe(peak?.value)
  await expect.poll(() => card.innerText(), PATIENT).toContain(formatQuantity(value, 'deflection', 'US'))

  // asked on demand: what more time or more damping would do
  await goTo(page, 'Run-up')
  await page.getByRole('button', { name: 'Show the peaks for other durations' }).click()
  await page.getByRole('img', { name: /largest peak against the time taken/ }).waitFor()
  const damping = page.getByRole('region', { name: 'Damping that is needed' })
  await damping.getByRole('button', { name: 'Find the least damping' }).click()
  await expect.poll(() => damping.innerText(), PATIENT).toMatch(/damping ratio of .* times what there is/)

  // a brake: by torque, on an inertia
  await choose(down, 'Speed', 'torque')
  await type(down, 'Friction and brake', '40 N m')
  await type(down, 'Inertia about the shaft', '2 kg m^2')
  // 900 rpm = 94.25 rad/s over 40 N m / 2 kg m² = 20 rad/s²: 4.712 s
  await expect.poll(() => down.innerText(), PATIENT).toContain('900 rpm to 0 rpm in 4.71 s')
  await expect.poll(() => verdict(page, /^Displacement across.*: met/).count(), PATIENT).toBe(1)

  // one step back is one step back
  await page.getByRole('button', { name: 'Undo: change the coast-down' }).click()
  await expect.poll(() => verdict(page, /^Displacement across.*: not known/).count(), PATIENT).toBe(1)
  expect(complaints).toEqual([])
  await page.context().close()
})
