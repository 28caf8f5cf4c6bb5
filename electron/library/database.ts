import Sqlite, { type Database } from 'better-sqlite3'
import { existsSync, mkdirSync, statSync } from 'node:fs'
import { dirname } from 'node:path'
import { StorageError } from './errors.ts'
import { APPLICATION_ID, STEPS, libraryVersion, migrate } from './migrations.ts'

/** How long a statement waits for another process's lock, such as a backup program's [ms]. */
const BUSY_TIMEOUT = 5000

/**
 * Opens or creates the library file, checks it, and brings it to the present version; a copy of
 * an older file is kept beside it as `<file>.version-<n>`.
 * @throws StorageError, with words for a person, when the file cannot be used
 */
export function openDatabase(file: string): Database {
  let db: Database | null = null
  try {
    mkdirSync(dirname(file), { recursive: true })
    db = new Sqlite(file, { timeout: BUSY_TIMEOUT })
    assertOurs(db, file)
    assertSound(db, file)
    prepare(db)
    copyBeforeMigration(db, file)
    migrate(db)
    return db
  } catch (error) {
    db?.close()
    throw toStorageError(error, file)
  }
}

function prepare(db: Database): void {
  db.pragma('journal_mode = WAL')
  // With NORMAL a write-ahead log is synced at checkpoints only: a power cut could take minutes of
  // work. FULL syncs every commit, a few milliseconds for a save that happens once in a while.
  db.pragma('synchronous = FULL')
  db.pragma('foreign_keys = ON')
  db.pragma('trusted_schema = OFF')
}

function assertOurs(db: Database, file: string): void {
  const id = db.pragma('application_id', { simple: true })
  const tables = db.prepare<[], { n: number }>('SELECT count(*) AS n FROM sqlite_schema').get()?.n ?? 0
  if (id !== APPLICATION_ID && tables > 0) {
    throw new StorageError(`${file} is a database of another program, not a Stillbed library.`)
  }
}

function assertSound(db: Database, file: string): void {
  const found = db.pragma('quick_check(1)', { simple: true })
  if (found !== 'ok') throw damaged(file, String(found))
}

function damaged(file: string, detail: string): StorageError {
  return new StorageError(
    `The library ${file} is damaged (${detail}). Nothing was changed. Put a copy of it in its place, or start with another by --library FILE.`,
  )
}

function copyBeforeMigration(db: Database, file: string): void {
  const version = libraryVersion(db)
  if (version === 0 || version >= STEPS.length) return
  const copy = `${file}.version-${version}`
  if (existsSync(copy) && statSync(copy).size > 0) return
  db.prepare('VACUUM INTO ?').run(copy)
}

/** SQLite's and the file system's errors in words for a person. */
export function toStorageError(error: unknown, file: string): unknown {
  if (error instanceof StorageError) return error
  const code = codeOf(error)
  const because = error instanceof Error ? error.message : String(error)
  if (code.startsWith('SQLITE_CORRUPT')) return damaged(file, because)
  if (code.startsWith('SQLITE_NOTADB')) {
    return new StorageError(`${file} is not a Stillbed library.`, { cause: error })
  }
  const words = wordsFor(code)
  return words ? new StorageError(`The library ${file} ${words} (${because}).`, { cause: error }) : error
}

function wordsFor(code: string): string | null {
  if (code.startsWith('SQLITE_FULL') || code === 'ENOSPC') return 'cannot grow: the disk is full'
  if (code.startsWith('SQLITE_READONLY') || code === 'EROFS') return 'cannot be written: it is read-only'
  if (code.startsWith('SQLITE_BUSY') || code.startsWith('SQLITE_LOCKED')) return 'is held by another program'
  if (code.startsWith('SQLITE_IOERR')) return 'cannot be read or written: the disk reports an error'
  if (code === 'EACCES' || code === 'EPERM') return 'cannot be opened: this user may not write there'
  if (code === 'ENOTDIR' || code === 'EEXIST' || code.startsWith('SQLITE_CANTOPEN')) return 'cannot be opened'
  return code.startsWith('SQLITE_') ? 'cannot be used' : null
}

function codeOf(error: unknown): string {
  if (typeof error !== 'object' || error === null || !('code' in error)) return ''
  return typeof error.code === 'string' ? error.code : ''
}
