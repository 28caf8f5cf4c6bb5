import { existsSync, readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { openLog } from '../../../electron/log.ts'
import { temporaryFolder } from '../../setup/folder.ts'

it('writes failures with a reference to find them by', () => {
  const log = openLog(temporaryFolder())
  const reference = log.record('something broke\nat a place')
  expect(reference).toMatch(/^[0-9a-f]{8}$/)
  expect(readFileSync(log.file, 'utf8')).toMatch(
    new RegExp(`\\[${reference}\\] something broke\\s+at a place`),
  )
})

it('makes its folder when there is something to write', () => {
  const log = openLog(`${temporaryFolder()}/new/logs`)
  log.info('started')
  expect(existsSync(log.file)).toBe(true)
})
