import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'

/** 240 kg on four equal springs level with the centre of gravity: heave at 31 rad/s, coupled with nothing. */
export const HEAVE = { mass: 240, omega: 31 } as const

export function heavingMachine(
  damping: { readonly viscous?: number; readonly lossFactor?: number },
  more: Partial<ProjectInput> = {},
): Project {
  const stiffness = (HEAVE.mass * HEAVE.omega ** 2) / 4
  const viscous = damping.viscous ?? 0
  return readProject({
    format: 'stillbed-project',
    version: 1,
    machine: {
      massProperties: { from: 'typed', mass: HEAVE.mass, inertia: { xx: 60, yy: 80, zz: 120 } },
      duty: { runningSpeed: 150, lowestSpeed: 100 },
      points: [{ id: 'P', name: 'centre', position: [0, 0, 0] }],
    },
    sources: [{ kind: 'harmonic', id: 'push', load: { kind: 'force', direction: [0, 0, 1], amplitude: 80 } }],
    mounting: {
      types: [
        {
          id: 'spring',
          stiffness: [2 * stiffness, 3 * stiffness, stiffness],
          viscous: [viscous, viscous, viscous],
          lossFactor: damping.lossFactor ?? 0,
          ratedLoad: 900,
          deflectionLimit: 0.03,
        },
      ],
      placed: [
        { id: 'M1', type: 'spring', position: [1, 1, 0] },
        { id: 'M2', type: 'spring', position: [1, -1, 0] },
        { id: 'M3', type: 'spring', position: [-1, 1, 0] },
        { id: 'M4', type: 'spring', position: [-1, -1, 0] },
      ],
    },
    analysis: { gravityStiffness: false },
    runUp: { enabled: true, up: { law: { by: 'ramp', time: 20 }, hold: 1 }, down: { enabled: false } },
    ...more,
  })
}
