import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'

type MountInput = NonNullable<NonNullable<ProjectInput['mounting']>['placed']>[number]
type TypeInput = NonNullable<NonNullable<ProjectInput['mounting']>['types']>[number]

/** A machine on its mounts, with what matters to a test and defaults for the rest. */
export interface Sketch {
  readonly mass?: number
  readonly centre?: [number, number, number]
  readonly inertia?: readonly [number, number, number]
  /** one mount at each place, named M1, M2, ... */
  readonly places: readonly [number, number, number][]
  readonly type?: Partial<TypeInput>
  /** overrides for single mounts, by index */
  readonly mounts?: Readonly<Record<number, Partial<MountInput>>>
  readonly more?: Partial<ProjectInput>
}

export const CORNERS: readonly [number, number, number][] = [
  [0.6, 0.4, 0],
  [0.6, -0.4, 0],
  [-0.6, 0.4, 0],
  [-0.6, -0.4, 0],
]

export function sketchProject(sketch: Sketch): Project {
  const { mass = 400, centre = [0, 0, 0.3], inertia = [30, 50, 60], places, type, mounts = {}, more } = sketch
  const input: ProjectInput = {
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties: {
        from: 'typed',
        mass,
        centreOfGravity: centre,
        inertia: { xx: inertia[0], yy: inertia[1], zz: inertia[2] },
      },
      duty: { runningSpeed: 100 },
    },
    sources: [{ kind: 'unbalance', id: 'rotor', amount: { by: 'unbalance', unbalance: 0.01 } }],
    mounting: {
      types: [{ id: 'spring', stiffness: [2e5, 2e5, 3e5], lossFactor: 0.1, ...type }],
      placed: places.map((position, index) => ({
        id: `m${index + 1}`,
        name: `M${index + 1}`,
        type: 'spring',
        position,
        ...mounts[index],
      })),
    },
    ...more,
  }
  return readProject(input)
}
