import type { AbsorberHost, Objective } from '../../../core/project/absorber.ts'
import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'

export type AbsorberInput = NonNullable<ProjectInput['absorbers']>[number]

/** The host of the dimensionless cases: any mass and frequency would do. */
export const HOST = { mass: 250, frequency: 12.5 } as const

/** A project that holds one absorber on a typed single-freedom host. */
export function absorberProject(
  absorber: Omit<AbsorberInput, 'id' | 'host'>,
  host: Partial<Extract<AbsorberHost, { kind: 'single' }>> = {},
): Project {
  const input: ProjectInput = {
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    absorbers: [{ id: 'absorber', host: { kind: 'single', ...HOST, ...host }, ...absorber }],
  }
  return readProject(input)
}

/** The objective by which each kind of the reference file is asked for, with the same normalisation of the stroke. */
export const OBJECTIVE_OF_KIND: Readonly<Record<string, Objective>> = {
  F0: { excitation: 'force', response: 'displacement' },
  F1: { excitation: 'force', response: 'velocity' },
  F2: { excitation: 'unbalance', response: 'displacement' },
  F3: { excitation: 'unbalance', response: 'velocity' },
  F4: { excitation: 'unbalance', response: 'acceleration' },
  'F-1': { excitation: 'supportAcceleration', response: 'velocity' },
  'F-2': { excitation: 'supportAcceleration', response: 'displacement' },
  TF: { excitation: 'supportDisplacement', response: 'displacement' },
  R0: { excitation: 'supportAcceleration', response: 'relativeDisplacement' },
  R2: { excitation: 'supportDisplacement', response: 'relativeDisplacement' },
}
