import { ordersOf } from '../excitation/project-loads.ts'
import { install } from '../mounts/installation.ts'
import type { MountType } from '../project/mounts.ts'
import type { Project } from '../project/project.ts'
import type { MassSummary } from '../results.ts'
import { modalRatio } from './damping-scale.ts'
import { referenceMode } from './reference-mode.ts'

/** A kind of mount at every place under the machine, as a point of the feasibility map. */
export interface Candidate {
  /** id of the mount type */
  readonly type: string
  /** of the reference mode [Hz]; null, as the ratio, where the machine cannot stand on them */
  readonly frequency: number | null
  readonly ratio: number | null
}

/** @param summary from `evaluate` */
export function candidatePoints(
  project: Project,
  types: readonly MountType[],
  summary: MassSummary,
): readonly Candidate[] {
  const orders = ordersOf(project)
  return types.map((type) => {
    const { observed } = install(withType(project, type), summary, [], orders)
    if (observed === null) return { type: type.id, frequency: null, ratio: null }
    const { index, frequency } = referenceMode(observed)
    return { type: type.id, frequency, ratio: modalRatio(observed, index) }
  })
}

/** The project with one kind of mount at all places. */
export function withType(project: Project, type: MountType): Project {
  const { placed } = project.mounting
  return {
    ...project,
    mounting: {
      ...project.mounting,
      types: [type],
      placed: placed.map((mount) => ({ ...mount, type: type.id })),
    },
  }
}
