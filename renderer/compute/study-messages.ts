import type { Clearance, DampingNeed } from '../../core/feasibility/damping-need.ts'
import type { Project } from '../../core/project/project.ts'
import type { AbsorberResult, Problem, RunUpResult } from '../../core/results.ts'

/** A question that takes too long to be asked with every change: it is put on demand. */
export interface DurationStudy {
  readonly kind: 'durations'
  readonly project: Project
  /** times the given duration of both passages; each is answered by itself */
  readonly factors: readonly number[]
}
/** The least damping of the mounts that keeps a clearance. */
export interface DampingStudy {
  readonly kind: 'damping'
  readonly project: Project
  readonly clearance: Clearance
  /** as designed */
  readonly absorbers: readonly AbsorberResult[]
}
export type StudyRequest = DurationStudy | DampingStudy

export type StudyReply =
  | { readonly kind: 'duration'; readonly factor: number; readonly runUp: RunUpResult }
  | { readonly kind: 'damping'; readonly need: DampingNeed | null; readonly problems: readonly Problem[] }
  | { readonly kind: 'end' }
  | { readonly kind: 'failure'; readonly message: string }
