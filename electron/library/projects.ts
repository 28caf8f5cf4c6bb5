import type { Database } from 'better-sqlite3'
import { randomUUID } from 'node:crypto'
import type { Project } from '../../core/project/project.ts'
import { readProject } from '../../core/project/read.ts'
import { decode, encode } from '../api/codec.ts'
import type { OpenedProject, ShelfRow } from '../api/contract.ts'
import { NotFoundError, StaleError } from './errors.ts'
import { LISTED, TEXT_COLUMNS, toColumns, toShelfRow, type ListedRow } from './project-row.ts'
import { searchExpression } from './search.ts'

/** A project's name is at most this long, as its schema has it. */
const LONGEST_NAME = 200

/**
 * The projects of a library. The document is stored whole; `changed_at` and the search index move
 * with it in one transaction. better-sqlite3 transactions are synchronous: never await inside one.
 */
export function createProjectRepository(db: Database, now: () => Date) {
  const byId = db.prepare<[string], ListedRow & { revision: number }>(
    `SELECT ${LISTED}, revision FROM project WHERE id = ?`,
  )
  const documentOf = db.prepare<[string], { document: string }>('SELECT document FROM project WHERE id = ?')
  const all = db.prepare<[number], ListedRow>(
    `SELECT ${LISTED} FROM project WHERE (removed_at IS NOT NULL) = ? ORDER BY changed_at DESC, number DESC`,
  )
  const found = db.prepare<[number, string], ListedRow>(
    `SELECT ${LISTED} FROM project WHERE (removed_at IS NOT NULL) = ?
       AND number IN (SELECT rowid FROM project_text WHERE project_text MATCH ?)
     ORDER BY changed_at DESC, number DESC`,
  )
  const columns = [...TEXT_COLUMNS, 'document', 'changed_at', 'mass_kg', 'running_speed_rad_per_s'].concat(
    'mount_positions_m',
    'mount_count',
    'absorber_count',
  )
  const insert = db.prepare(
    `INSERT INTO project (id, revision, created_at, ${columns.join(', ')})
     VALUES (@id, 1, @changed_at, ${columns.map((column) => `@${column}`).join(', ')})`,
  )
  const update = db.prepare(
    `UPDATE project SET revision = revision + 1, ${columns.map((column) => `${column} = @${column}`).join(', ')}
     WHERE id = @id`,
  )
  const unindex = db.prepare<[string]>(
    'DELETE FROM project_text WHERE rowid = (SELECT number FROM project WHERE id = ?)',
  )
  const index = db.prepare<[string]>(
    `INSERT INTO project_text (rowid, ${TEXT_COLUMNS.join(', ')})
     SELECT number, ${TEXT_COLUMNS.join(', ')} FROM project WHERE id = ?`,
  )
  const setRemoved = db.prepare<[string | null, string]>('UPDATE project SET removed_at = ? WHERE id = ?')
  const erase = db.prepare<[string]>('DELETE FROM project WHERE id = ?')

  const rowOf = (id: string) => {
    const row = byId.get(id)
    if (!row) throw new NotFoundError('This project is not in the library.')
    return row
  }
  const liveRowOf = (id: string) => {
    const row = rowOf(id)
    if (row.removed_at === null) return row
    throw new NotFoundError('This project is in the wastebasket; restore it first.')
  }
  const projectOf = (id: string): Project => readProject(decode(documentOf.get(id)?.document ?? 'null'))

  const write = (statement: typeof insert, id: string, project: Project): string => {
    const changedAt = now().toISOString()
    statement.run({ id, changed_at: changedAt, document: encode(project), ...toColumns(project) })
    unindex.run(id)
    index.run(id)
    return changedAt
  }

  return {
    /**
     * Rows whose words begin with what was typed, the last changed first.
     * @param wastebasket true: what was removed instead of what is on the Shelf
     */
    list({ query = '', wastebasket = false }): readonly ShelfRow[] {
      const expression = searchExpression(query)
      const removed = wastebasket ? 1 : 0
      const rows = expression === null ? all.all(removed) : found.all(removed, expression)
      return rows.map(toShelfRow)
    },

    create: db.transaction((project: Project): OpenedProject => {
      const id = randomUUID()
      write(insert, id, project)
      return { id, revision: 1, project }
    }),

    /** @throws NotFoundError; InputError when the stored document cannot be read */
    open(id: string): OpenedProject {
      const { revision } = liveRowOf(id)
      return { id, revision, project: projectOf(id) }
    },

    /**
     * @param revision the one that the caller last saw
     * @throws StaleError when the stored project has moved on; NotFoundError
     */
    save: db.transaction((id: string, revision: number, project: Project) => {
      const row = liveRowOf(id)
      if (row.revision !== revision) {
        throw new StaleError('This project was changed elsewhere since it was opened here.')
      }
      return { revision: revision + 1, changedAt: write(update, id, project) }
    }),

    rename: db.transaction((id: string, name: string): ShelfRow => {
      liveRowOf(id)
      const project = projectOf(id)
      write(update, id, { ...project, job: { ...project.job, name } })
      return toShelfRow(rowOf(id))
    }),

    duplicate: db.transaction((id: string): ShelfRow => {
      liveRowOf(id)
      const project = projectOf(id)
      const copy = randomUUID()
      const name = `Copy of ${project.job.name}`.trim().slice(0, LONGEST_NAME)
      write(insert, copy, { ...project, job: { ...project.job, name } })
      return toShelfRow(rowOf(copy))
    }),

    /** Puts it into the wastebasket; doing so twice changes nothing. */
    remove: db.transaction((id: string): ShelfRow => {
      if (rowOf(id).removed_at === null) setRemoved.run(now().toISOString(), id)
      return toShelfRow(rowOf(id))
    }),

    restore: db.transaction((id: string): ShelfRow => {
      rowOf(id)
      setRemoved.run(null, id)
      return toShelfRow(rowOf(id))
    }),

    /** For good, and only from the wastebasket. */
    erase: db.transaction((id: string): void => {
      if (rowOf(id).removed_at === null) {
        throw new NotFoundError('This project is not in the wastebasket; remove it first.')
      }
      unindex.run(id)
      erase.run(id)
    }),

    row: (id: string): ShelfRow => toShelfRow(rowOf(id)),
  }
}

export type ProjectRepository = ReturnType<typeof createProjectRepository>
