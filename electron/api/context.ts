import type { Project } from '../../core/project/project.ts'
import type { Library } from '../library/library.ts'
import type { Log } from '../log.ts'
import type { AppInfo, ARGUMENTS, EndpointName, Value } from './contract.ts'
import type { z } from 'zod'

/** What the handlers work with; the hosts differ in nothing else. */
export interface ApiContext {
  readonly info: AppInfo
  readonly library: Library
  readonly log: Log
  /** draws the report off the host's main thread */
  readonly drawReport: (project: Project) => Promise<Uint8Array>
}

/** An argument after its schema has filled in the defaults. */
export type Parsed<E extends EndpointName> = z.output<(typeof ARGUMENTS)[E]>
export type Handler<E extends EndpointName> = (
  argument: Parsed<E>,
  context: ApiContext,
) => Value<E> | Promise<Value<E>>
export type Handlers = { readonly [E in EndpointName]: Handler<E> }
/** The endpoints of one area, such as `shelf`. */
export type AreaHandlers<Area extends string> = Pick<Handlers, Extract<EndpointName, `${Area}:${string}`>>
