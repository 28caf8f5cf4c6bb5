import type { Project } from '../project/project.ts'
import type { Requirement } from '../project/requirements.ts'

/** The requirement of one kind. */
export type Of<K extends Requirement['kind']> = Extract<Requirement, { kind: K }>

/** Name of a mount as marked on the plan. */
export function mountName(project: Project, id: string): string {
  return project.mounting.placed.find((mount) => mount.id === id)?.name || id
}
