export interface LabelBox {
  /** centre [px] */
  readonly at: number
  readonly width: number
}

export interface PlacedLabel {
  /** 0 is the nearest row; null: no room, leave it out */
  readonly row: number | null
  /** centre after it was kept within the ends [px] */
  readonly at: number
}

/**
 * Puts labels on rows so that none overlaps another; earlier labels have the first claim.
 * @param room from and to [px] between which every label must stay
 */
export function placeLabels(
  labels: readonly LabelBox[],
  rows: number,
  room: readonly [number, number],
  gap = 6,
): PlacedLabel[] {
  const taken: { row: number; from: number; to: number }[] = []
  return labels.map((label) => {
    const half = label.width / 2
    const at = Math.max(room[0] + half, Math.min(room[1] - half, label.at))
    for (let row = 0; row < rows; row += 1) {
      const clash = taken.some(
        (other) => other.row === row && at - half < other.to + gap && at + half > other.from - gap,
      )
      if (clash) continue
      taken.push({ row, from: at - half, to: at + half })
      return { row, at }
    }
    return { row: null, at }
  })
}
