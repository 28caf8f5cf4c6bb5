import type { Project } from '../project/project.ts'
import type { Requirement } from '../project/requirements.ts'
import type { RunUpScope } from './run-up.ts'

const DIRECTIONS = ['x', 'y', 'z', 'resultant'] as const

type RunUpRequirement = Extract<Requirement, { kind: 'runUpMotion' | 'runUpForce' }>

/** Trials and maps need no more digits than this: a share of the peak. */
const TRIAL_TOLERANCE = 1e-3

/** No more of a run-up than the enabled requirements judge; null where none does. */
export function judgedOf(project: Project): RunUpScope | null {
  const judging = project.requirements.filter(
    (requirement): requirement is RunUpRequirement =>
      requirement.enabled && (requirement.kind === 'runUpMotion' || requirement.kind === 'runUpForce'),
  )
  if (judging.length === 0) return null
  const motions = judging.filter((requirement) => requirement.kind === 'runUpMotion')
  return {
    envelope: false,
    points: new Set(
      motions.flatMap(({ place, point }) => (place === 'point' && point !== null ? [point] : [])),
    ),
    force: judging.some(({ kind }) => kind === 'runUpForce'),
    travel: motions.some(({ place }) => place === 'mounts'),
    strokes: false,
    up: judging.some(({ during }) => during !== 'down'),
    down: judging.some(({ during }) => during !== 'up'),
    tolerance: TRIAL_TOLERANCE,
    worstOnly: true,
    directions: DIRECTIONS.map((direction) =>
      judging.some((one) => (one.kind === 'runUpMotion' ? one.direction : 'resultant') === direction),
    ),
  }
}
