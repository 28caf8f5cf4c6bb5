import type { Project } from '../../core/project/project.ts'
import type { RunUpResult } from '../../core/results.ts'

/** A question that takes too long to be asked with every change: it is put on demand. */
export interface DurationStudy {
  readonly kind: 'durations'
  readonly project: Project
  /** times the given duration of both passages; each is answered by itself */
  readonly factors: readonly number[]
}
export type StudyRequest = DurationStudy

export type StudyReply =
  | { readonly kind: 'duration'; readonly factor: number; readonly runUp: RunUpResult }
  | { readonly kind: 'end' }
  | { readonly kind: 'failure'; readonly message: string }
