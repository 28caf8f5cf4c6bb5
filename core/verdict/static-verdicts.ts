import { effectiveMountType } from '../mounts/mount-type.ts'
import type { Project } from '../project/project.ts'
import type { Verdict } from '../results.ts'
import type { MountStatics } from '../statics-results.ts'
import { mountName, type Of } from './names.ts'
import { reasonFor, unknownVerdict, verdictOf, type Computed } from './verdict.ts'

/** Static load of the hardest loaded mount as a share of its rating. */
export function judgeMountLoad(requirement: Of<'mountLoad'>, project: Project, computed: Computed): Verdict {
  const subject = {
    title: 'Mount load',
    dimension: 'share',
    keep: 'below',
    limit: requirement.limit ?? 1,
  } as const
  if (computed.statics === null) {
    return unknownVerdict(requirement, subject, reasonFor(computed, 'The static loads are not known.'))
  }
  const lifted = liftedMount(project, computed.statics.mounts)
  const rated = computed.statics.mounts.filter((mount) => mount.ratedShare !== null)
  const worst = largest(rated, (mount) => mount.ratedShare ?? 0)
  if (worst === null) return unknownVerdict(requirement, subject, 'No mount type has a rated load.')
  const value = worst.ratedShare ?? 0
  const unrated = computed.statics.mounts.length - rated.length
  if (unrated > 0 && value <= subject.limit && lifted === null) {
    return unknownVerdict(requirement, subject, `${unrated} of the mounts have no rated load.`)
  }
  return verdictOf(requirement, subject, {
    value,
    place: mountName(project, worst.id),
    ...(lifted === null ? {} : { failsAnyway: true, advice: lifted }),
  })
}

/** A mount that carries less than it must, in words; null when all carry enough. */
function liftedMount(project: Project, mounts: readonly MountStatics[]): string | null {
  for (const mount of mounts) {
    const placed = project.mounting.placed.find((candidate) => candidate.id === mount.id)
    const type = project.mounting.types.find((candidate) => candidate.id === placed?.type)
    const name = mountName(project, mount.id)
    if (mount.load < 0)
      return `${name} is pulled upwards: move mounts or the load so that every mount is pressed.`
    const least = type?.leastLoad ?? null
    if (least !== null && mount.load < least) {
      return `${name} carries less than the least load of its type.`
    }
  }
  return null
}

/** Static deflection against a typed limit, or against each mount's own. */
export function judgeMountDeflection(
  requirement: Of<'mountDeflection'>,
  project: Project,
  computed: Computed,
): Verdict {
  const title = 'Static deflection of the mounts'
  const typed = { title, dimension: 'deflection', keep: 'below', limit: requirement.limit } as const
  if (computed.statics === null) {
    return unknownVerdict(requirement, typed, reasonFor(computed, 'The static deflections are not known.'))
  }
  const { mounts } = computed.statics
  if (requirement.limit !== null) {
    const worst = largest(mounts, (mount) => Math.abs(mount.deflection))
    if (worst === null) return unknownVerdict(requirement, typed, 'There are no mounts.')
    return verdictOf(requirement, typed, {
      value: Math.abs(worst.deflection),
      place: mountName(project, worst.id),
    })
  }
  const limited = mounts.filter((mount) => mount.limitShare !== null)
  const worst = largest(limited, (mount) => mount.limitShare ?? 0)
  if (worst === null || worst.limitShare === null) {
    return unknownVerdict(requirement, typed, 'Give a limit here, or a deflection limit to the mount type.')
  }
  const own = { ...typed, limit: ownLimit(project, worst.id) }
  if (limited.length < mounts.length && worst.limitShare <= 1) {
    return unknownVerdict(
      requirement,
      own,
      `${mounts.length - limited.length} of the mounts have no deflection limit.`,
    )
  }
  return verdictOf(requirement, own, {
    value: Math.abs(worst.deflection),
    place: mountName(project, worst.id),
  })
}

/** Deflection that the type of a mount allows, typed or as its design says [m]. */
function ownLimit(project: Project, id: string): number | null {
  const placed = project.mounting.placed.find((mount) => mount.id === id)
  const type = project.mounting.types.find((candidate) => candidate.id === placed?.type)
  return type ? effectiveMountType(type, project.analysis).type.deflectionLimit : null
}

/** The member for which `size` is largest, or null of an empty list. */
export function largest<T>(list: readonly T[], size: (item: T) => number): T | null {
  return list.reduce<T | null>((best, item) => (best === null || size(item) > size(best) ? item : best), null)
}
