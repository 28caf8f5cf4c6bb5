/**
 * The one list of endpoints. Main, preload, the loopback host and the pages read this table;
 * nothing else names an endpoint. Arguments are checked against the schema on arrival.
 */
import { z } from 'zod'
import type { MountType } from '../../core/project/mounts.ts'
import type { Project } from '../../core/project/project.ts'
import type { BridgeName } from './bridge-name.ts'

const id = z.uuid()
const none = z.null()
/** Checked by `readProject` in the handler, which upgrades older versions and names the field. */
const rawProject = z.record(z.string(), z.unknown())
export const settingsSchema = z.strictObject({
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

/**
 * Commands of the desktop's menus, sent to the pages, which carry them out: the pages know
 * what is open and what can be undone.
 */
export const MENU_COMMANDS = [
  'project:new',
  'project:import',
  'project:export',
  'project:rename',
  'project:duplicate',
  'project:report',
  'shelf:show',
  'edit:undo',
  'edit:redo',
  'search:show',
  'sheet:light',
  'sheet:dark',
  'sheet:system',
  'units:SI',
  'units:US',
  'step:1',
  'step:2',
  'step:3',
  'step:4',
  'step:5',
  'step:6',
  'step:7',
  'step:8',
  'step:9',
] as const
export type MenuCommand = (typeof MENU_COMMANDS)[number]

/** What a host tells the pages unasked. */
export interface HostEvents {
  'menu:command': MenuCommand
  /** a project file that was opened with Stillbed, already checked and stored: show it */
  'project:show': { readonly id: string }
}

/** The pages' answer when the window wants to close: `text` is the project file that could not be saved. */
export type ClosingAnswer =
  | { readonly saved: true }
  | { readonly saved: false; readonly message: string; readonly fileName: string; readonly text: string }

/**
 * `window.stillbed` in the desktop: one function per endpoint, named by `bridgeName`
 * (`shelf:list` is `shelfList`), and the host's events. Absent in a browser, where the pages
 * call over HTTP as `electron/loopback/server.ts` describes.
 */
export type DesktopBridge = {
  readonly [E in EndpointName as BridgeName<E>]: (argument: Arg<E>) => Promise<Reply<Value<E>>>
} & {
  /** @returns a function that ends the listening */
  readonly onMenuCommand: (listener: (command: HostEvents['menu:command']) => void) => () => void
  readonly onProjectShow: (listener: (shown: HostEvents['project:show']) => void) => () => void
  /** Called before the window closes: finish the pending save, then answer. One listener at a time. */
  readonly onClosing: (listener: () => Promise<ClosingAnswer>) => () => void
}
