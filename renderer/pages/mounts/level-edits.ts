import type { Project } from '../../../core/project/project.ts'
import type { Statics } from '../../../core/statics-results.ts'

/** Fixes the packing that levelling found as the packing that is built, in place. */
export function keepPacking(draft: Project, statics: Statics): void {
  const found = new Map(statics.mounts.map(({ id, shim }) => [id, shim]))
  for (const mount of draft.mounting.placed) mount.shim = found.get(mount.id) ?? mount.shim
  draft.mounting.setting = { kind: 'asBuilt' }
}

/** How far the worst mount's load stays off what levelling aims at, over that; null as built. */
export function largestMiss({ mounts }: Statics): number | null {
  const shares = mounts.flatMap(({ load, wishedLoad }) =>
    wishedLoad === null || wishedLoad === 0 ? [] : [Math.abs(load / wishedLoad - 1)],
  )
  return shares.length === 0 ? null : Math.max(...shares)
}
