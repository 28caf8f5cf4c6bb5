import type { Project } from '../../core/project/project.ts'
import type { Evaluation } from '../../core/results.ts'
import { formatPlain } from '../../core/units/format.ts'
import { factorOf } from '../../core/units/parse.ts'
import { placeLabels } from '../charts/label-rows.ts'
import type { AxisRange } from '../charts/ranges.ts'
import { crossingName, crossingsUpTo, standingModes } from '../charts/speed-marks.ts'
import { thin } from '../charts/thin.ts'

const LETTER = 6.2
const ROWS = 2
const TICK_ROOM = 64
/** one press of an arrow key, as a share of the bar */
const KEY_STEP = 1 / 300

export interface BarTick {
  /** [px] */
  readonly left: number
  readonly text: string
}

export interface BarCrossing {
  readonly id: string
  readonly name: string
  /** [rad/s] */
  readonly speed: number
  /** of the tick [px] */
  readonly left: number
  /** of the label's centre [px] */
  readonly labelLeft: number
  readonly row: number | null
}

/**
 * Round speeds under the bar.
 * @param top [rad/s]
 * @param width [px]
 * @param kept place and width of the text that the ticks must leave free [px]; null: none
 */
export function barTicks(
  top: number,
  width: number,
  kept: { readonly left: number; readonly width: number } | null,
): readonly BarTick[] {
  const factor = factorOf('shaftSpeed', 'SI')
  const last = top / factor
  const step = tickStep(last / Math.max(2, Math.floor(width / TICK_ROOM)))
  const ticks: BarTick[] = []
  for (let index = 0; index * step <= last * (1 + 1e-9); index += 1) {
    const value = index * step
    const left = (value / last) * width
    const text = formatPlain(value, 6)
    const clear = kept === null || Math.abs(left - kept.left) > (kept.width + text.length * LETTER) / 2 + 4
    if (clear) ticks.push({ left, text })
  }
  return ticks
}

/** Next of 1, 2, 5 times a power of ten that is not below the least step. */
function tickStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least))
  return ([1, 2, 5].find((step) => step * power >= least) ?? 10) * power
}

/** Order crossings on the bar; labels that find no room stay out, their ticks do not. */
export function barCrossings(
  evaluation: Evaluation | null,
  top: number,
  width: number,
): readonly BarCrossing[] {
  const crossings = crossingsUpTo(standingModes(evaluation), top)
  const placed = placeLabels(
    crossings.map((crossing) => ({
      at: (crossing.speed / top) * width,
      width: crossingName(crossing).length * LETTER,
    })),
    ROWS,
    [0, width],
  )
  return crossings.map((crossing, index) => ({
    id: `${crossing.mode.number}-${crossing.order}`,
    name: crossingName(crossing),
    speed: crossing.speed,
    left: (crossing.speed / top) * width,
    labelLeft: placed[index]?.at ?? 0,
    row: placed[index]?.row ?? null,
  }))
}

/** Force into the support over the bar as the points of a line, on a logarithmic height. */
export function barProfile(
  evaluation: Evaluation | null,
  top: number,
  width: number,
  height: number,
): string {
  const sweep = evaluation?.response?.sweep
  if (!sweep || width < 2) return ''
  const range = profileRange(sweep.supportForce)
  if (!range) return ''
  const points: string[] = []
  for (const index of thin(sweep.speed, sweep.supportForce, Math.round(width / 3), { from: 0, to: top })) {
    const force = Math.max(range.min, sweep.supportForce[index] ?? 0)
    const share = Math.log(force / range.min) / Math.log(range.max / range.min)
    const x = ((sweep.speed[index] ?? 0) / top) * width
    points.push(`${x.toFixed(1)},${((1 - Math.min(1, share)) * height).toFixed(1)}`)
  }
  return points.join(' ')
}

function profileRange(force: Float64Array): AxisRange | null {
  let max = 0
  for (const value of force) if (Number.isFinite(value)) max = Math.max(max, value)
  return max > 0 ? { min: max * 1e-3, max } : null
}

/**
 * Where a key takes the cursor [rad/s], or null when the key means nothing here.
 * Page keys go from crossing to crossing.
 */
export function keyTarget(
  key: string,
  coarse: boolean,
  speed: number,
  top: number,
  project: Project,
  crossings: readonly BarCrossing[],
): number | null {
  const rpm = factorOf('shaftSpeed', 'SI')
  const step = Math.max(1, Math.round((top * KEY_STEP) / rpm)) * rpm * (coarse ? 10 : 1)
  const clear = 0.5 * rpm
  switch (key) {
    case 'ArrowRight':
    case 'ArrowUp':
      return Math.min(top, roundTo(speed + step, rpm))
    case 'ArrowLeft':
    case 'ArrowDown':
      return Math.max(0, roundTo(speed - step, rpm))
    case 'Home':
      return 0
    case 'End':
      return top
    case 'PageUp':
      return crossings.find((crossing) => crossing.speed > speed + clear)?.speed ?? top
    case 'PageDown':
      return crossings.findLast((crossing) => crossing.speed < speed - clear)?.speed ?? 0
    case 'Enter':
      return project.machine.duty.runningSpeed
    default:
      return null
  }
}

/** To whole revolutions per minute, so that what is read is what is set. */
export function roundTo(speed: number, unit: number): number {
  return Math.round(speed / unit) * unit
}
