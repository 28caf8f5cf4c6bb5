import type { Absorber } from '../project/absorber.ts'
import type { Project } from '../project/project.ts'
import type { Requirement } from '../project/requirements.ts'
import type { Evaluation } from '../results.ts'

/** The requirement of one kind. */
export type Of<K extends Requirement['kind']> = Extract<Requirement, { kind: K }>

/** Name of a mount as marked on the plan. */
export function mountName(project: Project, id: string): string {
  return project.mounting.placed.find((mount) => mount.id === id)?.name || id
}

/** The enabled absorbers that stand on the machine and are part of its response, in its order. */
export function absorbersInPlace(
  project: Project,
  { absorbers }: Pick<Evaluation, 'absorbers'>,
): readonly Absorber[] {
  return project.absorbers.filter(
    ({ id, enabled, host }) =>
      enabled && host.kind === 'mode' && absorbers.some((result) => result.id === id),
  )
}

/** What keeps the first enabled absorber on the machine from being known, in words; null when all are. */
export function absentAbsorber(
  project: Project,
  { absorbers, problems }: Pick<Evaluation, 'absorbers' | 'problems'>,
): string | null {
  const index = project.absorbers.findIndex(
    ({ id, enabled, host }) =>
      enabled && host.kind === 'mode' && !absorbers.some((result) => result.id === id),
  )
  if (index < 0) return null
  const reason = problems.find(
    ({ kind, field }) => kind !== 'caution' && field.startsWith(`absorbers[${index}].`),
  )
  return `Not known yet: ${reason?.message ?? 'an absorber is not known.'}`
}
