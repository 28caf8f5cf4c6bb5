import type { Project } from '../../project/project.ts'
import type { RunUpPass, RunUpPeak, RunUpPeaks, RunUpResult } from '../../results.ts'
import type { Dimension } from '../../units/dimensions.ts'

export type PeakDirection = keyof RunUpPeaks

export interface PeakRow {
  readonly id: string
  readonly place: string
  /** null where that passage is not computed */
  readonly up: RunUpPeak | null
  readonly down: RunUpPeak | null
}

export interface PeakGroup {
  readonly id: 'points' | 'travel' | 'force' | 'support' | 'absorbers'
  readonly title: string
  readonly dimension: Dimension
  readonly rows: readonly PeakRow[]
}

/** Mounts that move alike by symmetry differ by rounding alone: the first of them is named. */
const ALIKE = 1e-9

/** The largest peak of a group and where it stands. */
export interface Governing {
  readonly row: PeakRow
  readonly direction: 'up' | 'down'
  readonly peak: RunUpPeak
}

type Pick = (pass: RunUpPass) => readonly { readonly id: string; readonly peak: RunUpPeak }[]

/** Every peak of run-up and coast-down, side by side; groups without a row are left out. */
export function peakGroups(
  project: Project,
  runUp: RunUpResult,
  direction: PeakDirection = 'resultant',
): readonly PeakGroup[] {
  const group = (
    id: PeakGroup['id'],
    title: string,
    dimension: Dimension,
    nameOf: (id: string) => string,
    pick: Pick,
  ): PeakGroup[] => {
    const up = runUp.up ? pick(runUp.up) : []
    const down = runUp.down ? pick(runUp.down) : []
    const ids = [...new Set([...up, ...down].map((entry) => entry.id))]
    const of = (side: ReturnType<Pick>, wanted: string) =>
      side.find((entry) => entry.id === wanted)?.peak ?? null
    const rows = ids.map((row) => ({ id: row, place: nameOf(row), up: of(up, row), down: of(down, row) }))
    return rows.length === 0 ? [] : [{ id, title, dimension, rows }]
  }
  const named =
    (list: readonly { readonly id: string; readonly name: string }[], noun: string) => (id: string) => {
      const at = list.findIndex((entry) => entry.id === id)
      return list[at]?.name || (at < 0 ? id : `${noun} ${at + 1}`)
    }
  const mount = named(project.mounting.placed, 'mount')
  return [
    ...group('points', 'Displacement', 'deflection', named(project.machine.points, 'point'), (pass) =>
      pass.points.map(({ id, peaks }) => ({ id, peak: peaks[direction] })),
    ),
    ...group('travel', 'Displacement across the mounts', 'deflection', mount, (pass) =>
      pass.mounts.map(({ id, travel }) => ({ id, peak: travel[direction] })),
    ),
    ...group('force', 'Force on the support', 'force', mount, (pass) =>
      pass.mounts.map(({ id, force }) => ({ id, peak: force[direction] })),
    ),
    ...group(
      'support',
      'Force into the whole support',
      'force',
      () => 'all mounts together',
      (pass) => [{ id: 'support', peak: pass.support[direction] }],
    ),
    ...group(
      'absorbers',
      'Travel of absorbers along their line',
      'deflection',
      named(project.absorbers, 'absorber'),
      (pass) => pass.absorbers.map(({ id, stroke }) => ({ id, peak: stroke })),
    ),
  ]
}

/** Null where nothing moves. */
export function governingOf(group: PeakGroup): Governing | null {
  let worst: Governing | null = null
  for (const row of group.rows) {
    for (const direction of ['up', 'down'] as const) {
      const peak = row[direction]
      if (peak && peak.value > (worst?.peak.value ?? 0) * (1 + ALIKE)) worst = { row, direction, peak }
    }
  }
  return worst
}
