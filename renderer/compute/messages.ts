import type { Project } from '../../core/project/project.ts'
import type { Evaluation } from '../../core/results.ts'

export interface ComputeRequest {
  readonly id: number
  readonly project: Project
}

export type ComputeReply =
  | { readonly id: number; readonly evaluation: Evaluation }
  | { readonly id: number; readonly failure: { readonly message: string; readonly stack: string } }
