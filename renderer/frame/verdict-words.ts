import type { Verdict, VerdictStatus } from '../../core/results.ts'
import type { RequirementKind } from '../../core/project/requirements.ts'
import { formatPlain, formatQuantity, NOT_KNOWN } from '../../core/units/format.ts'
import type { UnitSystem } from '../../core/units/dimensions.ts'
import type { Step } from '../state/route.svelte.ts'

export const STATUS_WORDS: Readonly<Record<VerdictStatus, string>> = {
  pass: 'met',
  near: 'met, near the limit',
  fail: 'fails',
  unknown: 'not known',
}

/** The order in which verdicts are counted: what needs attention first. */
export const STATUSES: readonly VerdictStatus[] = ['fail', 'near', 'unknown', 'pass']

/** `at most 300 N`. */
export function limitWords(verdict: Verdict, units: UnitSystem): string {
  if (verdict.limit === null) return 'no limit given'
  const limit = formatQuantity(verdict.limit, verdict.dimension, units)
  return verdict.keep === 'below' ? `at most ${limit}` : `at least ${limit}`
}

/** `12 % in hand`, `over by 8 %`; a limit that is kept is no comfort where another one fails. */
export function marginWords(verdict: Verdict): string {
  if (verdict.margin === null) return NOT_KNOWN
  const percent = formatPlain(Math.abs(verdict.margin) * 100, 3)
  if (verdict.margin >= 0)
    return verdict.status === 'fail' ? 'kept, but another limit is not' : `${percent} % in hand`
  return verdict.keep === 'below' ? `over by ${percent} %` : `short by ${percent} %`
}

/** `at 397 rpm, bearing, z`; empty where neither speed nor place decides. */
export function governingWords(verdict: Verdict, units: UnitSystem): string {
  const speed =
    verdict.governingSpeed === null ? '' : `at ${formatQuantity(verdict.governingSpeed, 'shaftSpeed', units)}`
  return [speed, verdict.governingPlace].filter((part) => part !== '').join(', ')
}

/** The sheet on which this kind of requirement is decided. */
export const DECIDED_ON: Readonly<Record<RequirementKind, Step>> = {
  isolation: 'response',
  transmittedForce: 'response',
  vibrationVelocity: 'response',
  modeSeparation: 'response',
  mountLoad: 'mounts',
  mountDeflection: 'mounts',
  absorberStroke: 'absorber',
  runUpMotion: 'run-up',
  runUpForce: 'run-up',
}

/** Where value and limit stand on a gauge from 0 to 1; null when there is nothing to show. */
export function gaugeOf(verdict: Verdict): { readonly value: number; readonly limit: number } | null {
  const { value, limit } = verdict
  if (value === null || limit === null) return null
  const whole = 1.5 * Math.max(Math.abs(limit), 1e-300)
  const inside = (share: number) => Math.max(0, Math.min(1, share))
  return { value: inside(value / whole), limit: inside(limit / whole) }
}
