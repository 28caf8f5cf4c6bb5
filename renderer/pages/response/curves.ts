import type { Project } from '../../../core/project/project.ts'
import type { Evaluation, Mode, Sweep } from '../../../core/results.ts'
import { formatPlain } from '../../../core/units/format.ts'
import { mountName } from '../../../core/verdict/names.ts'
import type { ChartSeries } from '../../charts/chart-types.ts'
import { crossingsUpTo } from '../../charts/speed-marks.ts'

const MOUNTS_AT_FIRST = 6

/** One curve of the sweep, and the same without absorbers where there are any. */
export function withAndWithout(
  evaluation: Evaluation,
  name: string,
  curve: (sweep: Sweep) => Float64Array | null,
): readonly ChartSeries[] {
  const response = evaluation.response
  const values = response ? curve(response.sweep) : null
  if (!response || !values) return []
  const bare = response.sweepWithoutAbsorbers
  const bareValues = bare ? curve(bare) : null
  if (!bare || !bareValues) {
    return [{ id: 'main', label: name, x: response.sweep.speed, y: values, role: 'main', dash: 0 }]
  }
  return [
    { id: 'main', label: 'with absorbers', x: response.sweep.speed, y: values, role: 'main', dash: 0 },
    { id: 'without', label: 'without absorbers', x: bare.speed, y: bareValues, role: 'compare', dash: 1 },
  ]
}

/** Isolation efficiency from the force ratio, curve by curve. */
export function asIsolation(curves: readonly ChartSeries[]): readonly ChartSeries[] {
  return curves.map((entry) => ({ ...entry, y: entry.y.map((ratio) => 1 - ratio) }))
}

/**
 * Force through each mount. Of many mounts the hardest loaded are drawn at first, and the key brings
 * in the others; with absorbers in place the hardest loaded one is drawn without them too.
 */
export function mountCurves(
  project: Project,
  sweep: Sweep,
  bare: Sweep | null = null,
): readonly ChartSeries[] {
  const ranked = sweep.mountForces
    .map((force, index) => ({ peak: peakOf(force), index }))
    .toSorted((a, b) => b.peak - a.peak || a.index - b.index)
  const drawn = new Set(ranked.slice(0, MOUNTS_AT_FIRST).map(({ index }) => index))
  const nameOf = (index: number) => {
    const mount = project.mounting.placed[index]
    return mount ? mountName(project, mount.id) : `mount ${index + 1}`
  }
  const curves = sweep.mountForces.map((force, index): ChartSeries => ({
    id: `mount-${project.mounting.placed[index]?.id ?? index}`,
    label: nameOf(index),
    x: sweep.speed,
    y: force,
    role: 'main',
    dash: index,
    hidden: !drawn.has(index),
  }))
  const hardest = ranked[0]?.index ?? 0
  const without = bare?.mountForces[hardest]
  if (!bare || !without) return curves
  const compare: ChartSeries = {
    id: 'hardest-without',
    label: `${nameOf(hardest)} without absorbers`,
    x: bare.speed,
    y: without,
    role: 'compare',
    dash: MOUNTS_AT_FIRST + 1,
  }
  return [...curves, compare]
}

function peakOf(curve: Float64Array): number {
  return curve.reduce((most, value) => Math.max(most, value), 0)
}

/** Velocity of one point in the three directions, and without absorbers in the direction that moves most. */
export function velocityCurves(evaluation: Evaluation, index: number): readonly ChartSeries[] {
  const response = evaluation.response
  const curves = response?.sweep.pointVelocity[index]
  if (!response || !curves) return []
  const axes = ['x', 'y', 'z'] as const
  const main = axes.map((axis, direction): ChartSeries => ({
    id: `velocity-${axis}`,
    label: axis,
    x: response.sweep.speed,
    y: curves[direction] ?? new Float64Array(response.sweep.speed.length),
    role: 'main',
    dash: direction,
  }))
  const bare = response.sweepWithoutAbsorbers
  const bareCurves = bare?.pointVelocity[index]
  if (!bare || !bareCurves) return main
  const most = bareCurves
    .map(peakOf)
    .reduce((best, value, at, all) => (value > (all[best] ?? 0) ? at : best), 0)
  const compare = axes.map((axis, direction): ChartSeries => ({
    id: `velocity-${axis}-without`,
    label: `${axis} without absorbers`,
    x: bare.speed,
    y: bareCurves[direction] ?? new Float64Array(bare.speed.length),
    role: 'compare',
    dash: direction + 3,
    hidden: direction !== most,
  }))
  return [...main, ...compare]
}

/**
 * Orders as rays over shaft speed, and the points at which they cross the natural frequencies.
 * @param top highest speed [rad/s]
 */
export function orderCurves(modes: readonly Mode[], top: number): readonly ChartSeries[] {
  const ends = Float64Array.of(0, top)
  const orders = [...new Set(modes.flatMap((mode) => mode.crossings.map(({ order }) => order)))].toSorted(
    (a, b) => a - b,
  )
  const rays = orders.map((order, index): ChartSeries => ({
    id: `order-${order}`,
    label: `order ${formatPlain(order)}×`,
    x: ends,
    y: Float64Array.of(0, (order * top) / (2 * Math.PI)),
    role: 'main',
    dash: index,
  }))
  const crossings = crossingsUpTo(modes, top)
  if (crossings.length === 0) return rays
  const points: ChartSeries = {
    id: 'crossings',
    label: 'crossings',
    x: Float64Array.from(crossings, ({ speed }) => speed),
    y: Float64Array.from(crossings, ({ mode }) => mode.frequency),
    role: 'points',
    dash: 0,
  }
  return [...rays, points]
}
