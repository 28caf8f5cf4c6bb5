import { spawn, type ChildProcess } from 'node:child_process'
import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, it, onTestFinished } from 'vitest'
import { LibraryHeldError } from '../../../electron/library/lock.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { testLibrary } from './open.ts'

/** Another process that holds the library and serves at some address. */
async function holder(file: string): Promise<ChildProcess> {
  const library = join(import.meta.dirname, '../../../electron/library/library.ts')
  const script = `
    const { openLibrary } = await import(${JSON.stringify(library)})
    openLibrary(${JSON.stringify(file)}, 'loopback').announce('http://127.0.0.1:4711')
    console.log('holding')
    setInterval(() => {}, 1000)`
  const child = spawn(process.execPath, ['--input-type=module', '--eval', script])
  onTestFinished(() => void child.kill('SIGKILL'))
  await new Promise((resolve) => child.stdout.once('data', resolve))
  return child
}

it('lets one process have the library and tells the next one who it is and where', async () => {
  const file = join(temporaryFolder(), 'library.sqlite')
  const { pid } = await holder(file)
  expect(() => testLibrary(file)).toThrow(LibraryHeldError)
  expect(() => testLibrary(file)).toThrow(`(process ${pid}, at http://127.0.0.1:4711)`)
})

it('is free again once its holder is dead, however that came', async () => {
  const file = join(temporaryFolder(), 'library.sqlite')
  const child = await holder(file)
  const gone = new Promise((resolve) => child.once('close', resolve))
  child.kill('SIGKILL')
  await gone
  expect(testLibrary(file).projects.list({})).toEqual([])
})

it('does not take words left by a dead process for a holder', () => {
  const file = join(temporaryFolder(), 'library.sqlite')
  // this very process lives under the number: a number alone proves nothing
  writeFileSync(`${file}.holder.json`, JSON.stringify({ pid: process.pid, host: 'desktop', address: '' }))
  writeFileSync(`${file}.lock`, '')
  expect(testLibrary(file).projects.list({})).toEqual([])
})

it('can be opened again after it was closed', () => {
  const library = testLibrary()
  library.close()
  expect(() => testLibrary(library.file)).not.toThrow()
})

it('keeps two libraries apart', () => {
  expect(() => [testLibrary(), testLibrary()]).not.toThrow()
})
