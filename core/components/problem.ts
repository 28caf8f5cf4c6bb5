import type { Problem } from '../errors.ts'

/** What a person must know about a component; `field` counts from the component's own inputs. */
export type ComponentProblem = Problem

/** A remark at a field. */
export const caution = (field: string, message: string): ComponentProblem => ({
  field,
  message,
  kind: 'caution',
})
export const invalid = (field: string, message: string): ComponentProblem => ({
  field,
  message,
  kind: 'invalid',
})
export const missing = (field: string, message: string): ComponentProblem => ({
  field,
  message,
  kind: 'missing',
})
