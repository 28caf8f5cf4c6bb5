/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { addAmplitudes } from './amplitude.ts'
import { FORCED, sampleStart, type Motion } from './motion.ts'
import type { Watch, WatchSize } from './watch.ts'

/** One watched quantity at one sample of the motion. */
export interface Signal {
  /** amplitude by direction, then the resultant's peak; orders added up */
  readonly value: Float64Array
  /** the same of the forced motion alone */
  readonly forced: Float64Array
  /** bounds of the free vibration and of its fourth derivative by x from here on */
  readonly free: Float64Array
  readonly freeFourth: Float64Array
  /** the motion itself and its derivative by x: order o, direction d at o 3 + d */
  readonly re: Float64Array
  readonly im: Float64Array
  readonly slopeRe: Float64Array
  readonly slopeIm: Float64Array
  /** the forced motion's directions of one order */
  readonly forcedRe: Float64Array
  readonly forcedIm: Float64Array
}

export function emptySignal(orders: number): Signal {
  const make = (size: number) => new Float64Array(size)
  return {
    value: make(4),
    forced: make(4),
    free: make(4),
    freeFourth: make(4),
    re: make(3 * orders),
    im: make(3 * orders),
    slopeRe: make(3 * orders),
    slopeIm: make(3 * orders),
    forcedRe: make(3),
    forcedIm: make(3),
  }
}

/** Reads a quantity at a sample. */
export function readSignal(motion: Motion, watch: Watch, sample: number, target: Signal): void {
  const axes = watch.axes.length
  target.value.fill(0)
  for (let o = 0; o < motion.orders; o++) {
    const start = sampleStart(motion, sample, o)
    for (let d = 0; d < axes; d++) {
      weigh(motion, watch, d, o, start, target.re, target.im, 3 * o + d)
      weigh(motion, watch, d, o, start + 2 * motion.modes, target.slopeRe, target.slopeIm, 3 * o + d)
    }
    addAmplitudes(axes, target.re, target.im, 3 * o, target.value, 0)
  }
}

/** Amplitudes of the forced motion alone, without derivatives; leaves the motion itself as it is. */
export function readForced(motion: Motion, watch: Watch, sample: number, target: Signal): void {
  const axes = watch.axes.length
  const { forced, forcedRe, forcedIm } = target
  forced.fill(0)
  for (let o = 0; o < motion.orders; o++) {
    const start = sampleStart(motion, sample, o)
    for (let d = 0; d < axes; d++)
      weigh(motion, watch, d, o, start + FORCED * motion.modes, forcedRe, forcedIm, d)
    addAmplitudes(axes, forcedRe, forcedIm, 0, forced, 0)
  }
}

/**
 * One direction from the modes' curve that begins at `from` and its derivative by x, which stands
 * behind it. In turning axes velocity is derivative / half + i rate displacement.
 */
function weigh(
  { data, modes, panels, half }: Motion,
  watch: Watch,
  d: number,
  o: number,
  from: number,
  targetRe: Float64Array,
  targetIm: Float64Array,
  at: number,
): void {
  const { re, im, velocity } = watch.axes[d]!
  let p = 0
  let q = 0
  for (let r = 0; r < modes; r++) {
    p += re[r]! * data[from + r]!
    q += re[r]! * data[from + modes + r]!
  }
  if (watch.turns || watch.moves) {
    const rate = watch.moves ? panels[o]!.panel.rate[0]! : 0
    const perTime = watch.moves ? 1 / half : 0
    const slope = from + 2 * modes
    for (let r = 0; r < modes; r++) {
      const across = im[r]! + rate * velocity[r]!
      const along = perTime * velocity[r]!
      p += along * data[slope + r]! - across * data[from + modes + r]!
      q += along * data[slope + modes + r]! + across * data[from + r]!
    }
  }
  targetRe[at] = p
  targetIm[at] = q
}

/** Bound of the free vibrations of a quantity from a sample on. */
export function freeBound(motion: Motion, { state }: WatchSize, sample: number): number {
  return weighStates(motion, state, motion.free, sample)
}

/** Bound of their fourth derivative by x from a sample on. */
export function freeFourthBound(motion: Motion, { state }: WatchSize, sample: number): number {
  return weighStates(motion, state, motion.freeFourth, sample)
}

/** Bound of the forced motion's fourth derivative. */
export function fourthBound(motion: Motion, watch: Watch, size: WatchSize): number {
  return weighModes(motion, watch, size, 4)
}

/** Bound of the forced motion's second derivative. */
export function secondBound(motion: Motion, watch: Watch, size: WatchSize): number {
  return weighModes(motion, watch, size, 2)
}

function weighModes(
  { orders, modes, derivatives, panels, half }: Motion,
  { moves }: Watch,
  size: WatchSize,
  derivative: 2 | 4,
): number {
  const block = orders * modes
  const own = (derivative - 2) * block
  let sum = 0
  for (let o = 0; o < orders; o++) {
    const rate = Math.abs(panels[o]!.panel.rate[0]!)
    for (let r = 0; r < modes; r++) {
      const at = own + o * modes + r
      sum += size.displacement[r]! * derivatives[at]!
      if (moves) sum += size.velocity[r]! * (derivatives[at + block]! / half + rate * derivatives[at]!)
    }
  }
  return sum
}

function weighStates(motion: Motion, size: Float64Array, sizes: Float64Array, sample: number): number {
  const { active, activeCount, data, orders, stride } = motion
  const { count } = motion.march.poles
  let sum = 0
  for (let o = 0; o < orders; o++) {
    const decays = sampleStart(motion, sample, o) + stride - count
    for (let i = 0; i < activeCount[o]!; i++) {
      const j = active[o * count + i]!
      sum += size[j]! * sizes[o * count + j]! * data[decays + j]!
    }
  }
  return sum
}
