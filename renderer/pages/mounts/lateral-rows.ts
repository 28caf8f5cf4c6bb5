import type { LateralStatics } from '../../../core/statics-results.ts'

/** A mount under the lateral load, the worse of along and against its direction. */
export interface LateralRow {
  readonly id: string
  /** largest compression [N] */
  readonly load: number
  /** [N] */
  readonly uplift: number
  /** [m] */
  readonly sway: number
  readonly gapShare: number | null
  readonly ratedShare: number | null
}

/** Each mount with the worse of its two cases in every figure; none where the machine does not stand. */
export function lateralRows({ cases }: LateralStatics): readonly LateralRow[] {
  const [along, against] = cases
  if (along === null || against === null) return []
  return along.mounts.map((mount, index) => {
    const other = against.mounts[index] ?? mount
    return {
      id: mount.id,
      load: Math.max(mount.load, other.load),
      uplift: Math.max(mount.uplift, other.uplift),
      sway: Math.max(mount.sway, other.sway),
      gapShare: worse(mount.gapShare, other.gapShare),
      ratedShare: worse(mount.ratedShare, other.ratedShare),
    }
  })
}

function worse(a: number | null, b: number | null): number | null {
  return a === null || b === null ? null : Math.max(a, b)
}
