import type { Project } from '../../core/project/project.ts'
import { readProject } from '../../core/project/read.ts'

/** A small complete machine; the values are invented for these tests. */
export function sampleProject(name = 'Sieve drive'): Project {
  return readProject({
    format: 'stillbed-project',
    version: 1,
    job: { name, reference: 'T-1', site: 'Test bay', notes: 'Übergabe mit Čapek', tags: ['sieve'] },
    machine: {
      description: 'Vibrating sieve with flange motor',
      massProperties: {
        from: 'typed',
        mass: '250 kg',
        centreOfGravity: [0, 0, '300 mm'],
        inertia: { xx: 12, yy: 18, zz: 20 },
      },
      duty: { runningSpeed: '1480 rpm' },
      points: [{ id: 'p1', name: 'bearing', position: [0.2, 0, 0.4] }],
    },
    sources: [{ kind: 'unbalance', id: 's1', amount: { by: 'unbalance', unbalance: 0.002 } }],
    mounting: {
      types: [
        { id: 't1', name: 'Coil 40', kind: 'steel spring', stiffness: [8e4, 8e4, 1.2e5], lossFactor: 0.02 },
      ],
      placed: [
        [0.4, 0.3],
        [0.4, -0.3],
        [-0.4, 0.3],
        [-0.4, -0.3],
      ].map(([x, y], index) => ({ id: `m${index}`, name: `M${index + 1}`, type: 't1', position: [x, y, 0] })),
    },
  })
}

/** Another name and nothing else. */
export function renamed(project: Project, name: string): Project {
  return { ...project, job: { ...project.job, name } }
}
