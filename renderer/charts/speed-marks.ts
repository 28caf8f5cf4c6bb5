import { severityScales } from '../../core/criteria/severity.ts'
import type { Project } from '../../core/project/project.ts'
import type { Requirement, SpeedSpan } from '../../core/project/requirements.ts'
import type { Evaluation, Mode } from '../../core/results.ts'
import { formatPlain, formatQuantity } from '../../core/units/format.ts'
import { operatingRange, spanSpeeds } from '../../core/verdict/span.ts'
import type { ChartAxis, ChartBand, ChartLimit, ChartMark } from './chart-types.ts'

/** The horizontal axis of everything drawn against shaft speed. */
export const SPEED_AXIS: ChartAxis = { title: 'Shaft speed', dimension: 'shaftSpeed' }

/** Half the width of the hatch that marks a limit at one speed alone, as a share of the axis. */
const SINGLE_SPEED_WIDTH = 0.025
const TOP_FACTOR = 1.25

/** Where an order meets a natural frequency. */
export interface Crossing {
  readonly mode: Mode
  readonly order: number
  /** [rad/s] */
  readonly speed: number
}

/** Highest speed on the charts [rad/s]; null while the project names no speed. */
export function topSpeed(project: Project, evaluation: Evaluation | null): number | null {
  const computed = evaluation?.response?.sweep.speed.at(-1)
  if (computed !== undefined) return computed
  const operating = operatingRange(project)
  return project.machine.duty.chartSpeed ?? (operating ? operating[1] * TOP_FACTOR : null)
}

/** The modes of the machine as it stands: with its absorbers where there are any. */
export function standingModes(evaluation: Evaluation | null): readonly Mode[] {
  return evaluation?.modesWithAbsorbers ?? evaluation?.modes ?? []
}

/** Crossings up to a speed, slowest first. */
export function crossingsUpTo(modes: readonly Mode[], top: number): readonly Crossing[] {
  return modes
    .flatMap((mode) => mode.crossings.map(({ order, speed }) => ({ mode, order, speed })))
    .filter((crossing) => crossing.speed <= top)
    .toSorted((a, b) => a.speed - b.speed)
}

/** `1× heave`. */
export function crossingName(crossing: Crossing): string {
  return `${formatPlain(crossing.order)}× ${crossing.mode.name}`
}

/** Running speed and crossings as marks of a chart. */
export function speedMarks(project: Project, evaluation: Evaluation | null): readonly ChartMark[] {
  const running = project.machine.duty.runningSpeed
  const top = topSpeed(project, evaluation) ?? 0
  const marks = crossingsUpTo(standingModes(evaluation), top).map((crossing): ChartMark => ({
    id: `crossing-${crossing.mode.number}-${crossing.order}`,
    x: crossing.speed,
    label: crossingName(crossing),
    role: 'crossing',
  }))
  if (running === null) return marks
  const label = `running ${formatQuantity(running, 'shaftSpeed', project.units)}`
  return [{ id: 'running', x: running, label, role: 'running' }, ...marks]
}

/** The operating range as a band; none where the machine has one speed. */
export function operatingBand(project: Project): readonly ChartBand[] {
  const range = operatingRange(project)
  if (range === null || range[0] === range[1]) return []
  return [{ id: 'operating', from: range[0], to: range[1], label: 'operating range', role: 'range' }]
}

/** Ends of a limit on the speed axis; one speed gets a little width, so that its hatch is seen. */
function spanEnds(project: Project, span: SpeedSpan, speed: Float64Array): { from?: number; to?: number } {
  if (span === 'chart') return {}
  const ends = spanSpeeds(project, span, speed)
  if (ends === null) return {}
  const width = (speed.at(-1) ?? 0) * SINGLE_SPEED_WIDTH
  return ends[1] - ends[0] < 2 * width
    ? { from: (ends[0] + ends[1]) / 2 - width, to: (ends[0] + ends[1]) / 2 + width }
    : { from: ends[0], to: ends[1] }
}

/** Which chart a limit is drawn on. */
export type LimitPlace =
  | { readonly on: 'forceRatio' }
  | { readonly on: 'isolation' }
  | { readonly on: 'supportForce' }
  | { readonly on: 'mountForces' }
  | { readonly on: 'velocity'; readonly point: string }
  | { readonly on: 'stroke'; readonly absorber: string }

/** Limits of the enabled requirements that belong on a chart. */
export function speedLimits(
  project: Project,
  evaluation: Evaluation,
  place: LimitPlace,
): readonly ChartLimit[] {
  const speed = evaluation.response?.sweep.speed ?? new Float64Array()
  return project.requirements.flatMap((requirement) => {
    if (!requirement.enabled || !belongs(requirement, place)) return []
    const limit = evaluation.verdicts.find((verdict) => verdict.requirement === requirement.id)?.limit
    if (limit === null || limit === undefined || !('speeds' in requirement)) return []
    const ends = spanEnds(project, requirement.speeds, speed)
    return [{ id: requirement.id, ...limitLine(place, limit, project.units), ...ends }]
  })
}

function limitLine(place: LimitPlace, limit: number, units: Project['units']) {
  switch (place.on) {
    case 'forceRatio':
      // isolation is asked for as 1 - force ratio
      return { y: 1 - limit, label: `limit ${formatPlain(1 - limit, 3)}`, forbidden: 'above' as const }
    case 'isolation':
      return {
        y: limit,
        label: `limit ${formatQuantity(limit, 'share', units)}`,
        forbidden: 'below' as const,
      }
    case 'supportForce':
    case 'mountForces':
      return {
        y: limit,
        label: `limit ${formatQuantity(limit, 'force', units)}`,
        forbidden: 'above' as const,
      }
    case 'velocity':
      return {
        y: limit,
        label: `limit ${formatQuantity(limit, 'velocity', units)}`,
        forbidden: 'above' as const,
      }
    case 'stroke':
      return {
        y: limit,
        label: `limit ${formatQuantity(limit, 'deflection', units)}`,
        forbidden: 'above' as const,
      }
  }
}

function belongs(requirement: Requirement, place: LimitPlace): boolean {
  switch (requirement.kind) {
    case 'isolation':
      return place.on === 'forceRatio' || place.on === 'isolation'
    case 'transmittedForce':
      return place.on === (requirement.place === 'support' ? 'supportForce' : 'mountForces')
    case 'vibrationVelocity':
      return place.on === 'velocity' && requirement.point === place.point
    case 'absorberStroke':
      return place.on === 'stroke' && (requirement.absorber ?? place.absorber) === place.absorber
    case 'modeSeparation':
    case 'mountLoad':
    case 'mountDeflection':
    case 'runUpMotion':
    case 'runUpForce':
      return false
  }
}

/** Zone boundaries of the severity scale by which a point is judged, other than the limit itself. */
export function zoneLines(project: Project, point: string): readonly ChartLimit[] {
  const judged = project.requirements.find(
    (requirement) =>
      requirement.kind === 'vibrationVelocity' && requirement.point === point && requirement.scale !== 'own',
  )
  if (judged?.kind !== 'vibrationVelocity') return []
  const classes = severityScales.find((scale) => scale.id === judged.scale)?.classes
  const zones = classes?.find((candidate) => candidate.id === judged.machineClass)?.zones ?? []
  return zones
    .filter(({ zone }) => zone !== judged.zone)
    .map(({ zone, limit }) => ({
      id: `zone-${zone}`,
      y: limit,
      label: `${zone} up to ${formatQuantity(limit, 'velocity', project.units)}`,
      forbidden: 'none' as const,
    }))
}
