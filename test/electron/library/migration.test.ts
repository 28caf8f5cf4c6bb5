import Sqlite from 'better-sqlite3'
import { existsSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { StorageError } from '../../../electron/library/errors.ts'
import { STEPS, libraryVersion, migrate } from '../../../electron/library/migrations.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

const ID = '7b0a4f5e-8f61-4a2c-9b1d-0d6f5f1f2a10'

/** A library as version 1 left it, with one project, written with plain SQL. */
function libraryOfVersion1(): string {
  const file = join(temporaryFolder(), 'library.sqlite')
  const db = new Sqlite(file)
  migrate(db, STEPS.slice(0, 1))
  db.prepare(
    `INSERT INTO project VALUES (1, @id, 7, @document, '2029-01-01T00:00:00.000Z', '2029-02-01T00:00:00.000Z', NULL,
       'Sieve drive', 'T-1', 'Test bay', 'Vibrating sieve', 'Übergabe', '["sieve"]', 'Coil 40', 250, 154.98, '[[0.4,0.3]]', 4, 0)`,
  ).run({ id: ID, document: JSON.stringify(sampleProject()) })
  db.prepare("INSERT INTO mount_type VALUES ('t1', 1, ?)").run(
    JSON.stringify(sampleProject().mounting.types[0]),
  )
  db.close()
  return file
}

function versionOf(file: string): number {
  const db = new Sqlite(file, { readonly: true })
  const version = libraryVersion(db)
  db.close()
  return version
}

describe('opening a library', () => {
  it('makes a new one of the present version from nothing', () => {
    const library = testLibrary()
    expect(library.projects.list({})).toEqual([])
    library.close()
    expect(versionOf(library.file)).toBe(STEPS.length)
  })

  it('brings version 1 up to date and loses nothing', () => {
    const file = libraryOfVersion1()
    const library = testLibrary(file)
    expect(library.projects.open(ID)).toStrictEqual({ id: ID, revision: 7, project: sampleProject() })
    expect(library.projects.list({ query: 'uberg' })).toHaveLength(1)
    expect(library.catalogue.list()).toStrictEqual(sampleProject().mounting.types)
    expect(library.projects.save(ID, 7, sampleProject()).revision).toBe(8)
    library.close()
    expect(versionOf(file)).toBe(STEPS.length)
  })

  it('keeps a copy of the older file beside it', () => {
    const file = libraryOfVersion1()
    testLibrary(file).close()
    const copy = new Sqlite(`${file}.version-1`, { readonly: true })
    expect(libraryVersion(copy)).toBe(1)
    expect(copy.prepare('SELECT id, revision FROM project').all()).toEqual([{ id: ID, revision: 7 }])
    copy.close()
  })

  it('makes no copy when there is nothing to migrate', () => {
    const library = testLibrary()
    library.close()
    testLibrary(library.file).close()
    expect(existsSync(`${library.file}.version-${STEPS.length}`)).toBe(false)
    expect(statSync(library.file).size).toBeGreaterThan(0)
  })

  it('refuses a library of a newer program and leaves it as it is', () => {
    const library = testLibrary()
    library.close()
    const db = new Sqlite(library.file)
    db.pragma(`user_version = ${STEPS.length + 1}`)
    db.close()
    expect(() => testLibrary(library.file)).toThrow(/newer Stillbed/)
    expect(versionOf(library.file)).toBe(STEPS.length + 1)
  })
})

describe('migrate', () => {
  it('leaves the old version whole when a step fails', () => {
    const db = new Sqlite(':memory:')
    migrate(db, ['CREATE TABLE a (x)'])
    expect(() => migrate(db, ['CREATE TABLE a (x)', 'CREATE TABLE b (x); CREATE TABLE nonsense'])).toThrow()
    expect(libraryVersion(db)).toBe(1)
    expect(db.prepare("SELECT name FROM sqlite_schema WHERE type = 'table'").all()).toEqual([{ name: 'a' }])
    db.close()
  })

  it('runs each step once', () => {
    const db = new Sqlite(':memory:')
    for (let time = 0; time < 2; time += 1) migrate(db, ['CREATE TABLE a (x)', 'INSERT INTO a VALUES (1)'])
    expect(db.prepare('SELECT count(*) AS n FROM a').get()).toEqual({ n: 1 })
    expect(() => migrate(db, ['CREATE TABLE a (x)'])).toThrow(StorageError)
    db.close()
  })
})
