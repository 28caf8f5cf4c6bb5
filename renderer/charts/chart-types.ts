import type { Dimension } from '../../core/units/dimensions.ts'

/** What a curve stands for; it decides ink and weight, never the dash. */
export type SeriesRole = 'main' | 'compare' | 'pinned' | 'points'

/** One curve, in SI units (rad/s for shaft speed); x rises. */
export interface ChartSeries {
  readonly id: string
  readonly label: string
  readonly x: Float64Array
  readonly y: Float64Array
  /** main: solid ink first, then further dashes; points: markers without a line */
  readonly role: SeriesRole
  /** index into the dash patterns; curves of one chart differ in it */
  readonly dash: number
  /** left out at first; the legend brings it in */
  readonly hidden?: boolean
}

export type ScaleKind = 'linear' | 'log'

export interface ChartAxis {
  /** quantity in words, without unit */
  readonly title: string
  readonly dimension: Dimension
  readonly scale?: ScaleKind
  /** the scale is the only one that makes sense here: no choice is offered */
  readonly onlyScale?: boolean
  /** value that is 0 dB [SI]; absent: no dB switch */
  readonly decibelReference?: number
  /** reference as said on the axis, such as `re 1` */
  readonly decibelLabel?: string
  /** fixed ends [SI]; absent: from the curves */
  readonly min?: number
  readonly max?: number
}

/** A vertical line across the chart at `x` [SI]. */
export interface ChartMark {
  readonly id: string
  readonly x: number
  readonly label: string
  /** running: the accent; crossing: thin and dashed */
  readonly role: 'running' | 'crossing'
}

/** A horizontal line at `y` [SI] with the hatched side that is not allowed; 'none' for a plain boundary. */
export interface ChartLimit {
  readonly id: string
  readonly y: number
  readonly label: string
  readonly forbidden: 'above' | 'below' | 'none'
  /** speeds for which it holds [SI]; absent: all */
  readonly from?: number
  readonly to?: number
}

/** A vertical band, such as the operating range; plain tint, or hatched when not allowed. */
export interface ChartBand {
  readonly id: string
  readonly from: number
  readonly to: number
  readonly label: string
  readonly role: 'range' | 'forbidden'
}
