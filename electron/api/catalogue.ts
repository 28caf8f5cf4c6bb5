import type { AreaHandlers } from './context.ts'

export const catalogueHandlers: AreaHandlers<'catalogue'> = {
  'catalogue:list': (_none, { library }) => library.catalogue.list(),
}
