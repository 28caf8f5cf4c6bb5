import type { ApiError } from '../../electron/api/contract.ts'
import type { Project } from '../../core/project/project.ts'
import type { Evaluation } from '../../core/results.ts'
import type { UnitSystem } from '../../core/units/dimensions.ts'

/** The open project with its results and history, as every page sees it. All members are reactive. */
export interface Desk {
  /** id of the open project in the library; null while the Shelf is shown */
  readonly id: string | null
  readonly project: Project
  /** of the present project, or of the last one while a newer is being computed; null before the first */
  readonly evaluation: Evaluation | null
  /** the project from which `evaluation` was computed; its lists are in the order of this one */
  readonly evaluatedProject: Project | null
  readonly evaluating: boolean
  /** why the last computation gave nothing, in words; null when it did */
  readonly computeFailure: string | null
  /** 'saved', 'saving', or what went wrong with the last save */
  readonly saveState: 'saved' | 'saving' | ApiError
  readonly units: UnitSystem
  /** the speed at which every view stands [rad/s] */
  readonly cursorSpeed: number
  setCursorSpeed(speed: number): void
  /**
   * Changes the project. `recipe` gets a private copy and edits it in place.
   * Changes with the same `gesture` in quick succession are one step of undo (typing, stepping);
   * with a gesture of `newGesture()` all of them, until the next one (dragging).
   * @throws InputError when a value cannot be stored (a mass of zero); nothing changes then.
   * QuantityField and its kin catch it and show it at the field.
   */
  change(what: string, recipe: (draft: Project) => void, gesture?: string): void
  readonly canUndo: string | null
  readonly canRedo: string | null
  undo(): void
  redo(): void
  open(id: string): Promise<void>
  /** waits for the pending save, then goes back to the Shelf */
  close(): Promise<void>
}
