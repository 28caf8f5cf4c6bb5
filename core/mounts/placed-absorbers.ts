import type { Project } from '../project/project.ts'
import type { AbsorberResult } from '../results.ts'
import type { PlacedAbsorber } from './machine-network.ts'

/** The designed absorbers that stand on the machine: switched on, and on a mode of it. */
export function placedAbsorbers(
  project: Project,
  results: readonly AbsorberResult[],
): readonly PlacedAbsorber[] {
  return project.absorbers.flatMap(({ id, enabled, host }) => {
    const result = results.find((candidate) => candidate.id === id)
    if (!enabled || host.kind !== 'mode' || !result) return []
    const { mass, stiffness, damping } = result
    return [{ id, mass, stiffness, damping, position: host.position, direction: host.direction }]
  })
}
