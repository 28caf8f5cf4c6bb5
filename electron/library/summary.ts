import type { Project } from '../../core/project/project.ts'

/** What the Shelf lists and searches, taken from the document at every save. */
export interface Summary {
  readonly name: string
  readonly reference: string
  readonly site: string
  readonly description: string
  readonly notes: string
  readonly tags: readonly string[]
  readonly mountTypeNames: readonly string[]
  /** total mass [kg]; null when it is not given */
  readonly mass: number | null
  /** [rad/s] */
  readonly runningSpeed: number | null
  /** x and y of every mount on the plan [m] */
  readonly mountPositions: readonly (readonly [x: number, y: number])[]
  readonly mountCount: number
  readonly absorberCount: number
}

export function summarise(project: Project): Summary {
  const { job, machine, mounting, absorbers } = project
  return {
    name: job.name,
    reference: job.reference,
    site: job.site,
    description: machine.description,
    notes: job.notes,
    tags: job.tags,
    mountTypeNames: mounting.types.flatMap((type) => [type.name, type.kind]).filter((text) => text !== ''),
    mass: massOf(machine.massProperties),
    runningSpeed: machine.duty.runningSpeed,
    mountPositions: mounting.placed.map(({ position: [x, y] }) => [x, y]),
    mountCount: mounting.placed.length,
    absorberCount: absorbers.length,
  }
}

function massOf(properties: Project['machine']['massProperties']): number | null {
  if (properties.from === 'typed') return properties.mass
  return properties.parts.length === 0 ? null : properties.parts.reduce((sum, part) => sum + part.mass, 0)
}
