import type { Project } from '../../core/project/project.ts'

/**
 * The same passages in another time: ramps and tables are stretched, and under torque the inertia is,
 * since inertia times acceleration is the torque.
 */
export function withDuration(project: Project, factor: number): Project {
  const runUp = structuredClone(project.runUp)
  for (const { law } of [runUp.up, runUp.down]) {
    switch (law.by) {
      case 'ramp':
        if (law.time !== null) law.time *= factor
        break
      case 'torque':
        if (law.inertia !== null) law.inertia *= factor
        break
      case 'table':
        for (const entry of law.entries) entry.time *= factor
    }
  }
  return { ...project, runUp }
}
