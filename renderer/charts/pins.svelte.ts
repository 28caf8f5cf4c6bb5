import { SvelteMap } from 'svelte/reactivity'
import type { ChartSeries } from './chart-types.ts'

/** Curves kept for comparison, by chart; they outlive a change of page, not the session. */
const pinned = new SvelteMap<string, readonly ChartSeries[]>()

export function pinnedCurves(chart: string): readonly ChartSeries[] {
  return pinned.get(chart) ?? []
}

/** Pinned curves take the other half of the dash patterns, so that they differ by more than ink. */
const PINNED_DASH = 4

/** Keeps copies of the curves as they stand now. */
export function pinCurves(chart: string, series: readonly ChartSeries[]): void {
  pinned.set(
    chart,
    series.map((entry) => ({
      ...entry,
      id: `pinned-${entry.id}`,
      label: `${entry.label}, pinned`,
      role: 'pinned' as const,
      dash: entry.dash + PINNED_DASH,
      x: entry.x.slice(),
      y: entry.y.slice(),
    })),
  )
}

export function unpinCurves(chart: string): void {
  pinned.delete(chart)
}
