import type { Problem } from '../results.ts'

export function missing(field: string, message: string): Problem {
  return { field, message, kind: 'missing' }
}

export function invalid(field: string, message: string): Problem {
  return { field, message, kind: 'invalid' }
}

export function caution(field: string, message: string): Problem {
  return { field, message, kind: 'caution' }
}
