import { spawn } from 'node:child_process'
import { join } from 'node:path'
import { expect, it } from 'vitest'
import { temporaryFolder } from '../../setup/folder.ts'
import { testLibrary } from './open.ts'

/** Starts a process that saves without pause and kills it, as nothing else ends it, after `count` saves. */
async function saveUntilKilled(file: string, count: number): Promise<{ id: string; told: number }> {
  const child = spawn(process.execPath, [join(import.meta.dirname, 'saver.ts'), file])
  let output = ''
  let errors = ''
  child.stderr.on('data', (chunk) => (errors += String(chunk)))
  child.stdout.on('data', (chunk) => {
    output += String(chunk)
    if (output.split('\n').length > count) child.kill('SIGKILL')
  })
  const signal = await new Promise((resolve) => child.once('close', (_code, name) => resolve(name)))
  if (signal !== 'SIGKILL') throw new Error(`the saving process ended by itself:\n${errors}`)
  // the last line may have been cut off in the middle
  const [id = '', told = '0'] = output.split('\n').at(-2)?.split(' ') ?? []
  return { id, told: Number(told) }
}

it.each([1, 2, 15, 60])('loses no save that was reported when it is killed after %d', async (count) => {
  const file = join(temporaryFolder(), 'library.sqlite')
  const { id, told } = await saveUntilKilled(file, count)
  const library = testLibrary(file)
  const { revision, project } = library.projects.open(id)
  expect(told).toBeGreaterThanOrEqual(count)
  expect(revision).toBeGreaterThanOrEqual(told)
  // a save is stored whole: document, revision and search index belong to each other
  expect(project.job.name).toBe(`at revision ${revision}`)
  expect(library.projects.list({ query: `revision ${revision}` })).toHaveLength(1)
})
