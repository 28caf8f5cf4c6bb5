import type { UnitSystem } from '../units/dimensions.ts'

/**
 * The calculation report as data. All numbers in text and tables are formatted in the project's
 * units; the series of figures are plain numbers in the units named on their axes.
 * Nothing here knows how a page is drawn.
 */
export interface Report {
  readonly title: string
  /** lines of the title block */
  readonly titleBlock: readonly Fact[]
  /** when the report was made, as given by the caller; null when it does not matter */
  readonly madeAt: string | null
  /** SHA-256 of the project's canonical JSON, lower-case hexadecimal */
  readonly checksum: string
  readonly units: UnitSystem
  readonly paper: 'A4' | 'Letter'
  readonly sections: readonly ReportSection[]
}

export interface ReportSection {
  readonly id: string
  readonly heading: string
  readonly blocks: readonly Block[]
}

export type Block =
  | { readonly kind: 'heading'; readonly text: string }
  | { readonly kind: 'paragraph'; readonly text: string }
  | { readonly kind: 'facts'; readonly rows: readonly Fact[] }
  | ReportTable
  | { readonly kind: 'figure'; readonly figure: Figure }
  | { readonly kind: 'cautions'; readonly items: readonly Caution[] }
  | { readonly kind: 'sources'; readonly items: readonly MethodNote[] }

/** One line 'label: value'; the value carries its unit. */
export interface Fact {
  readonly label: string
  readonly value: string
}

export interface ReportTable {
  readonly kind: 'table'
  readonly caption: string
  readonly columns: readonly Column[]
  readonly rows: readonly (readonly string[])[]
  /** by row; left out where every row is plain */
  readonly marks?: readonly RowMark[]
}
export interface Column {
  readonly label: string
  /** unit of the column's numbers; empty for text and pure numbers */
  readonly unit: string
  readonly align: 'start' | 'end'
}
export type RowMark = 'plain' | 'good' | 'near' | 'bad' | 'unknown' | 'off'

export interface Caution {
  readonly heading: string
  readonly text: string
}

export interface MethodNote {
  readonly what: string
  readonly how: string
  /** the published method, or how the statement is known; empty for plain mechanics */
  readonly source: string
}

export interface Figure {
  readonly id: string
  readonly title: string
  /** what the figure shows, in words, for those who cannot see it */
  readonly description: string
  readonly x: FigureAxis
  readonly y: FigureAxis
  readonly series: readonly FigureSeries[]
  /** horizontal limits; the side that is not allowed is hatched */
  readonly limits: readonly FigureLimit[]
  /** vertical lines */
  readonly marks: readonly FigureMark[]
  /** range of x in which the machine is operated, or null */
  readonly operating: readonly [from: number, to: number] | null
}
export interface FigureAxis {
  readonly label: string
  readonly unit: string
  readonly scale: 'linear' | 'log'
}
export interface FigureSeries {
  readonly label: string
  readonly style: 'main' | 'second' | 'third' | 'without'
  readonly x: readonly number[]
  /** null leaves a gap */
  readonly y: readonly (number | null)[]
}
export interface FigureLimit {
  readonly value: number
  readonly label: string
  readonly forbidden: 'above' | 'below'
  /** range of x over which it counts; null for the whole axis */
  readonly over: readonly [from: number, to: number] | null
}
export interface FigureMark {
  readonly at: number
  readonly label: string
  readonly kind: 'running' | 'mode'
}
