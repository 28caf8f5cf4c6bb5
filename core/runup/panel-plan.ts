/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { speedOf, type SpeedCourse, type SpeedPiece } from './speed-course.ts'

/** Highest power in the series of speed, phase and force over a panel: fine, and quick for trials. */
export const DEGREE = { fine: 16, quick: 10 } as const

/** Stretches of time over which the phase is a straight line and a small rest. */
export interface PanelPlan {
  readonly course: SpeedCourse
  readonly degree: number
  readonly count: number
  /** which piece of the course, and the panel's middle in it [s] */
  readonly piece: Int32Array
  readonly middle: Float64Array
  /** half its length [s] */
  readonly half: Float64Array
  /** its middle since the start [s] */
  readonly time: Float64Array
  /** shaft angle there since the start [rad] */
  readonly angle: Float64Array
  /** whether every panel came out as short as it must be */
  readonly complete: boolean
}

/** By how much the phase may bend over a panel [rad]: exp(i bend x²) is then cut at 7e-10, quick at 6e-6. */
const BEND = 0.4
/** Largest last terms of the phase's own series [rad], fine and quick. */
const PHASE_TAIL = { fine: 1e-10, quick: 1e-5 } as const
const MOST_PANELS = 20_000

/** Cuts a course into panels. @param order the highest order that acts */
export function planPanels(
  course: SpeedCourse,
  order: number,
  accuracy: 'fine' | 'quick' = 'fine',
): PanelPlan {
  const degree = DEGREE[accuracy]
  const piece: number[] = []
  const middle: number[] = []
  const half: number[] = []
  const time: number[] = []
  const angle: number[] = []
  const series = new Float64Array(degree + 1)
  let begun = 0
  let turned = 0
  let complete = true
  for (const [index, part] of course.pieces.entries()) {
    let at = 0
    while (at < part.duration && piece.length < MOST_PANELS) {
      const left = part.duration - at
      let length = Math.min(left, panelLength(part, at, order))
      // equal panels rather than a short one at the end
      length = left / Math.ceil(left / length - 1e-9)
      while (!isSmooth(part, at + length / 2, length / 2, order, series, PHASE_TAIL[accuracy])) length /= 2
      piece.push(index)
      middle.push(at + length / 2)
      half.push(length / 2)
      time.push(begun + at + length / 2)
      speedSeries(part, at + length / 2, length / 2, series)
      const [before, after] = anglesAbout(series, length / 2)
      angle.push(turned + before)
      turned += before + after
      at = length >= left * (1 - 1e-12) ? part.duration : at + length
    }
    complete &&= at >= part.duration
    begun += part.duration
  }
  return {
    course,
    degree,
    count: piece.length,
    piece: Int32Array.from(piece),
    middle: Float64Array.from(middle),
    half: Float64Array.from(half),
    time: Float64Array.from(time),
    angle: Float64Array.from(angle),
    complete,
  }
}

/** Shaft angle turned in the first and in the second half of a panel [rad]. */
function anglesAbout(series: Float64Array, half: number): readonly [number, number] {
  let before = 0
  let after = 0
  for (let k = 0; k < series.length; k++) {
    const term = (half * series[k]!) / (k + 1)
    after += term
    before += k % 2 === 0 ? term : -term
  }
  return [before, after]
}

/** Length over which the acceleration at its begin bends the phase by as much as may be. */
function panelLength(part: SpeedPiece, at: number, order: number): number {
  const speed = speedOf(part, at)
  const acceleration = Math.abs(part.constant + part.square * speed * speed)
  return acceleration > 0 ? Math.sqrt((8 * BEND) / (order * acceleration)) : Infinity
}

function isSmooth(
  part: SpeedPiece,
  middle: number,
  half: number,
  order: number,
  series: Float64Array,
  leastTail: number,
): boolean {
  if (part.square === 0) return true
  speedSeries(part, middle, half, series)
  let bend = 0
  for (let k = 1; k < series.length; k++) bend += (order * half * Math.abs(series[k]!)) / (k + 1)
  const tail = Math.abs(series.at(-1)!) + Math.abs(series.at(-2)!)
  return bend <= 1.2 * BEND && order * half * tail <= leastTail
}

/**
 * Speed about the middle of a panel as a power series in x = (time - middle) / half [rad/s], from
 * speed' = constant + square · speed² term by term.
 */
export function speedSeries(part: SpeedPiece, middle: number, half: number, series: Float64Array): void {
  const { constant, square } = part
  series.fill(0)
  series[0] = speedOf(part, middle)
  if (square === 0) {
    series[1] = half * constant
    return
  }
  for (let k = 0; k < series.length - 1; k++) {
    let product = 0
    for (let i = 0; i <= k; i++) product += series[i]! * series[k - i]!
    series[k + 1] = (half * ((k === 0 ? constant : 0) + square * product)) / (k + 1)
  }
}
