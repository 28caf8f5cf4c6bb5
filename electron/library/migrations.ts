import type { Database } from 'better-sqlite3'
import { StorageError } from './errors.ts'

/** Marks a file as a library of ours ("Still" in ASCII would need five bytes; these are "Stbd"). */
export const APPLICATION_ID = 0x53746264

/**
 * The schema's history, append-only: `STEPS[n]` takes a library of version n to version n + 1.
 * A document is the project as JSON, complete; every other column of `project` is taken from it
 * for listing, and could be rebuilt from it.
 */
export const STEPS: readonly string[] = [
  `CREATE TABLE project (
     number INTEGER PRIMARY KEY,
     id TEXT NOT NULL UNIQUE,
     revision INTEGER NOT NULL,
     document TEXT NOT NULL,
     created_at TEXT NOT NULL,
     changed_at TEXT NOT NULL,
     removed_at TEXT,
     name TEXT NOT NULL,
     reference TEXT NOT NULL,
     site TEXT NOT NULL,
     description TEXT NOT NULL,
     notes TEXT NOT NULL,
     tags TEXT NOT NULL,
     mount_type_names TEXT NOT NULL,
     mass_kg REAL,
     running_speed_rad_per_s REAL,
     mount_positions_m TEXT NOT NULL,
     mount_count INTEGER NOT NULL,
     absorber_count INTEGER NOT NULL
   ) STRICT;
   CREATE INDEX project_by_change ON project (removed_at, changed_at DESC);
   CREATE TABLE setting (name TEXT PRIMARY KEY, value TEXT NOT NULL) STRICT;
   CREATE TABLE mount_type (id TEXT PRIMARY KEY, place INTEGER NOT NULL, document TEXT NOT NULL) STRICT;`,
  // The index keeps no copy of the text: the documents have it.
  `CREATE VIRTUAL TABLE project_text USING fts5 (
     name, reference, site, description, notes, tags, mount_type_names,
     content = '', contentless_delete = 1, prefix = '1 2 3',
     tokenize = "unicode61 remove_diacritics 2"
   );
   INSERT INTO project_text (rowid, name, reference, site, description, notes, tags, mount_type_names)
     SELECT number, name, reference, site, description, notes, tags, mount_type_names FROM project;`,
  // A mount type is written in the shape of its project version, and brought up to date by the same steps.
  'ALTER TABLE mount_type ADD COLUMN project_version INTEGER NOT NULL DEFAULT 1;',
]

/** Version of the library in `db`; 0 for an empty file. */
export function libraryVersion(db: Database): number {
  return db.pragma('user_version', { simple: true }) as number // the pragma is an integer
}

/**
 * Brings the library to the version of this program: all steps and the version number in one
 * transaction, so that a crash leaves the old library and not half of the new one.
 * @throws StorageError for a newer library
 */
export function migrate(db: Database, steps: readonly string[] = STEPS): void {
  const version = libraryVersion(db)
  if (version > steps.length) {
    throw new StorageError(
      `This library has version ${version} and was written by a newer Stillbed; this one reads up to version ${steps.length}.`,
    )
  }
  if (version === steps.length) return
  db.transaction(() => {
    for (const sql of steps.slice(version)) db.exec(sql)
    db.pragma(`application_id = ${APPLICATION_ID}`)
    db.pragma(`user_version = ${steps.length}`)
  }).immediate()
}
