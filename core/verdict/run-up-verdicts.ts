import type { Project } from '../project/project.ts'
import type { RunUpPass, RunUpPeak, Verdict } from '../results.ts'
import { mountName, type Of } from './names.ts'
import { reasonFor, unknownVerdict, verdictOf, type Computed } from './verdict.ts'

type During = Of<'runUpForce'>['during']

const DURING: Readonly<Record<During, string>> = {
  both: 'during run-up and coast-down',
  up: 'during run-up',
  down: 'during coast-down',
}

/** Mounts that move alike by symmetry differ by rounding alone: the first of them is named. */
const ALIKE = 1e-9

interface Candidate {
  readonly peak: RunUpPeak
  readonly place: string
}

/** Largest displacement across the mounts or of a point against a clearance. */
export function judgeRunUpMotion(
  requirement: Of<'runUpMotion'>,
  project: Project,
  computed: Computed,
): Verdict {
  const point = project.machine.points.find(({ id }) => id === requirement.point)
  const place = requirement.place === 'mounts' ? 'across the mounts' : `of ${point?.name || 'a point'}`
  const subject = {
    title: `Displacement ${place} ${DURING[requirement.during]}`,
    dimension: 'deflection',
    keep: 'below',
    limit: requirement.limit,
  } as const
  if (requirement.place === 'point' && !point) {
    return unknownVerdict(requirement, subject, 'Choose a point of the machine.')
  }
  const { direction } = requirement
  const along = direction === 'resultant' ? '' : `, ${direction}`
  const worst = worstOf(project, computed, requirement.during, (pass) =>
    requirement.place === 'mounts'
      ? pass.mounts.map(({ id, travel }) => ({
          peak: travel[direction],
          place: `${mountName(project, id)}${along}`,
        }))
      : pass.points.flatMap(({ id, peaks }) =>
          id === requirement.point ? [{ peak: peaks[direction], place: `${point?.name || id}${along}` }] : [],
        ),
  )
  if (typeof worst === 'string') return unknownVerdict(requirement, subject, worst)
  return verdictOf(requirement, subject, worst)
}

/** Largest dynamic force of one mount on its support. */
export function judgeRunUpForce(
  requirement: Of<'runUpForce'>,
  project: Project,
  computed: Computed,
): Verdict {
  const subject = {
    title: `Force through one mount ${DURING[requirement.during]}`,
    dimension: 'force',
    keep: 'below',
    limit: requirement.limit,
  } as const
  const worst = worstOf(project, computed, requirement.during, (pass) =>
    pass.mounts.map(({ id, force }) => ({ peak: force.resultant, place: mountName(project, id) })),
  )
  if (typeof worst === 'string') return unknownVerdict(requirement, subject, worst)
  return verdictOf(requirement, subject, worst)
}

const NEITHER = 'Neither run-up nor coast-down is switched on.'

interface Worst {
  readonly value: number
  readonly speed: number
  readonly place: string
  /** why it may be less than the true peak */
  readonly unbounded?: string | null
}

/** The largest peak over the passages asked for, or why it is not known. */
function worstOf(
  project: Project,
  computed: Computed,
  during: During,
  candidates: (pass: RunUpPass) => readonly Candidate[],
): Worst | string {
  if (!project.runUp.enabled) return 'Switch the run-up on and say how the shaft comes to speed.'
  if (computed.runUp === null) return reasonFor(computed, 'The run-up is not known.')
  let worst: Worst | null = null
  let unbounded: string | null = null
  for (const [direction, words] of [
    ['up', 'run-up'],
    ['down', 'coast-down'],
  ] as const) {
    if (during !== 'both' && during !== direction) continue
    if (during === 'both' && !project.runUp[direction].enabled) continue
    const pass = computed.runUp[direction]
    if (pass === null) {
      const problem = computed.problems.find(({ field }) => field.startsWith(`runUp.${direction}`))
      return problem ? `Not known yet: ${problem.message}` : `The ${words} is left out: switch it on.`
    }
    if (!pass.converged)
      unbounded = `Not every peak of the ${words} was found, so that the largest is not known.`
    for (const { peak, place } of candidates(pass)) {
      if (worst !== null && peak.value <= worst.value * (1 + ALIKE)) continue
      worst = { value: peak.value, speed: peak.speed, place: `${place}, ${words}` }
    }
  }
  return worst === null ? NEITHER : { ...worst, unbounded }
}
