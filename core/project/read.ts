import type { z } from 'zod'
import { InputError } from '../errors.ts'
import { projectSchema, type Project } from './project.ts'
import { upgradeProject } from './upgrade.ts'

/**
 * Reads a project from parsed JSON: upgrades older versions, converts text quantities,
 * fills defaults, and checks every field.
 * @throws InputError naming the first field that cannot be used
 */
export function readProject(raw: unknown): Project {
  const result = projectSchema.safeParse(upgradeProject(raw))
  if (result.success) {
    assertReferences(result.data)
    return result.data
  }
  throw toInputError(result.error, raw)
}

/** Reads the text of a project file. @throws InputError when it is not JSON or not a project */
export function readProjectText(text: string): Project {
  let raw: unknown
  try {
    raw = JSON.parse(text.replace(/^\uFEFF/, ''))
  } catch (error) {
    throw new InputError(
      'project',
      text.slice(0, 40),
      `is not JSON: ${error instanceof Error ? error.message : 'unreadable'}`,
    )
  }
  return readProject(raw)
}

function toInputError(error: z.ZodError, raw: unknown): InputError {
  const issue = deepest(error.issues)
  const field = fieldName(issue.path) || 'project'
  return new InputError(field, valueAt(raw, issue.path), issue.message)
}

type Issue = z.core.$ZodIssue

/** In a union the message worth reading is that of the member which got furthest. */
function deepest(issues: readonly Issue[]): Issue {
  const first = issues[0]
  if (!first) throw new Error('a validation error without an issue')
  if (first.code !== 'invalid_union' || first.errors.length === 0) return first
  const candidates = first.errors.filter((list) => list.length > 0).map((list) => deepest(list))
  const custom = candidates.find((candidate) => candidate.code === 'custom')
  const best = custom ?? candidates.toSorted((a, b) => b.path.length - a.path.length)[0]
  return best ? { ...best, path: [...first.path, ...best.path] } : first
}

/** `['mounting', 'placed', 2, 'position', 0]` becomes `mounting.placed[2].position[0]`. */
export function fieldName(path: readonly PropertyKey[]): string {
  return path.reduce<string>((name, key) => {
    if (typeof key === 'number') return `${name}[${key}]`
    return name === '' ? String(key) : `${name}.${String(key)}`
  }, '')
}

function valueAt(raw: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>((value, key) => {
    if (typeof value !== 'object' || value === null) return undefined
    return (value as Record<PropertyKey, unknown>)[key] // any object can be asked for a key
  }, raw)
}

/** Identifiers are unique in their list. @throws InputError naming the repeated one */
function assertReferences(project: Project): void {
  const lists: readonly (readonly [string, readonly { id: string }[]])[] = [
    ['machine.points', project.machine.points],
    ['sources', project.sources],
    ['mounting.types', project.mounting.types],
    ['mounting.placed', project.mounting.placed],
    ['absorbers', project.absorbers],
    ['requirements', project.requirements],
  ]
  for (const [name, list] of lists) assertUnique(name, list)
  const types = new Set(project.mounting.types.map((type) => type.id))
  project.mounting.placed.forEach((mount, index) => {
    if (!types.has(mount.type)) {
      throw new InputError(
        `mounting.placed[${index}].type`,
        mount.type,
        'must be the id of a mount type of this project',
      )
    }
  })
}

function assertUnique(name: string, list: readonly { id: string }[]): void {
  const seen = new Set<string>()
  list.forEach((item, index) => {
    if (seen.has(item.id)) throw new InputError(`${name}[${index}].id`, item.id, 'must be unique in its list')
    seen.add(item.id)
  })
}
