import type { Vec3 } from '../../../core/project/fields.ts'
import { desk } from '../../state/desk.svelte.ts'
import { newGesture } from '../../state/history.ts'
import type { Bounds } from '../../drawing/scene.ts'
import type { View } from '../../drawing/views.ts'
import { moveMounts, snap, startPositions } from './plan-moves.ts'

interface Drag {
  readonly held: string
  readonly ids: readonly string[]
  readonly starts: ReadonlyMap<string, Readonly<Vec3>>
  readonly from: readonly [x: number, y: number]
  readonly gesture: string
  readonly bounds: Bounds
}

/** Moving mounts on the plan by pointer or keys. A drag is one step of undo. */
export class PlanDrag {
  #drag = $state.raw<Drag | null>(null)

  /** While something is held the sheet keeps its scale. */
  get bounds(): Bounds | null {
    return this.#drag?.bounds ?? null
  }

  /** id of the mount under the pointer */
  get held(): string | null {
    return this.#drag?.held ?? null
  }

  start(held: string, ids: readonly string[], from: readonly [number, number], bounds: Bounds): void {
    this.#drag = {
      held,
      ids,
      from,
      bounds,
      gesture: newGesture('mounts'),
      starts: startPositions(desk.project.mounting.placed),
    }
  }

  /** @param to pointer on the sheet [px] */
  move(to: readonly [number, number], view: View, step: number): void {
    const drag = this.#drag
    const start = drag?.starts.get(drag.held)
    if (!drag || !start) return
    const wanted = [
      start[0] + (to[0] - drag.from[0]) / view.scale,
      start[1] - (to[1] - drag.from[1]) / view.scale,
    ]
    const shift: [number, number] = [
      snap(wanted[0] ?? 0, step) - start[0],
      snap(wanted[1] ?? 0, step) - start[1],
    ]
    desk.change(
      `move ${drag.ids.length === 1 ? 'a mount' : `${drag.ids.length} mounts`}`,
      (draft) => moveMounts(draft.mounting.placed, drag.ids, drag.starts, shift),
      drag.gesture,
    )
  }

  /** Puts everything back where it was taken from. */
  cancel(): void {
    const drag = this.#drag
    if (!drag) return
    desk.change(
      'move mounts',
      (draft) => moveMounts(draft.mounting.placed, drag.ids, drag.starts, [0, 0]),
      drag.gesture,
    )
    this.#drag = null
  }

  end(): void {
    this.#drag = null
  }
}

/** One press of an arrow key. */
export function nudge(ids: readonly string[], shift: readonly [number, number]): void {
  const starts = startPositions(desk.project.mounting.placed)
  desk.change(
    `move ${ids.length === 1 ? 'a mount' : `${ids.length} mounts`}`,
    (draft) => moveMounts(draft.mounting.placed, ids, starts, shift),
    `nudge ${ids.join(' ')}`,
  )
}
