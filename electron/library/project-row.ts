import type { Project } from '../../core/project/project.ts'
import type { ShelfRow } from '../api/contract.ts'
import { summarise } from './summary.ts'

/** Columns that are searched; the index has the same in this order. */
export const TEXT_COLUMNS = [
  'name',
  'reference',
  'site',
  'description',
  'notes',
  'tags',
  'mount_type_names',
] as const

/** What the Shelf needs of a row; documents stay where they are. */
export const LISTED = `id, name, reference, site, description, tags, created_at, changed_at, removed_at,
  mass_kg, running_speed_rad_per_s, mount_positions_m, mount_count, absorber_count`

/** A row as stored: SI units, named in the column; lists as JSON. */
export interface ListedRow {
  readonly id: string
  readonly name: string
  readonly reference: string
  readonly site: string
  readonly description: string
  readonly tags: string
  readonly created_at: string
  readonly changed_at: string
  readonly removed_at: string | null
  readonly mass_kg: number | null
  readonly running_speed_rad_per_s: number | null
  readonly mount_positions_m: string
  readonly mount_count: number
  readonly absorber_count: number
}

export function toColumns(project: Project): Record<string, string | number | null> {
  const summary = summarise(project)
  return {
    name: summary.name,
    reference: summary.reference,
    site: summary.site,
    description: summary.description,
    notes: summary.notes,
    tags: JSON.stringify(summary.tags),
    mount_type_names: summary.mountTypeNames.join('\n'),
    mass_kg: summary.mass,
    running_speed_rad_per_s: summary.runningSpeed,
    mount_positions_m: JSON.stringify(summary.mountPositions),
    mount_count: summary.mountCount,
    absorber_count: summary.absorberCount,
  }
}

export function toShelfRow(row: ListedRow): ShelfRow {
  return {
    id: row.id,
    name: row.name,
    reference: row.reference,
    site: row.site,
    description: row.description,
    tags: JSON.parse(row.tags) as string[], // written by toColumns
    createdAt: row.created_at,
    changedAt: row.changed_at,
    removedAt: row.removed_at,
    mass: row.mass_kg,
    runningSpeed: row.running_speed_rad_per_s,
    mountPositions: JSON.parse(row.mount_positions_m) as [number, number][], // written by toColumns
    mountCount: row.mount_count,
    absorberCount: row.absorber_count,
  }
}
