import { curveLaw } from '../../../core/mounts/axial-law.ts'
import type { MountType } from '../../../core/project/mounts.ts'
import type { Project } from '../../../core/project/project.ts'
import type { MountStatics } from '../../../core/results.ts'
import type { ChartSeries } from '../../charts/chart-types.ts'
import type { Column } from '../../components/table-columns.ts'

/** A point of a measured curve, as a row of a table. */
export interface CurveRow {
  readonly id: string
  /** [m] */
  readonly deflection: number
  /** [N] */
  readonly load: number
}

type Points = Extract<MountType['law'], { kind: 'curve' }>['points']

/** Points along the drawn curve. */
const SAMPLES = 80

export function curveRows(points: Points): readonly CurveRow[] {
  return points.map(([deflection, load], index) => ({ id: String(index), deflection, load }))
}

export function pointsOf(draft: Project, type: number): Points | null {
  const law = draft.mounting.types[type]?.law
  return law?.kind === 'curve' ? law.points : null
}

/** A further point as far beyond the last one as that is from the one before, in place. */
export function addPoint(draft: Project, type: number): void {
  const points = pointsOf(draft, type)
  const last = points?.at(-1)
  if (!points || !last) return
  const [deflection, load] = points.at(-2) ?? [0, 0]
  points.push([tidy(2 * last[0] - deflection), tidy(2 * last[1] - load)])
}

/** @param type index of the mount type */
export function curveColumns(type: number): Column<CurveRow>[] {
  const column = (part: 0 | 1) => ({
    kind: 'quantity' as const,
    path: `[${part}]`,
    set: (draft: Project, index: number, value: number | null) => {
      const point = pointsOf(draft, type)?.[index]
      if (point && value !== null) point[part] = value
    },
  })
  return [
    {
      ...column(0),
      key: 'deflection',
      title: 'Deflection',
      dimension: 'deflection',
      get: (row) => row.deflection,
    },
    { ...column(1), key: 'load', title: 'Load', dimension: 'force', get: (row) => row.load },
  ]
}

/** The curve as it is computed with, its points, and where the mounts stand on it. */
export function curveSeries(points: Points, working: readonly MountStatics[]): ChartSeries[] {
  const law = curveLaw(points, 1)
  const stands = working.map(({ deflection }) => deflection)
  const measured = points.map(([deflection]) => deflection)
  const from = Math.min(0, ...measured, ...stands)
  const to = Math.max(...measured, ...stands)
  const x = Float64Array.from({ length: SAMPLES + 1 }, (_, step) => from + ((to - from) * step) / SAMPLES)
  const onCurve = (at: Float64Array) => Float64Array.from(at, (deflection) => law.at(deflection).force)
  const rising = Float64Array.from(stands).sort()
  return [
    { id: 'curve', label: 'computed with', x, y: onCurve(x), role: 'main', dash: 0 },
    {
      id: 'points',
      label: 'points given',
      x: Float64Array.from(measured),
      y: Float64Array.from(points, ([, load]) => load),
      role: 'points',
      dash: 1,
    },
    ...(rising.length === 0
      ? []
      : [
          {
            id: 'mounts',
            label: 'mounts at rest',
            x: rising,
            y: onCurve(rising),
            role: 'points' as const,
            dash: 2,
          },
        ]),
  ]
}

function tidy(value: number): number {
  return Number(value.toPrecision(12))
}
