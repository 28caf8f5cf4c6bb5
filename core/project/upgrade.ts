import { PROJECT_FORMAT, PROJECT_VERSION } from './project.ts'
import { InputError } from '../errors.ts'

type Step = (older: Record<string, unknown>) => Record<string, unknown>

/** `STEPS[n]` takes a file of version n + 1 to version n + 2; append-only. */
const STEPS: readonly Step[] = []

/**
 * Brings an older project file to the present version, one step at a time.
 * @throws InputError when it is no project of ours, or newer than this program
 */
export function upgradeProject(raw: unknown): unknown {
  if (typeof raw !== 'object' || raw === null || Array.isArray(raw)) {
    throw new InputError('project', raw, 'a project file holds one JSON object')
  }
  let project = raw as Record<string, unknown> // narrowed to a plain object just above
  if (project['format'] !== PROJECT_FORMAT) {
    throw new InputError('format', project['format'], `must be "${PROJECT_FORMAT}"`)
  }
  const version = project['version']
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1) {
    throw new InputError('version', version, `must be a whole number from 1 to ${PROJECT_VERSION}`)
  }
  if (version > PROJECT_VERSION) {
    throw new InputError(
      'version',
      version,
      `this program reads versions up to ${PROJECT_VERSION}; a newer one is needed`,
    )
  }
  for (const step of STEPS.slice(version - 1)) project = step(project)
  return project
}
