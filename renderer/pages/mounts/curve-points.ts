import { curveLaw } from '../../../core/mounts/axial-law.ts'
import type { MountType } from '../../../core/project/mounts.ts'
import type { Project } from '../../../core/project/project.ts'
import type { MountStatics } from '../../../core/statics-results.ts'
import type { ChartMark, ChartSeries } from '../../charts/chart-types.ts'
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
/** Closest that two labels may stand, over the width of the chart. */
const TOLD_APART = 0.12

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

/** The curve as it is computed with and its points, as far as the mounts stand on it. */
export function curveSeries(points: Points, working: readonly MountStatics[]): ChartSeries[] {
  const law = curveLaw(points, 1)
  const [from, to] = span(points, working)
  const x = Float64Array.from({ length: SAMPLES + 1 }, (_, step) => from + ((to - from) * step) / SAMPLES)
  return [
    {
      id: 'curve',
      label: 'computed with',
      x,
      y: Float64Array.from(x, (deflection) => law.at(deflection).force),
      role: 'main',
      dash: 0,
    },
    {
      id: 'points',
      label: 'points given',
      x: Float64Array.from(points, ([deflection]) => deflection),
      y: Float64Array.from(points, ([, load]) => load),
      role: 'points',
      dash: 1,
    },
  ]
}

/** Marks where the mounts stand on the curve; those too close to be told apart share one. */
export function workingMarks(
  points: Points,
  working: readonly MountStatics[],
  names: ReadonlyMap<string, string>,
): ChartMark[] {
  const [from, to] = span(points, working)
  const groups: { readonly at: number; readonly names: string[] }[] = []
  for (const { id, deflection } of working.toSorted((a, b) => a.deflection - b.deflection)) {
    const name = names.get(id) ?? id
    const last = groups.at(-1)
    if (last && deflection - last.at < TOLD_APART * (to - from)) last.names.push(name)
    else groups.push({ at: deflection, names: [name] })
  }
  return groups.map(({ at, names: own }) => ({
    id: own.join(),
    x: at,
    label: own.length > 3 ? `${own.length} mounts` : own.join(', '),
    role: 'crossing',
  }))
}

function span(points: Points, working: readonly MountStatics[]): readonly [from: number, to: number] {
  const at = [...points.map(([deflection]) => deflection), ...working.map(({ deflection }) => deflection)]
  return [Math.min(0, ...at), Math.max(...at)]
}

function tidy(value: number): number {
  return Number(value.toPrecision(12))
}
