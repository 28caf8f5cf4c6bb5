import { z } from 'zod'
import { InputError } from '../../core/errors.ts'
import { fieldName } from '../../core/project/read.ts'
import { NotFoundError, StaleError, StorageError } from '../library/errors.ts'
import type { ApiError } from './contract.ts'

/**
 * What the pages are told. A known failure speaks for itself; anything else is a bug, which
 * `record` writes to the log and answers with the reference to find it by.
 */
export function toApiError(error: unknown, record: (error: unknown) => string): ApiError {
  if (error instanceof InputError) {
    return { code: 'invalid-input', message: error.message, field: error.field }
  }
  if (error instanceof z.ZodError) {
    const issue = error.issues[0]
    const field = fieldName(issue?.path ?? []) || 'argument'
    return { code: 'invalid-input', message: `${field}: ${issue?.message ?? 'not accepted'}`, field }
  }
  if (error instanceof NotFoundError) return { code: 'not-found', message: error.message }
  if (error instanceof StaleError) return { code: 'stale', message: error.message }
  if (error instanceof StorageError) return { code: 'storage', message: error.message }
  return {
    code: 'internal',
    message: `Something went wrong in Stillbed itself; the log has it under ${record(error)}. Your project is kept.`,
  }
}
