import type { Absorber } from '../../../core/project/absorber.ts'
import { desk } from '../../state/desk.svelte.ts'

/** Changes one absorber of the open project. */
export function editAbsorber(
  id: string,
  what: string,
  recipe: (absorber: Absorber) => void,
  gesture = '',
): void {
  desk.change(
    what,
    (draft) => {
      const absorber = draft.absorbers.find((entry) => entry.id === id)
      if (absorber) recipe(absorber)
    },
    gesture,
  )
}
