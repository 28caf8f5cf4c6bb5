import { assertNever } from '../errors.ts'
import type { Project } from '../project/project.ts'
import type { Requirement } from '../project/requirements.ts'
import type { Verdict } from '../results.ts'
import {
  judgeAbsorberStroke,
  judgeIsolation,
  judgeTransmittedForce,
  judgeVelocity,
} from './response-verdicts.ts'
import { absentAbsorber } from './names.ts'
import { judgeRunUpForce, judgeRunUpMotion } from './run-up-verdicts.ts'
import { judgeModeSeparation } from './separation-verdict.ts'
import { judgeMountDeflection, judgeMountLoad } from './static-verdicts.ts'
import type { Computed } from './verdict.ts'

/**
 * Judges every enabled requirement against what was computed. What could not be computed is
 * `unknown`, with the reason; it never counts as met.
 */
export function judge(project: Project, computed: Computed): readonly Verdict[] {
  const absent = absentAbsorber(project, computed)
  return project.requirements
    .filter((requirement) => requirement.enabled)
    .map((requirement) => {
      const verdict = judgeOne(requirement, project, computed)
      return absent === null ? verdict : withoutAbsorber(verdict, absent)
    })
}

const STATIC = new Set<Requirement['kind']>(['mountLoad', 'mountDeflection'])

/** What was computed is the machine without an absorber that belongs to it: only what its weight cannot cure stands. */
function withoutAbsorber(verdict: Verdict, reason: string): Verdict {
  if (verdict.status === 'unknown' || (verdict.status === 'fail' && STATIC.has(verdict.kind))) return verdict
  return {
    ...verdict,
    status: 'unknown',
    value: null,
    margin: null,
    governingSpeed: null,
    governingPlace: '',
    advice: reason,
  }
}

function judgeOne(requirement: Requirement, project: Project, computed: Computed): Verdict {
  switch (requirement.kind) {
    case 'isolation':
      return judgeIsolation(requirement, project, computed)
    case 'transmittedForce':
      return judgeTransmittedForce(requirement, project, computed)
    case 'vibrationVelocity':
      return judgeVelocity(requirement, project, computed)
    case 'modeSeparation':
      return judgeModeSeparation(requirement, project, computed)
    case 'mountLoad':
      return judgeMountLoad(requirement, project, computed)
    case 'mountDeflection':
      return judgeMountDeflection(requirement, project, computed)
    case 'absorberStroke':
      return judgeAbsorberStroke(requirement, project, computed)
    case 'runUpMotion':
      return judgeRunUpMotion(requirement, project, computed)
    case 'runUpForce':
      return judgeRunUpForce(requirement, project, computed)
    default:
      return assertNever(requirement, 'requirement')
  }
}
