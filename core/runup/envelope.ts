/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { March } from './march.ts'
import { enterPanel, motionOf, sampleAt, type Motion } from './motion.ts'
import { emptySignal, readSignal } from './signal.ts'
import { speedsAt } from './speed-course.ts'
import type { Watch } from './watch.ts'

/** Samples of a smooth panel and of the whole at least, per beat of a free vibration, and of any panel at most. */
const SMOOTH = 8
const LEAST_OF_ALL = 240
const PER_BEAT = 8
const MOST_PER_PANEL = 600
/** Free vibrations below this share of the peak do not show on a chart. */
const VISIBLE = 2e-3

export interface Curve {
  readonly time: Float64Array
  readonly speed: Float64Array
  readonly value: Float64Array
}

/** @param value its peak, which the curve then holds exactly, at position `x` of `panel` */
interface Top {
  readonly value: number
  readonly panel: number
  readonly x: number
}

/**
 * A watched resultant against time, about `samples` long: dense enough for the beats that show, then
 * thinned so that every stretch of time keeps its lowest and its highest sample.
 */
export function envelopeOf(march: March, watch: Watch, top: Top, samples: number): Curve {
  const { plan } = march
  const motion = motionOf(march, watch.moves)
  const signal = emptySignal(march.loads.length)
  const resultant = watch.axes.length === 1 ? 0 : watch.axes.length
  const time: number[] = []
  const value: number[] = []
  const put = (panel: number, x: number) => {
    readSignal(motion, watch, sampleAt(motion, x), signal)
    time.push(plan.time[panel]! + plan.half[panel]! * x)
    value.push(signal.value[resultant]!)
  }
  for (let panel = 0; panel < plan.count; panel++) {
    enterPanel(motion, panel)
    const count = samplesFor(motion, watch, top.value)
    for (let i = 0; i < count; i++) {
      const x = -1 + (2 * i) / count
      const next = x + 2 / count
      put(panel, x)
      if (panel === top.panel && top.x > x && top.x < next) put(panel, top.x)
    }
    if (panel === plan.count - 1) put(panel, 1)
  }
  const kept = thin(Float64Array.from(value), samples)
  const speed = speedsAt(march.plan.course, time)
  return {
    time: Float64Array.from(kept, (i) => time[i]!),
    speed: Float64Array.from(kept, (i) => speed[i]!),
    value: Float64Array.from(kept, (i) => value[i]!),
  }
}

function samplesFor({ panels, free, march, orders }: Motion, watch: Watch, peak: number): number {
  const { count } = march.poles
  let beats = 0
  for (let o = 0; o < orders; o++) {
    for (let j = 0; j < count; j++) {
      if (watch.all.state[j]! * free[o * count + j]! < VISIBLE * peak) continue
      beats = Math.max(beats, Math.abs(panels[o]!.panel.kappaIm[j]!) / Math.PI)
    }
  }
  return Math.min(
    MOST_PER_PANEL,
    Math.max(SMOOTH, Math.ceil(LEAST_OF_ALL / march.plan.count), Math.ceil(PER_BEAT * beats)),
  )
}

/** Indices kept: of each stretch of samples the first, the lowest and the highest, in their order. */
export function thin(value: Float64Array, samples: number): readonly number[] {
  const all = Array.from(value, (_, i) => i)
  if (value.length <= samples) return all
  const stretch = value.length / Math.max(1, Math.floor((samples - 1) / 2))
  const kept = new Set<number>([0, value.length - 1])
  for (let begin = 0; begin < value.length; begin += stretch) {
    const from = Math.floor(begin)
    const to = Math.min(value.length, Math.floor(begin + stretch))
    let low = from
    let high = from
    for (let i = from; i < to; i++) {
      if (value[i]! < value[low]!) low = i
      if (value[i]! > value[high]!) high = i
    }
    if (to > from) kept.add(low).add(high)
  }
  return all.filter((i) => kept.has(i))
}
