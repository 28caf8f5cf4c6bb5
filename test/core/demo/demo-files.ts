import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import type { Project } from '../../../core/project/project.ts'
import { readProjectText } from '../../../core/project/read.ts'

const FOLDER = join(import.meta.dirname, '../../../resources/demo')

/** The projects of the demonstration, by file name. */
export function demoProjects(): readonly { readonly file: string; readonly project: Project }[] {
  return readdirSync(FOLDER)
    .filter((file) => file.endsWith('.json'))
    .map((file) => ({ file, project: readProjectText(readFileSync(join(FOLDER, file), 'utf8')) }))
}

/** The same project with every absorber switched on, as its notes advise. */
export function withAbsorbers(project: Project): Project {
  return { ...project, absorbers: project.absorbers.map((absorber) => ({ ...absorber, enabled: true })) }
}
