import { severityLimit, severityScales } from '../criteria/severity.ts'
import type { Project } from '../project/project.ts'
import type { SpeedSpan } from '../project/requirements.ts'
import type { Verdict } from '../results.ts'
import { absorbersInPlace, mountName, type Of } from './names.ts'
import { highestWithin, spanSpeeds, SPAN_WORDS, type Extreme } from './span.ts'
import { unboundedPeak } from './unbounded.ts'
import { reasonFor, unknownVerdict, verdictOf, type Computed } from './verdict.ts'

interface Placed extends Extreme {
  readonly place: string
  /** why the true peak has no bound; null where the value is the peak */
  readonly unbounded: string | null
}

/** Largest value over several curves within the span of a requirement, with the curve's name. */
function worstCurve(
  project: Project,
  computed: Computed,
  span: SpeedSpan,
  curves: readonly (readonly [place: string, curve: Float64Array])[],
): Placed | string {
  const sweep = computed.response?.sweep
  if (!sweep) return reasonFor(computed, 'The response is not known.')
  const speeds = spanSpeeds(project, span, sweep.speed)
  if (speeds === null) return 'Give the speed on the Machine page.'
  const unbounded = unboundedPeak(
    computed.modesWithAbsorbers ?? computed.modes ?? [],
    sweep,
    curves.map(([, curve]) => curve),
    speeds,
  )
  let worst: Placed | null = null
  for (const [place, curve] of curves) {
    const extreme = highestWithin(sweep.speed, curve, speeds)
    if (extreme !== null && (worst === null || extreme.value > worst.value)) {
      worst = { ...extreme, place, unbounded }
    }
  }
  return worst ?? unbounded ?? 'The speeds asked for lie beyond the chart.'
}

export function judgeIsolation(requirement: Of<'isolation'>, project: Project, computed: Computed): Verdict {
  const subject = {
    title: `Isolation ${SPAN_WORDS[requirement.speeds]}`,
    dimension: 'share',
    keep: 'above',
    limit: requirement.limit,
  } as const
  const ratio = computed.response?.sweep.forceRatio
  if (ratio === null)
    return unknownVerdict(requirement, subject, 'Nothing excites the machine: add an exciting force.')
  const worst = worstCurve(project, computed, requirement.speeds, ratio ? [['support', ratio]] : [])
  if (typeof worst === 'string') return unknownVerdict(requirement, subject, worst)
  return verdictOf(requirement, subject, { ...worst, value: 1 - worst.value, place: '' })
}

export function judgeTransmittedForce(
  requirement: Of<'transmittedForce'>,
  project: Project,
  computed: Computed,
): Verdict {
  const single = requirement.place === 'worstMount'
  const subject = {
    title: `Force ${single ? 'through one mount' : 'into the support'} ${SPAN_WORDS[requirement.speeds]}`,
    dimension: 'force',
    keep: 'below',
    limit: requirement.limit,
  } as const
  const sweep = computed.response?.sweep
  const mounts = project.mounting.placed.map((mount) => mountName(project, mount.id))
  const curves = single
    ? (sweep?.mountForces ?? []).map((curve, index) => [mounts[index] ?? '', curve] as const)
    : sweep
      ? ([['support', sweep.supportForce]] as const)
      : []
  const worst = worstCurve(project, computed, requirement.speeds, curves)
  if (typeof worst === 'string') return unknownVerdict(requirement, subject, worst)
  return verdictOf(requirement, subject, {
    ...worst,
    place: single ? worst.place : '',
  })
}

const AXES = ['x', 'y', 'z'] as const

export function judgeVelocity(
  requirement: Of<'vibrationVelocity'>,
  project: Project,
  computed: Computed,
): Verdict {
  const index = project.machine.points.findIndex((point) => point.id === requirement.point)
  const point = project.machine.points[index]
  const { limit, source } = velocityLimit(requirement)
  const subject = {
    title: `Vibration velocity (RMS) of ${point?.name || 'a point'} ${SPAN_WORDS[requirement.speeds]}`,
    dimension: 'velocity',
    keep: 'below',
    limit,
    source,
  } as const
  if (!point) return unknownVerdict(requirement, subject, 'Choose a point of the machine.')
  const curves = AXES.flatMap((axis, direction) => {
    const curve = computed.response?.sweep.pointVelocity[index]?.[direction]
    return curve && (requirement.direction === 'worst' || requirement.direction === axis)
      ? [[`${point.name || point.id}, ${axis}`, curve] as const]
      : []
  })
  const worst = worstCurve(project, computed, requirement.speeds, curves)
  if (typeof worst === 'string') return unknownVerdict(requirement, subject, worst)
  return verdictOf(requirement, subject, worst)
}

function velocityLimit(requirement: Of<'vibrationVelocity'>): { limit: number | null; source: string } {
  if (requirement.scale === 'own') return { limit: requirement.limit, source: '' }
  const scale = severityScales.find((candidate) => candidate.id === requirement.scale)
  const machineClass = scale?.classes.find((candidate) => candidate.id === requirement.machineClass)
  const limit = severityLimit(requirement.scale, requirement.machineClass, requirement.zone)
  return {
    limit,
    source:
      scale && machineClass
        ? `${scale.source}, ${machineClass.name}, limit of ${requirement.zone} (table ${scale.provenance}: check the standard; every computed order counts, also outside its frequency band)`
        : '',
  }
}

export function judgeAbsorberStroke(
  requirement: Of<'absorberStroke'>,
  project: Project,
  computed: Computed,
): Verdict {
  const inPlace = absorbersInPlace(project, computed)
  const subject = {
    title: `Travel of the absorber ${SPAN_WORDS[requirement.speeds]}`,
    dimension: 'deflection',
    keep: 'below',
    limit: requirement.limit,
  } as const
  let governing: { worst: Placed; limit: number | null } | null = null
  for (const [index, absorber] of inPlace.entries()) {
    if (requirement.absorber !== null && requirement.absorber !== absorber.id) continue
    const curve = computed.response?.sweep.strokes[index]
    const worst = worstCurve(
      project,
      computed,
      requirement.speeds,
      curve ? [[absorber.name || absorber.id, curve]] : [],
    )
    if (typeof worst === 'string') return unknownVerdict(requirement, subject, worst)
    const limit = requirement.limit ?? absorber.strokeLimit
    if (governing === null || urgency(worst, limit) > urgency(governing.worst, governing.limit)) {
      governing = { worst, limit }
    }
  }
  if (governing === null) {
    return unknownVerdict(requirement, subject, reasonFor(computed, 'No absorber stands on the machine.'))
  }
  return verdictOf(requirement, { ...subject, limit: governing.limit }, governing.worst)
}

/** Orders absorbers by what must be said first: one beyond its limit, one that is not known, the rest. */
function urgency({ value, unbounded }: Placed, limit: number | null): number {
  const notKnown = 1 + Number.EPSILON
  if (limit === null) return notKnown
  const share = value / limit
  return unbounded === null ? share : Math.max(notKnown, share)
}
