import type { MountType } from '../../../core/project/mounts.ts'

export interface CatalogueFilter {
  readonly query: string
  /** empty: every kind */
  readonly kind: string
  /** only those whose load range holds the loads of the mounts in question */
  readonly fitting: boolean
}

/** Least and largest static load of the mounts in question [N]; null while it is not known. */
export interface LoadRange {
  readonly least: number
  readonly largest: number
}

/** Whether an item may carry these loads; an end that it does not state does not refuse. */
export function carries(item: MountType, loads: LoadRange): boolean {
  const overloaded = item.ratedLoad !== null && loads.largest > item.ratedLoad
  const idle = item.leastLoad !== null && loads.least < item.leastLoad
  return !overloaded && !idle
}

/** Deflection under a load, were the item's law a straight line [m]; null without axial stiffness. */
export function deflectionUnder(item: MountType, load: number): number | null {
  return item.stiffness[2] > 0 ? load / item.stiffness[2] : null
}

/** Heave frequency of one mount with its share of the mass, on its dynamic stiffness [Hz]. */
export function heaveFrequency(item: MountType, load: number, gravity: number): number | null {
  if (!(load > 0)) return null
  return Math.sqrt((item.stiffness[2] * item.dynamicRatio * gravity) / load) / (2 * Math.PI)
}

export function filterCatalogue(
  items: readonly MountType[],
  filter: CatalogueFilter,
  loads: LoadRange | null,
): readonly MountType[] {
  const words = filter.query.toLowerCase().split(/\s+/).filter(Boolean)
  return items.filter((item) => {
    const text = `${item.name} ${item.kind} ${item.note}`.toLowerCase()
    if (!words.every((word) => text.includes(word))) return false
    if (filter.kind !== '' && item.kind !== filter.kind) return false
    return !filter.fitting || loads === null || carries(item, loads)
  })
}
