import { InputError } from '../../../core/errors.ts'

/** Why a file was not taken onto the Shelf, in words for the person who chose it. */
export function importRefusal(error: unknown): string {
  if (!(error instanceof InputError)) return error instanceof Error ? error.message : String(error)
  if (error.field === 'project' && error.allowed.startsWith('is not JSON'))
    return 'It is no project file, or only part of one.'
  if (error.field === 'format') return 'It is no project file of Stillbed.'
  if (error.field === 'version') return `Its version ${String(error.value)} is not known: ${error.allowed}.`
  return error.message
}
