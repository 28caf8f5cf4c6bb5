import type { AreaHandlers } from './context.ts'

export const appHandlers: AreaHandlers<'app'> = {
  'app:info': (_none, { info }) => info,
  /** A failure of the pages, kept in the same log as the host's. */
  'app:log': ({ message, stack }, { log }) => ({
    reference: log.record(`pages: ${message}\n${stack}`),
  }),
}
