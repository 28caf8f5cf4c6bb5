import type { Absorber } from '../../../core/project/absorber.ts'
import type { Project } from '../../../core/project/project.ts'
import type { AbsorberResult, Evaluation } from '../../../core/results.ts'
import type { ChartSeries } from '../../charts/chart-types.ts'

const RATIOS = [0.01, 0.02, 0.035, 0.05, 0.075, 0.1, 0.15, 0.2, 0.3] as const

/**
 * The same machine with the absorber in a row of sizes, each designed by its own rule and none in
 * place, so that one evaluation answers for all; nothing excites and nothing is judged.
 * @param present mass ratio of the absorber as it is
 */
export function massTrials(project: Project, absorber: Absorber, present: number): Project {
  // a present ratio among the usual ones needs no second trial
  const ratios = [...new Set([...RATIOS, present])].toSorted((a, b) => a - b)
  return {
    ...project,
    sources: [],
    requirements: [],
    absorbers: ratios.map((ratio) => ({
      ...absorber,
      id: `ratio-${ratio}`,
      enabled: false,
      size: { by: 'ratio', ratio },
    })),
  }
}

export interface MassTrade {
  readonly title: string
  readonly axis: string
  /** shown as a pure number, or as a frequency */
  readonly dimension: 'ratio' | 'frequency'
  readonly series: readonly ChartSeries[]
}

/** What each size gives: the worst peak and the travel, or the frequencies left beside a tuned speed. */
export function massTrade(absorber: Absorber, trials: Evaluation): MassTrade | null {
  const results = trials.absorbers
  if (results.length < 2) return null
  const x = Float64Array.from(results, (result) => result.massRatio)
  const curve = (id: string, label: string, dash: number, read: (result: AbsorberResult) => number) =>
    ({
      id,
      label,
      x,
      y: Float64Array.from(results, read),
      role: dash === 0 ? 'main' : 'compare',
      dash,
    }) satisfies ChartSeries
  if (absorber.tuning.by === 'speed') {
    return {
      title: 'What more mass buys: clear band around the tuned speed',
      axis: 'Frequency left on either side',
      dimension: 'frequency',
      series: [
        curve('upper', 'upper of the pair', 0, (result) => result.splitFrequencies[1]),
        curve('lower', 'lower of the pair', 1, (result) => result.splitFrequencies[0]),
      ],
    }
  }
  const lightest = results[0]?.network
  if (results.every((result) => result.network !== null)) {
    return {
      title: 'What more mass buys: worst response, against the lightest',
      axis: 'Relative worst receptance',
      dimension: 'ratio',
      series: [
        curve('peak', 'worst receptance', 0, ({ network }) =>
          network && lightest ? network.peak / lightest.peak : NaN,
        ),
      ],
    }
  }
  if (results.some((result) => result.peak === null)) return null
  return {
    title: 'What more mass buys: worst peak and travel',
    axis: 'Over reference',
    dimension: 'ratio',
    series: [
      curve('peak', 'worst peak', 0, (result) => result.peak ?? NaN),
      curve('travel', 'largest travel', 1, (result) => result.maxStrokeRatio ?? NaN),
    ],
  }
}
