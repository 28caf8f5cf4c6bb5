import { createCatalogueRepository, type CatalogueRepository } from './catalogue.ts'
import { openDatabase, toStorageError } from './database.ts'
import { lockLibrary, type Holder } from './lock.ts'
import { createProjectRepository, type ProjectRepository } from './projects.ts'
import { createSettingsRepository, type SettingsRepository } from './settings.ts'

/** The open library: one SQLite file, held by one process. */
export interface Library {
  readonly file: string
  readonly projects: ProjectRepository
  readonly settings: SettingsRepository
  readonly catalogue: CatalogueRepository
  /** All of `work` is stored, or nothing of it. `work` must not wait for anything. */
  inTransaction<T>(work: () => T): T
  /** SQLite's errors in words for a person; others as they are. */
  explain(error: unknown): unknown
  /** Tells later starts where this host serves its pages. */
  announce(address: string): void
  close(): void
}

/**
 * @throws LibraryHeldError when another host has it, StorageError when the file cannot be used
 */
export function openLibrary(file: string, host: Holder['host'], now: () => Date = () => new Date()): Library {
  const lock = takeLock(file, host)
  let db
  try {
    db = openDatabase(file)
  } catch (error) {
    lock.release()
    throw error
  }
  const open = db
  return {
    file,
    projects: createProjectRepository(db, now),
    settings: createSettingsRepository(db),
    catalogue: createCatalogueRepository(db),
    inTransaction: (work) => open.transaction(work).immediate(),
    explain: (error) => toStorageError(error, file),
    announce: (address) => lock.announce(address),
    close() {
      open.close()
      lock.release()
    },
  }
}

function takeLock(file: string, host: Holder['host']) {
  try {
    return lockLibrary(file, host)
  } catch (error) {
    throw toStorageError(error, file)
  }
}
