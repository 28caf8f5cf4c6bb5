/**
 * How people in vehicles and buildings are likely to react to vibration, by frequency-weighted RMS
 * acceleration. ISO 2631-1:1997, annex C, from memory. The ranges overlap, as reactions do.
 */
export interface ComfortReaction {
  readonly words: string
  /** [m/s²]; null: open to that side */
  readonly from: number | null
  readonly to: number | null
}

export const COMFORT_SOURCE = { source: 'ISO 2631-1:1997, annex C', provenance: 'from memory' } as const

export const comfortReactions: readonly ComfortReaction[] = [
  { words: 'not uncomfortable', from: null, to: 0.315 },
  { words: 'a little uncomfortable', from: 0.315, to: 0.63 },
  { words: 'fairly uncomfortable', from: 0.5, to: 1 },
  { words: 'uncomfortable', from: 0.8, to: 1.6 },
  { words: 'very uncomfortable', from: 1.25, to: 2.5 },
  { words: 'extremely uncomfortable', from: 2, to: null },
]

/** The reactions to be expected at a frequency-weighted RMS acceleration [m/s²]. */
export function reactionsAt(acceleration: number): readonly ComfortReaction[] {
  return comfortReactions.filter(
    ({ from, to }) => acceleration >= (from ?? -Infinity) && acceleration <= (to ?? Infinity),
  )
}
