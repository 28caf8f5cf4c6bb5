import { execFile } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { evaluate } from '../../core/evaluate.ts'
import { readProjectText } from '../../core/project/read.ts'
import { formatNumber } from '../../core/units/format.ts'
import { launchBrowser } from '../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import {
  addRequirement,
  backToShelf,
  choose,
  goTo,
  newProject,
  openProject,
  saved,
  type,
  verdict,
  verdictTexts,
  visit,
  type Visit,
} from './at-the-desk.ts'

let browser: Browser
let run: LoopbackRun
let folder: string

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'stillbed-journey-'))
  browser = await launchBrowser()
  run = await startLoopback()
})
afterAll(async () => {
  await browser.close()
  await run.remove()
  rmSync(folder, { recursive: true, force: true })
})

async function downloadProject(visitor: Visit): Promise<string> {
  const { page } = visitor
  await goTo(page, 'Report')
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Project file' }).click(),
  ])
  const file = join(folder, download.suggestedFilename())
  await download.saveAs(file)
  return file
}

/** The batch door on a project file. @returns what it printed and its exit code */
function batch(...args: string[]): Promise<{ code: number; output: string }> {
  const door = join(import.meta.dirname, '..', '..', 'electron', 'batch', 'evaluate.ts')
  return new Promise((resolve) => {
    execFile(process.execPath, [door, ...args], { maxBuffer: 1e9 }, (error, output) => {
      resolve({ code: typeof error?.code === 'number' ? error.code : 0, output })
    })
  })
}

it('takes a shaking fan from a blank sheet to an absorber that cures it, and finds it again', async () => {
  const visitor = await visit(browser, run.address)
  const { page } = visitor
  await newProject(page, 'Drying fan', 'US')

  // nameplate and tape measure, in US customary units, with arithmetic
  await type(page, 'Mass', '1600 + 400')
  await type(page, 'Centre of gravity z', '20')
  await type(page, 'Moment of inertia about x', '5200')
  await type(page, 'Moment of inertia about y', '9000')
  await type(page, 'Moment of inertia about z', '8600 lb ft^2')
  await type(page, 'Running speed', '1200 rpm')
  await type(page, 'Lowest operating speed', '200')
  await type(page, 'Shaft passes z', '2 ft')

  await page.getByRole('button', { name: 'Unbalance', exact: true }).click()
  const source = page.getByRole('article', { name: 'Unbalance' })
  await source.getByRole('combobox', { name: 'Given by' }).selectOption('balance quality grade')
  await type(source, 'Mass of the rotor', '600')
  await type(source, 'Balance quality grade G', '6.3')
  // F = m G omega for a rotor balanced to its grade (ISO 21940-11): 272.155 kg x 6.3 mm/s x 125.664 rad/s
  // = 215.46 N = 48.4 lbf
  await expect.poll(() => source.innerText()).toContain('48.4 lbf rotating')

  await page.getByRole('button', { name: 'Add a point' }).click()
  await page.getByRole('textbox', { name: 'Point 1 Point' }).fill('Bearing')
  await page.keyboard.press('Enter')

  // six mounts, in three pairs
  await goTo(page, 'Mounts')
  const setOut = page.getByRole('region', { name: 'Set out in pairs' })
  await choose(setOut, 'Pairs', '3')
  await type(setOut, 'Length between', '60')
  await type(setOut, 'Width between', '36 in')
  await setOut.getByRole('button', { name: '6 mounts in pairs' }).click()
  await page.getByRole('button', { name: 'Take S25-2500' }).click()
  for (const mark of ['M1', 'M2', 'M3', 'M4', 'M5', 'M6']) {
    await type(page, `${mark} z`, '0')
  }
  // 2000 lb over six mounts under the centre of gravity
  await expect.poll(() => page.getByRole('row', { name: /Select M1/ }).innerText()).toContain('333.3')

  // what must hold
  const velocity = await addRequirement(page, 'Vibration velocity of a point')
  await choose(velocity, 'Direction', 'z')
  await type(velocity, 'Largest velocity, RMS', '0.15 in/s')
  // the verdict comes while the field is still being edited, and leaves it the focus
  await verdict(page, /^Vibration velocity.*: fails/).waitFor()
  const limit = velocity.getByRole('textbox', { name: 'Largest velocity, RMS' })
  expect(await limit.evaluate((field) => field === document.activeElement)).toBe(true)
  await velocity.getByRole('button', { name: 'Done' }).click()
  const isolation = await addRequirement(page, 'Isolation')
  await type(isolation, 'Least isolation efficiency', '90')
  await isolation.getByRole('button', { name: 'Done' }).click()
  const load = await addRequirement(page, 'Load on the mounts')
  await load.getByRole('button', { name: 'Done' }).click()

  // it holds at running speed, and fails where the heave mode is met
  await expect.poll(() => verdict(page, /^Isolation.*: met/).count()).toBe(1)
  await expect.poll(() => verdict(page, /^Vibration velocity.*: fails/).count()).toBe(1)
  await expect
    .poll(() => verdict(page, /^Vibration velocity/).innerText())
    .toContain('What helps most: an absorber')

  // an absorber on the mode that troubles it
  await goTo(page, 'Absorber')
  await page.getByRole('button', { name: 'Add an absorber' }).click()
  await page.getByRole('radio', { name: /heave/ }).check()
  await expect.poll(() => verdict(page, /^Vibration velocity.*: met/).count()).toBe(1)
  await goTo(page, 'Response')
  await page.getByRole('heading', { name: 'Natural modes' }).waitFor()
  await saved(page)
  const before = await verdictTexts(page)

  // the project file through the batch door gives the same figures
  const file = await downloadProject(visitor)
  const door = await batch(file)
  expect(door.code).toBe(0)
  const printed = JSON.parse(door.output) as {
    verdicts: { value: number; dimension: 'velocity' | 'share' }[]
  }
  const inCore = evaluate(readProjectText(readFileSync(file, 'utf8')))
  expect(printed.verdicts).toEqual(JSON.parse(JSON.stringify(inCore.verdicts)))
  for (const [index, { value, dimension }] of printed.verdicts.entries()) {
    expect(before[index]).toContain(formatNumber(value, dimension, 'US'))
  }

  // tomorrow: closed, the program ended, started again
  await backToShelf(page)
  await page.context().close()
  run = await run.restart()
  const tomorrow = await visit(browser, run.address)
  await openProject(tomorrow.page, 'Drying fan')
  await expect.poll(() => verdictTexts(tomorrow.page)).toEqual(before)
  const again = await downloadProject(tomorrow)
  expect(readFileSync(again, 'utf8')).toBe(readFileSync(file, 'utf8'))
  expect([...visitor.complaints, ...tomorrow.complaints]).toEqual([])
  await tomorrow.page.context().close()
})
