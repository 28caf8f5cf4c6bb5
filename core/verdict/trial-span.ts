import type { Project } from '../project/project.ts'
import type { SpeedSpan } from '../project/requirements.ts'
import type { Verdict } from '../results.ts'
import { spanSpeeds } from './span.ts'

const WIDER: readonly SpeedSpan[] = ['running', 'operating', 'chart']

/** The widest span of speeds over which a failing or near requirement is judged; null where none has one. */
export function troubledSpan(project: Project, verdicts: readonly Verdict[]): SpeedSpan | null {
  const troubled = new Set(
    verdicts.flatMap(({ status, requirement }) =>
      status === 'fail' || status === 'near' ? [requirement] : [],
    ),
  )
  const spans = project.requirements.flatMap((requirement) =>
    troubled.has(requirement.id) && 'speeds' in requirement ? [WIDER.indexOf(requirement.speeds)] : [],
  )
  return WIDER[Math.max(-1, ...spans)] ?? null
}

/** The speeds of a sweep that lie in a span, its ends among them. */
export function speedsWithin(project: Project, span: SpeedSpan | null, speeds: Float64Array): Float64Array {
  const ends = span === null ? null : spanSpeeds(project, span, speeds)
  return ends === null ? new Float64Array() : speeds.filter((speed) => speed >= ends[0] && speed <= ends[1])
}
