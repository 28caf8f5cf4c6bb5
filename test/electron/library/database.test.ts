import Sqlite from 'better-sqlite3'
import { closeSync, mkdirSync, openSync, readFileSync, writeFileSync, writeSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { openDatabase, toStorageError } from '../../../electron/library/database.ts'
import { StorageError } from '../../../electron/library/errors.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { renamed, sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

function messageOf(run: () => unknown): string {
  try {
    run()
  } catch (error) {
    if (error instanceof StorageError) return error.message
    throw error
  }
  throw new Error('it was opened')
}

describe('a file that is no sound library', () => {
  it('is refused when it is not a database, and left as it is', () => {
    const file = join(temporaryFolder(), 'library.sqlite')
    const content = 'These are meeting notes, not a database. '.repeat(50)
    writeFileSync(file, content)
    expect(messageOf(() => openDatabase(file))).toMatch(/is not a Stillbed library/)
    expect(readFileSync(file, 'utf8')).toBe(content)
  })

  it('is refused when it is the database of another program', () => {
    const file = join(temporaryFolder(), 'other.sqlite')
    const other = new Sqlite(file)
    other.exec('CREATE TABLE address (name TEXT)')
    other.close()
    expect(messageOf(() => openDatabase(file))).toMatch(/of another program/)
  })

  it('is refused when it is damaged, with what to do', () => {
    const library = testLibrary()
    library.inTransaction(() => {
      for (let number = 0; number < 40; number += 1) {
        library.projects.create(renamed(sampleProject(), `machine ${number}`))
      }
    })
    library.close()
    const size = readFileSync(library.file).length
    const handle = openSync(library.file, 'r+')
    // whole pages of noise over the tables, the header left alone
    writeSync(handle, Buffer.alloc(size - 8192, 0x5a), 0, size - 8192, 4096)
    closeSync(handle)
    expect(messageOf(() => openDatabase(library.file))).toMatch(/is damaged.*Put a copy of it in its place/s)
  })

  it('is refused when it is a folder', () => {
    const folder = join(temporaryFolder(), 'library.sqlite')
    mkdirSync(folder)
    expect(messageOf(() => openDatabase(folder))).toMatch(/cannot be opened/)
  })
})

describe('the connection', () => {
  it('syncs every commit and enforces references', () => {
    const db = openDatabase(join(temporaryFolder(), 'library.sqlite'))
    expect(db.pragma('journal_mode', { simple: true })).toBe('wal')
    // 2 is FULL: a commit is on the disk before a save is reported
    expect(db.pragma('synchronous', { simple: true })).toBe(2)
    expect(db.pragma('foreign_keys', { simple: true })).toBe(1)
    expect(db.pragma('busy_timeout', { simple: true })).toBe(5000)
    db.close()
  })
})

describe('errors in plain words', () => {
  it.each([
    ['SQLITE_FULL', /the disk is full/],
    ['ENOSPC', /the disk is full/],
    ['SQLITE_READONLY_DBMOVED', /read-only/],
    ['SQLITE_BUSY', /held by another program/],
    ['SQLITE_IOERR_WRITE', /the disk reports an error/],
    ['EACCES', /may not write there/],
    ['SQLITE_CORRUPT_VTAB', /is damaged/],
    ['SQLITE_MISUSE', /cannot be used/],
  ])('%s', (code, words) => {
    const error = toStorageError(Object.assign(new Error('as the system says'), { code }), '/l.sqlite')
    expect(error).toBeInstanceOf(StorageError)
    expect((error as Error).message).toMatch(words)
  })

  it('leaves what it does not know as it is', () => {
    const error = new Error('a bug')
    expect(toStorageError(error, '/l.sqlite')).toBe(error)
  })
})
