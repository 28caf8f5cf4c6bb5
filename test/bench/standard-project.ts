import type { Project, ProjectInput } from '../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../core/project/project.ts'
import { readProject } from '../../core/project/read.ts'
import { BENCH_BODY, BENCH_MOUNTS } from './bench-machine.ts'

/** The standard project: eight mounts, three sources, one absorber, requirements that hold. */
export function standardProject(): Project {
  const [[xx, xy, xz], [, yy, yz], [, , zz]] = BENCH_BODY.inertia
  const input: ProjectInput = {
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties: {
        from: 'typed',
        mass: BENCH_BODY.mass,
        centreOfGravity: BENCH_BODY.centre,
        inertia: { xx, yy, zz, xy: -xy, xz: -xz, yz: -yz },
      },
      shaft: { axis: 'x', position: [0, 0, 0.6] },
      duty: { runningSpeed: '1480 rpm', lowestSpeed: '600 rpm', highestSpeed: '1500 rpm' },
      points: [
        { id: 'de', name: 'drive end', position: [0.8, 0, 0.6] },
        { id: 'nde', name: 'far end', position: [-0.7, 0, 0.6] },
      ],
    },
    sources: [
      {
        kind: 'unbalance',
        id: 'rotor',
        amount: { by: 'unbalance', unbalance: 0.02 },
        position: [0.8, 0, 0.6],
      },
      {
        kind: 'harmonic',
        id: 'coupling',
        order: 2,
        load: { kind: 'force', direction: [0, 0, 1], amplitude: 60 },
        dependence: { on: 'speedSquared' },
      },
      {
        kind: 'harmonic',
        id: 'torque',
        order: 0.5,
        load: { kind: 'moment', direction: [1, 0, 0], amplitude: 15 },
      },
    ],
    mounting: {
      types: BENCH_MOUNTS.map((mount, index) => ({
        id: `type ${index + 1}`,
        stiffness: mount.stiffness,
        lossFactor: mount.lossFactor,
        viscous: mount.viscous,
        dynamicRatio: 1.2,
        ratedLoad: 8000,
      })),
      placed: BENCH_MOUNTS.map((mount, index) => ({
        id: `M${index + 1}`,
        type: `type ${index + 1}`,
        position: mount.position,
      })),
    },
    absorbers: [
      {
        id: 'absorber',
        host: { kind: 'mode', mode: 4, position: [1.2, 0.5, 0.1], direction: [0, 0, 1] },
        size: { by: 'ratio', ratio: 0.05 },
        tuning: { by: 'minimax' },
      },
    ],
    requirements: [
      { kind: 'isolation', id: 'isolation', limit: 0.5 },
      { kind: 'vibrationVelocity', id: 'velocity', point: 'de', limit: 0.05, speeds: 'operating' },
      { kind: 'mountLoad', id: 'load' },
      { kind: 'absorberStroke', id: 'stroke', limit: 0.02, speeds: 'operating' },
    ],
  }
  return readProject(input)
}

/** The same with an isolation that it does not reach: every lever is tried then. */
export function failingProject(): Project {
  const project = standardProject()
  return {
    ...project,
    requirements: project.requirements.map((requirement) =>
      requirement.kind === 'isolation' ? { ...requirement, limit: 0.99 } : requirement,
    ),
  }
}
