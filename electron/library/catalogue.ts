import type { Database } from 'better-sqlite3'
import type { MountType } from '../../core/project/mounts.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../core/project/project.ts'
import { readProject } from '../../core/project/read.ts'
import { decode, encode } from '../api/codec.ts'

interface TypeRow {
  readonly document: string
  readonly project_version: number
}

/** The mount types to choose from. A project takes a copy, so that it stands alone. */
export function createCatalogueRepository(db: Database) {
  const select = db.prepare<[], TypeRow>(
    'SELECT document, project_version FROM mount_type ORDER BY place, id',
  )
  const upsert = db.prepare<[string, string, number]>(
    `INSERT INTO mount_type (id, place, document, project_version)
     VALUES (?, (SELECT coalesce(max(place), 0) + 1 FROM mount_type), ?, ?)
     ON CONFLICT (id) DO UPDATE SET document = excluded.document, project_version = excluded.project_version`,
  )
  return {
    /** @throws InputError when a stored type cannot be read */
    list: (): readonly MountType[] => select.all().flatMap(readType),
    /** All or none; a type whose id is known takes the place of the old one. */
    addMany: db.transaction((types: readonly MountType[]): void => {
      for (const type of types) upsert.run(type.id, encode(type), PROJECT_VERSION)
    }),
  }
}

/** As part of a project that holds nothing else: that is what is upgraded. */
function readType({ document, project_version: version }: TypeRow): readonly MountType[] {
  return readProject({ format: PROJECT_FORMAT, version, mounting: { types: [decode(document)] } }).mounting
    .types
}

export type CatalogueRepository = ReturnType<typeof createCatalogueRepository>
