import type { Project } from '../../core/project/project.ts'
import type { Evaluation, Problem } from '../../core/results.ts'

/**
 * The inputs without which what the project asks for cannot be computed. A caution is none, and
 * neither is what nobody asked for: forces and speeds in a study of natural frequencies, or the
 * machine in a study of absorbers on typed hosts.
 */
export function blockingProblems(project: Project, evaluation: Evaluation): readonly Problem[] {
  const asked = askedFor(project)
  return evaluation.problems.filter(({ kind, field }) => {
    if (kind === 'caution') return false
    if (field.startsWith('absorbers')) return true
    if (field === 'sources') return false
    if (field.startsWith('machine.duty')) return asked.response && evaluation.response === null
    return asked.machine
  })
}

function askedFor({ absorbers, sources, mounting, machine }: Project) {
  const onTypedHosts = absorbers.length > 0 && absorbers.every(({ host }) => host.kind === 'single')
  const described = sources.length > 0 || mounting.placed.length > 0 || isGiven(machine.massProperties)
  return { machine: described || !onTypedHosts, response: sources.some(({ enabled }) => enabled) }
}

function isGiven(properties: Project['machine']['massProperties']): boolean {
  return properties.from === 'typed' ? properties.mass !== null : properties.parts.length > 0
}
