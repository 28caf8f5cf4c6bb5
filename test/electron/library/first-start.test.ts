import { mkdirSync, readdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { fillOnFirstStart } from '../../../electron/library/first-start.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { renamed, sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

const RESOURCES = join(import.meta.dirname, '../../../resources')

function resourcesWith(files: Record<string, string>): string {
  const folder = temporaryFolder()
  for (const name of ['demo', 'catalogue']) mkdirSync(join(folder, name))
  for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, name), text)
  return folder
}

describe('the first start', () => {
  it('takes every demo project and the whole catalogue, and has nothing to warn of', () => {
    const library = testLibrary()
    const warnings: string[] = []
    fillOnFirstStart(library, RESOURCES, (message) => warnings.push(message))
    expect(warnings).toEqual([])
    expect(library.projects.list({})).toHaveLength(readdirSync(join(RESOURCES, 'demo')).length)
    expect(library.catalogue.list().length).toBeGreaterThan(0)
  })

  it('puts the first file on top of the Shelf', () => {
    const library = testLibrary()
    const text = (name: string) => JSON.stringify(renamed(sampleProject(), name))
    const folder = resourcesWith({ 'demo/1.json': text('first'), 'demo/2.json': text('second') })
    fillOnFirstStart(library, folder, () => {})
    expect(library.projects.list({}).map(({ name }) => name)).toEqual(['first', 'second'])
  })

  it('happens once: what was removed stays removed', () => {
    const library = testLibrary()
    fillOnFirstStart(library, RESOURCES, () => {})
    for (const { id } of library.projects.list({})) library.projects.remove(id)
    library.close()
    const again = testLibrary(library.file)
    fillOnFirstStart(again, RESOURCES, () => {})
    expect(again.projects.list({})).toEqual([])
  })

  it('leaves out a broken file, says which, and takes the others', () => {
    const library = testLibrary()
    const warnings: string[] = []
    const folder = resourcesWith({
      'demo/bad.json':
        '{"format":"stillbed-project","version":1,"machine":{"massProperties":{"from":"typed","mass":-1}}}',
      'demo/good.json': JSON.stringify(sampleProject()),
      'catalogue/bad.json': '[{"id":""}]',
    })
    fillOnFirstStart(library, folder, (message) => warnings.push(message))
    expect(library.projects.list({}).map(({ name }) => name)).toEqual(['Sieve drive'])
    expect(warnings).toHaveLength(2)
    expect(warnings[0]).toMatch(/demo.bad\.json.*machine\.massProperties\.mass/)
  })

  it('works without any resources', () => {
    const library = testLibrary()
    fillOnFirstStart(library, temporaryFolder(), () => {})
    expect(library.projects.list({})).toEqual([])
  })
})
