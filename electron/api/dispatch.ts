import { appHandlers } from './app.ts'
import { catalogueHandlers } from './catalogue.ts'
import type { ApiContext, Handler, Handlers } from './context.ts'
import { ARGUMENTS, type EndpointName, type Reply, type Value } from './contract.ts'
import { toApiError } from './errors.ts'
import { reportHandlers } from './report.ts'
import { settingsHandlers } from './settings.ts'
import { shelfHandlers } from './shelf.ts'

const HANDLERS: Handlers = {
  ...appHandlers,
  ...settingsHandlers,
  ...shelfHandlers,
  ...catalogueHandlers,
  ...reportHandlers,
}

export function isEndpoint(name: string): name is EndpointName {
  return Object.hasOwn(ARGUMENTS, name)
}

/** Checks the untrusted argument, runs the endpoint, and always answers with an envelope. */
export type Dispatch = <E extends EndpointName>(endpoint: E, raw: unknown) => Promise<Reply<Value<E>>>

export function createDispatch(context: ApiContext): Dispatch {
  return async <E extends EndpointName>(endpoint: E, raw: unknown) => {
    try {
      const argument = ARGUMENTS[endpoint].parse(raw)
      // schema and handler stand under one name in two tables, which the compiler cannot pair up
      const run = HANDLERS[endpoint] as Handler<EndpointName> as (
        argument: unknown,
        context: ApiContext,
      ) => Value<E> | Promise<Value<E>>
      return { ok: true, value: await run(argument, context) }
    } catch (error) {
      const record = (bug: unknown) => context.log.record(`${endpoint}: ${describe(bug)}`)
      return { ok: false, error: toApiError(context.library.explain(error), record) }
    }
  }
}

function describe(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error)
}
