import type { AreaHandlers } from './context.ts'

export const settingsHandlers: AreaHandlers<'settings'> = {
  'settings:get': (_none, { library }) => library.settings.get(),
  'settings:set': (settings, { library }) => library.settings.set(settings),
}
