import { assertNever } from '../../../core/errors.ts'
import { effectiveMountType, type MountConditions } from '../../../core/mounts/mount-type.ts'
import { componentDesignSchema, type ComponentDesign } from '../../../core/project/component-designs.ts'
import type { MountType } from '../../../core/project/mounts.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Evaluation } from '../../../core/results.ts'

/** How a mount type says what it does: by its stiffness, by a measured curve, or by its dimensions. */
export type LawChoice = 'linear' | 'curve' | 'design'

export function lawOf(type: MountType): LawChoice {
  return type.design === null ? type.law.kind : 'design'
}

/** Deflection to which a straight curve is drawn where nothing is known of the mount [m]. */
const USUAL_REACH = 0.01

/**
 * Changes the way in which a type is described, in place. The mount does the same before and after
 * as far as that can be: a curve begins straight with the stiffness, stiffness takes what curve or
 * design came to.
 * @param load static load for which a design begins [N]
 */
export function chooseLaw(
  type: MountType,
  choice: LawChoice,
  conditions: MountConditions,
  load: number | null,
): void {
  if (choice === lawOf(type)) return
  const { type: present, usable } = effectiveMountType(type, conditions)
  if (usable && lawOf(type) !== 'linear') {
    const [x, y, z] = present.stiffness
    type.stiffness = [tidy(x), tidy(y), tidy(z)]
  }
  type.design = null
  switch (choice) {
    case 'linear':
      type.law = { kind: 'linear' }
      return
    case 'curve': {
      const stiffness = type.stiffness[2] > 0 ? type.stiffness[2] : 1e5
      const reach =
        present.deflectionLimit ?? (load !== null && load > 0 ? (2 * load) / stiffness : USUAL_REACH)
      const deflections = [tidy(reach / 2), tidy(reach)]
      type.law = { kind: 'curve', points: deflections.map((at) => [at, tidy(stiffness * at)]) }
      return
    }
    case 'design':
      type.law = { kind: 'linear' }
      type.design = newDesign('helicalSpring', load)
      return
    default:
      assertNever(choice, 'law')
  }
}

/** A design with nothing given but its load. */
export function newDesign(component: ComponentDesign['component'], load: number | null): ComponentDesign {
  return componentDesignSchema.parse({ component, load: load === null ? null : tidy(load) })
}

/** A static load on one mount of a type, and how it is known. */
export interface TypeLoad {
  /** [N] */
  readonly load: number
  /** at rest: the largest on its mounts; even: an even share of the weight, where no rest is known */
  readonly from: 'rest' | 'even'
}

/** Static load for which a type is to be designed; null while nothing is known of it. */
export function loadOf(project: Project, evaluation: Evaluation | null, type: string): TypeLoad | null {
  const { placed } = project.mounting
  const own = new Set(placed.flatMap((mount) => (mount.type === type ? [mount.id] : [])))
  const loads = evaluation?.statics?.mounts.flatMap(({ id, load }) => (own.has(id) ? [load] : [])) ?? []
  const largest = Math.max(0, ...loads)
  if (largest > 0) return { load: largest, from: 'rest' }
  const mass = evaluation?.massSummary?.mass ?? null
  if (mass === null || placed.length === 0) return null
  return { load: (mass * project.analysis.gravity) / placed.length, from: 'even' }
}

/** To four digits: a figure to begin with, that a person can read. */
function tidy(value: number): number {
  return Number(value.toPrecision(4))
}
