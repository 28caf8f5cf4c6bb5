import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'

export interface SingleFreedom {
  /** [kg] */
  readonly mass: number
  /** vertical stiffness in all [N/m] */
  readonly stiffness: number
  /** vertical viscous coefficient in all [N s/m] */
  readonly viscous?: number
  readonly lossFactor?: number
  readonly source: { readonly force: number } | { readonly unbalance: number }
  /** [rad/s]; the first is the running speed */
  readonly speeds: readonly number[]
}

/**
 * One vertical freedom as a project: four equal mounts at the corners of a square around and level
 * with the centre of gravity, so that heave is free of every other motion; stiffer sideways, so that
 * heave keeps a frequency of its own.
 */
export function singleFreedomProject(given: SingleFreedom): Project {
  const { mass, stiffness, viscous = 0, lossFactor = 0, source, speeds } = given
  const input: ProjectInput = {
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties: { from: 'typed', mass, inertia: { xx: mass / 4, yy: mass / 3, zz: mass / 2 } },
      duty: { runningSpeed: speeds[0] ?? null, furtherSpeeds: speeds.slice(1) },
      points: [{ id: 'centre', position: [0, 0, 0] }],
    },
    sources: [
      'force' in source
        ? {
            kind: 'harmonic',
            id: 'source',
            load: { kind: 'force', direction: [0, 0, 1], amplitude: source.force },
          }
        : { kind: 'unbalance', id: 'source', amount: { by: 'unbalance', unbalance: source.unbalance } },
    ],
    mounting: {
      types: [
        {
          id: 'corner',
          stiffness: [stiffness / 2, (3 * stiffness) / 4, stiffness / 4],
          viscous: [0, 0, viscous / 4],
          lossFactor,
        },
      ],
      placed: [
        { id: 'M1', type: 'corner', position: [1, 1, 0] },
        { id: 'M2', type: 'corner', position: [1, -1, 0] },
        { id: 'M3', type: 'corner', position: [-1, 1, 0] },
        { id: 'M4', type: 'corner', position: [-1, -1, 0] },
      ],
    },
  }
  return readProject(input)
}
