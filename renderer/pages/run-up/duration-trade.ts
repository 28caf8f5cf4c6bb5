import { PASS_NAMES } from '../../../core/report/sections/inputs-run-up.ts'
import type { Project } from '../../../core/project/project.ts'
import { governingOf, peakGroups, type PeakGroup } from '../../../core/report/sections/run-up-peaks.ts'
import type { RunUpResult } from '../../../core/results.ts'
import type { ChartLimit, ChartSeries } from '../../charts/chart-types.ts'
import { formatQuantity } from '../../../core/units/format.ts'

/** Times the given duration: from an eighth to eight times, the given one first, then outwards. */
export const FACTORS: readonly number[] = [0, 1, -1, 2, -2, 3, -3, 4, -4, 5, -5, 6, -6].map(
  (step) => 2 ** (step / 2),
)

export interface Trial {
  readonly factor: number
  readonly runUp: RunUpResult
}

/** The largest peak of a group against the duration, one curve for each passage. */
export function tradeSeries(
  project: Project,
  trials: readonly Trial[],
  id: PeakGroup['id'],
): readonly ChartSeries[] {
  const rising = trials.toSorted((a, b) => a.factor - b.factor)
  return (['up', 'down'] as const).flatMap((side, dash): readonly ChartSeries[] => {
    const peaks = rising.map(({ runUp }) => {
      const alone = { up: null, down: null, [side]: runUp[side] }
      const group = peakGroups(project, alone).find((candidate) => candidate.id === id)
      return group ? (governingOf(group)?.peak.value ?? null) : null
    })
    if (peaks.length === 0 || peaks.includes(null)) return []
    return [
      {
        id: `trade-${side}`,
        label: PASS_NAMES[side].toLowerCase(),
        x: Float64Array.from(rising, ({ factor }) => factor),
        y: Float64Array.from(peaks, (peak) => peak ?? 0),
        role: 'main',
        dash,
      },
    ]
  })
}

/** Limits that hold for every place of the group. */
export function tradeLimits(project: Project, id: PeakGroup['id']): readonly ChartLimit[] {
  return project.requirements.flatMap((requirement) => {
    if (!requirement.enabled) return []
    const force = id === 'force' && requirement.kind === 'runUpForce'
    const travel =
      id === 'travel' &&
      requirement.kind === 'runUpMotion' &&
      requirement.place === 'mounts' &&
      requirement.direction === 'resultant'
    if ((!force && !travel) || requirement.limit === null) return []
    const label = `limit ${formatQuantity(requirement.limit, force ? 'force' : 'deflection', project.units)}`
    return [{ id: requirement.id, y: requirement.limit, label, forbidden: 'above' as const }]
  })
}
