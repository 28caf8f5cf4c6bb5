/**
 * The one list of endpoints. Main, preload, the loopback host and the pages read this table;
 * nothing else names an endpoint. Arguments are checked against the schema on arrival.
 */
import { z } from 'zod'
import type { MountType } from '../../core/project/mounts.ts'
import type { Project } from '../../core/project/project.ts'

const id = z.uuid()
const none = z.null()
/** Checked by `readProject` in the handler, which upgrades older versions and names the field. */
const rawProject = z.record(z.string(), z.unknown())
const settingsSchema = z.strictObject({
  sheet: z.enum(['system', 'light', 'dark']),
  units: z.enum(['SI', 'US']),
})

export const ARGUMENTS = {
  'app:info': none,
  'app:log': z.strictObject({ message: z.string().max(5000), stack: z.string().max(20_000).default('') }),
  'settings:get': none,
  'settings:set': settingsSchema,
  'shelf:list': z.strictObject({
    query: z.string().max(200).default(''),
    wastebasket: z.boolean().default(false),
  }),
  'shelf:create': z.strictObject({ project: rawProject }),
  'shelf:open': z.strictObject({ id }),
  'shelf:save': z.strictObject({ id, revision: z.number().int().min(1), project: rawProject }),
  'shelf:rename': z.strictObject({ id, name: z.string().trim().min(1).max(200) }),
  'shelf:duplicate': z.strictObject({ id }),
  'shelf:remove': z.strictObject({ id }),
  'shelf:restore': z.strictObject({ id }),
  'shelf:erase': z.strictObject({ id }),
  'shelf:import': z.strictObject({ text: z.string().max(20_000_000) }),
  'catalogue:list': none,
  'report:pdf': z.strictObject({ project: rawProject }),
} as const satisfies Record<string, z.ZodType>

export type EndpointName = keyof typeof ARGUMENTS
export type Arg<E extends EndpointName> = z.input<(typeof ARGUMENTS)[E]>

export type Settings = z.infer<typeof settingsSchema>

export interface AppInfo {
  readonly version: string
  readonly host: 'desktop' | 'loopback'
  readonly libraryFile: string
}

/** A project as the Shelf lists it. Times are ISO 8601 in UTC. */
export interface ShelfRow {
  readonly id: string
  readonly name: string
  readonly reference: string
  readonly site: string
  readonly description: string
  readonly tags: readonly string[]
  readonly createdAt: string
  readonly changedAt: string
  readonly removedAt: string | null
  readonly mass: number | null
  readonly runningSpeed: number | null
  readonly mountPositions: readonly (readonly [x: number, y: number])[]
  readonly mountCount: number
  readonly absorberCount: number
}

export interface OpenedProject {
  readonly id: string
  readonly revision: number
  readonly project: Project
}

export interface Endpoints {
  'app:info': AppInfo
  'app:log': { readonly reference: string }
  'settings:get': Settings
  'settings:set': Settings
  'shelf:list': readonly ShelfRow[]
  'shelf:create': OpenedProject
  'shelf:open': OpenedProject
  /** `revision` must be the one last seen; a save from a stale copy is refused with code 'stale' */
  'shelf:save': { readonly revision: number; readonly changedAt: string }
  'shelf:rename': ShelfRow
  'shelf:duplicate': ShelfRow
  'shelf:remove': ShelfRow
  'shelf:restore': ShelfRow
  'shelf:erase': null
  'shelf:import': ShelfRow
  'catalogue:list': readonly MountType[]
  'report:pdf': { readonly fileName: string; readonly bytes: Uint8Array }
}
export type Value<E extends EndpointName> = Endpoints[E]

export interface ApiError {
  readonly code: 'invalid-input' | 'not-found' | 'stale' | 'storage' | 'internal'
  readonly message: string
  /** path of the field in the project, for invalid input */
  readonly field?: string
}
export type Reply<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: ApiError }

/** What the pages call, whichever host carries it. */
export type Invoke = <E extends EndpointName>(endpoint: E, argument: Arg<E>) => Promise<Reply<Value<E>>>
