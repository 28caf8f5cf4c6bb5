import Sqlite from 'better-sqlite3'
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { StorageError } from './errors.ts'

/** Who holds a library, for the words that a second start says. */
export interface Holder {
  readonly pid: number
  readonly host: 'desktop' | 'loopback'
  /** where the pages are served, without the token; empty in the desktop */
  readonly address: string
}

/** Another running host has this library open. */
export class LibraryHeldError extends StorageError {
  readonly holder: Holder | null

  constructor(file: string, holder: Holder | null) {
    super(
      holder
        ? `Stillbed already runs with the library ${file} (process ${holder.pid}${holder.address ? `, at ${holder.address}` : ''}).`
        : `Another program holds the library ${file}.`,
    )
    this.holder = holder
  }
}

export interface LibraryLock {
  /** Tells later starts where this host is. */
  announce(address: string): void
  release(): void
}

/**
 * Takes the library for this process: `<file>.lock` is locked through SQLite, so that the
 * operating system itself gives it back when the process dies, however it dies. A number in a file
 * would have to be guessed dead or alive. `<file>.holder.json` says who it is.
 * @throws LibraryHeldError when another process has it
 */
export function lockLibrary(file: string, host: Holder['host']): LibraryLock {
  mkdirSync(dirname(file), { recursive: true })
  const holderFile = `${file}.holder.json`
  const db = new Sqlite(`${file}.lock`, { timeout: 0 })
  try {
    db.exec('BEGIN EXCLUSIVE')
  } catch (error) {
    db.close()
    if (error instanceof Sqlite.SqliteError && error.code.startsWith('SQLITE_BUSY')) {
      throw new LibraryHeldError(file, readHolder(holderFile))
    }
    throw error
  }
  const announce = (address: string) => {
    const holder: Holder = { pid: process.pid, host, address }
    writeFileSync(holderFile, JSON.stringify(holder))
  }
  announce('')
  return {
    announce,
    release() {
      if (!db.open) return
      rmSync(holderFile, { force: true })
      db.exec('ROLLBACK')
      db.close()
    },
  }
}

function readHolder(holderFile: string): Holder | null {
  try {
    return JSON.parse(readFileSync(holderFile, 'utf8')) as Holder // written by announce
  } catch {
    return null
  }
}
