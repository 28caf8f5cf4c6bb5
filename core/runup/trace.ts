/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { March } from './march.ts'
import { enterPanel, motionOf, sampleAt } from './motion.ts'
import { emptySignal, readSignal } from './signal.ts'
import type { Watch } from './watch.ts'

/** A watched quantity against time: complex, orders together, the shaft at angle 0 at the start; the motion is the real part. */
export interface Trace {
  /** by direction */
  readonly re: readonly Float64Array[]
  readonly im: readonly Float64Array[]
}

/** @param times since the start, rising, within the course [s] */
export function traceOf(march: March, watch: Watch, times: Float64Array): Trace {
  const { plan, loads } = march
  const motion = motionOf(march, watch.moves, 'exact')
  const signal = emptySignal(loads.length)
  const re = watch.axes.map(() => new Float64Array(times.length))
  const im = watch.axes.map(() => new Float64Array(times.length))
  let panel = -1
  let next = 0
  for (let i = 0; i < times.length; i++) {
    const time = times[i]!
    while (next < plan.count - 1 && time > plan.time[next]! + plan.half[next]!) next++
    if (next !== panel) enterPanel(motion, next)
    panel = next
    const half = plan.half[panel]!
    const x = (time - plan.time[panel]!) / half
    const straight = plan.angle[panel]! + half * motion.panels[0]!.force.speed[0]! * x
    readSignal(motion, watch, sampleAt(motion, x), signal)
    for (let o = 0; o < loads.length; o++) {
      const cos = Math.cos(loads[o]!.order * straight)
      const sin = Math.sin(loads[o]!.order * straight)
      for (let d = 0; d < watch.axes.length; d++) {
        re[d]![i]! += signal.re[3 * o + d]! * cos - signal.im[3 * o + d]! * sin
        im[d]![i]! += signal.re[3 * o + d]! * sin + signal.im[3 * o + d]! * cos
      }
    }
  }
  return { re, im }
}
