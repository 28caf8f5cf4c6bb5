/**
 * Level of an amplitude against a reference: 20 lg(value / reference) [dB].
 * A value of zero or below has no level: null.
 */
export function toDecibels(value: number, reference: number): number | null {
  const level = 20 * Math.log10(value / reference)
  return Number.isFinite(level) ? level : null
}
