import { assertNever } from '../errors.ts'
import type { Absorber, Objective } from '../project/absorber.ts'
import type { MountType, PlacedMount } from '../project/mounts.ts'
import type { Project } from '../project/project.ts'
import type { VerdictStatus } from '../results.ts'
import type { RowMark } from './report.ts'

/** What a person called it, or its identifier. */
export const nameOf = (item: { readonly name: string; readonly id: string }): string => item.name || item.id

export function typeOf(project: Project, mount: PlacedMount): MountType | undefined {
  return project.mounting.types.find((type) => type.id === mount.type)
}

export const STATUS_WORDS: Readonly<Record<VerdictStatus, string>> = {
  pass: 'met',
  near: 'met, near the limit',
  fail: 'FAILS',
  unknown: 'not known',
}
export const STATUS_MARKS: Readonly<Record<VerdictStatus, RowMark>> = {
  pass: 'good',
  near: 'near',
  fail: 'bad',
  unknown: 'unknown',
}

export function tuningWords(absorber: Absorber): string {
  const { tuning } = absorber
  switch (tuning.by) {
    case 'fixedPoints':
      return `closed form: equal height at the fixed points (${objectiveWords(tuning.objective)})`
    case 'minimax':
      return `least worst peak of the damped single-freedom host (${objectiveWords(tuning.objective)})`
    case 'networkMinimax':
      return 'least worst receptance at the attachment on the whole network'
    case 'speed':
      return 'tuned to one running speed'
    case 'given':
      return 'frequency and damping as given'
    default:
      return assertNever(tuning, 'tuning')
  }
}

const EXCITATIONS: Readonly<Record<Objective['excitation'], string>> = {
  force: 'harmonic force',
  unbalance: 'rotating unbalance',
  supportAcceleration: 'support acceleration',
  supportDisplacement: 'support displacement',
}
const RESPONSES: Readonly<Record<Objective['response'], string>> = {
  displacement: 'displacement',
  velocity: 'velocity',
  acceleration: 'acceleration',
  relativeDisplacement: 'relative displacement',
  transmittedForce: 'transmitted force',
}

export function objectiveWords({ excitation, response }: Objective): string {
  return `${RESPONSES[response]} under ${EXCITATIONS[excitation]}`
}
