import { PROJECT_FORMAT, PROJECT_VERSION, projectSchema, type Project } from './project.ts'

/** A blank project: nothing is assumed about the machine. */
export function blankProject(name = ''): Project {
  return projectSchema.parse({ format: PROJECT_FORMAT, version: PROJECT_VERSION, job: { name } })
}
