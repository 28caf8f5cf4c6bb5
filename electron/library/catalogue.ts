import type { Database } from 'better-sqlite3'
import { mountTypeSchema, type MountType } from '../../core/project/mounts.ts'
import { decode, encode } from '../api/codec.ts'

/** The mount types to choose from. A project takes a copy, so that it stands alone. */
export function createCatalogueRepository(db: Database) {
  const select = db.prepare<[], { document: string }>('SELECT document FROM mount_type ORDER BY place, id')
  const upsert = db.prepare<[string, string]>(
    `INSERT INTO mount_type (id, place, document)
     VALUES (?, (SELECT coalesce(max(place), 0) + 1 FROM mount_type), ?)
     ON CONFLICT (id) DO UPDATE SET document = excluded.document`,
  )
  return {
    list: (): readonly MountType[] =>
      select.all().map(({ document }) => mountTypeSchema.parse(decode(document))),
    /** All or none; a type whose id is known takes the place of the old one. */
    addMany: db.transaction((types: readonly MountType[]): void => {
      for (const type of types) upsert.run(type.id, encode(type))
    }),
  }
}

export type CatalogueRepository = ReturnType<typeof createCatalogueRepository>
