import { withStiffnessTimes } from '../mounts/mount-type.ts'
import { scale } from '../numerics/vector3.ts'
import type { MountType } from '../project/mounts.ts'
import type { Project } from '../project/project.ts'

/** Whether any mount type has damping that can be scaled. */
export function isDamped({ mounting: { types } }: Project): boolean {
  return types.some(({ lossFactor, viscous }) => lossFactor > 0 || viscous.some((value) => value > 0))
}

/**
 * The project with a damping to scale: its own, or where its mounts have none a loss factor of 1 in all
 * of them, the one assumption that favours no mount and no direction.
 */
export function withDampingToScale(project: Project): Project {
  return isDamped(project) ? project : withTypes(project, (type) => ({ ...type, lossFactor: 1 }))
}

/** Every mount stiffer and more damped by a factor, in every direction alike. */
export function withMountsTimes(project: Project, stiffness: number, damping: number): Project {
  return withTypes(project, (type) => ({
    ...withStiffnessTimes(type, stiffness),
    lossFactor: type.lossFactor * damping,
    viscous: scale(type.viscous, damping),
  }))
}

function withTypes(project: Project, change: (type: MountType) => MountType): Project {
  return { ...project, mounting: { ...project.mounting, types: project.mounting.types.map(change) } }
}
