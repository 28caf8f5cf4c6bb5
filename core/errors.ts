/** A value that the user (or a file) gave and that cannot be used; shown at its field. */
export class InputError extends Error {
  readonly field: string
  readonly value: unknown
  readonly allowed: string

  /**
   * @param field path of the field in the project, such as `machine.body.mass`
   * @param value what was given
   * @param allowed what would have been accepted, in plain words
   */
  constructor(field: string, value: unknown, allowed: string) {
    super(`${field}: ${allowed} (got ${describeValue(value)})`)
    this.name = 'InputError'
    this.field = field
    this.value = value
    this.allowed = allowed
  }
}

function describeValue(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'nothing'
  if (Array.isArray(value)) return 'a list'
  if (typeof value === 'object') return 'an object'
  const text = typeof value === 'string' ? JSON.stringify(value) : String(value)
  return text.length > 60 ? `${text.slice(0, 57)}...` : text
}

/** For the end of a switch over a union: a new member then fails to compile here. */
export function assertNever(value: never, what: string): never {
  throw new Error(`${what}: unexpected ${JSON.stringify(value)}`)
}

/** Something about the inputs that a person must know, with the field where it arises. */
export interface Problem {
  /** path in the project, such as `machine.massProperties.mass` */
  readonly field: string
  readonly message: string
  /** missing: not given yet; invalid: cannot be used; caution: usable, but look */
  readonly kind: 'missing' | 'invalid' | 'caution'
}
