import type { Requirement } from '../project/requirements.ts'
import type { Evaluation, Verdict, VerdictStatus } from '../results.ts'
import type { Dimension } from '../units/dimensions.ts'

/** Closer to the limit than this share of it, a pass is called near: common practice, no source. */
export const NEAR_MARGIN = 0.1

/** All that has been computed about a project, ready to be judged. */
export type Computed = Omit<Evaluation, 'verdicts'>

interface Subject {
  readonly title: string
  readonly dimension: Dimension
  readonly keep: 'below' | 'above'
  /** limit in force, null when nobody has given one */
  readonly limit: number | null
  readonly source?: string
}

interface Finding {
  readonly value: number
  readonly speed?: number | null
  readonly place?: string
  readonly advice?: string
  /** something besides the figure makes it fail, as the advice says */
  readonly failsAnyway?: boolean
  /** why the true value may lie beyond the one given, or has no bound at all */
  readonly unbounded?: string | null
}

/** A verdict with a value. A missing limit leaves it unknown, with the value shown. */
export function verdictOf(requirement: Requirement, subject: Subject, finding: Finding): Verdict {
  const { limit, keep } = subject
  const margin = limit === null ? null : marginOf(finding.value, limit, keep)
  const status = statusOf(margin, finding.failsAnyway ?? false)
  const unbounded = finding.unbounded ?? null
  if (unbounded !== null && status !== 'fail') return unknownVerdict(requirement, subject, unbounded)
  return {
    ...frame(requirement, subject),
    status,
    value: finding.value,
    margin,
    governingSpeed: finding.speed ?? null,
    governingPlace: finding.place ?? '',
    advice: unbounded ?? finding.advice ?? (limit === null ? 'Give a limit to have this judged.' : ''),
  }
}

/** A verdict that cannot be given, and why. */
export function unknownVerdict(requirement: Requirement, subject: Subject, reason: string): Verdict {
  return {
    ...frame(requirement, subject),
    status: 'unknown',
    value: null,
    margin: null,
    governingSpeed: null,
    governingPlace: '',
    advice: reason,
  }
}

function frame(requirement: Requirement, subject: Subject) {
  return {
    requirement: requirement.id,
    kind: requirement.kind,
    title: subject.title,
    limit: subject.limit,
    dimension: subject.dimension,
    keep: subject.keep,
    source: requirement.source || (subject.source ?? ''),
  }
}

/** Distance from the limit as a share of it (of 1 where the limit is zero); negative on the wrong side. */
export function marginOf(value: number, limit: number, keep: 'below' | 'above'): number {
  const distance = keep === 'below' ? limit - value : value - limit
  return limit === 0 ? distance : distance / Math.abs(limit)
}

function statusOf(margin: number | null, failsAnyway: boolean): VerdictStatus {
  if (failsAnyway) return 'fail'
  if (margin === null) return 'unknown'
  if (margin < 0) return 'fail'
  return margin < NEAR_MARGIN ? 'near' : 'pass'
}

/** The first thing that keeps the machine from being computed, in the words shown at its field. */
export function reasonFor(computed: Pick<Evaluation, 'problems'>, fallback: string): string {
  const problem = computed.problems.find((candidate) => candidate.kind !== 'caution')
  return problem ? `Not known yet: ${problem.message}` : fallback
}
