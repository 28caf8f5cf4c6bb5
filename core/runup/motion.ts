/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { refill, type March } from './march.ts'
import { panelWork, TERMS, type PanelWork } from './panel.ts'

/** Samples kept of one panel; further ones are computed each time they are asked for. */
const CAPACITY = { exact: 8, fine: 160, quick: 48 } as const
/** Free vibrations smaller than this share of all motion of the panel are left out. */
const NEGLIGIBLE = { exact: 1e-13, fine: 1e-9, quick: 1e-5 } as const
type Accuracy = keyof typeof NEGLIGIBLE
/** Curves kept of each mode, re and im: displacement, its first and second derivative by x, its forced part and that one's derivative. */
const CURVES = 10
/** Where the forced part stands among them. */
export const FORCED = 6

/**
 * Motion of the modes over one panel, sampled where it is asked for. Intervals are halved, so that all
 * quantities that are searched in a panel meet at the same samples.
 */
export interface Motion {
  readonly march: March
  readonly orders: number
  readonly modes: number
  readonly accuracy: Accuracy
  /** whether velocities, and so second derivatives, are wanted */
  readonly velocity: boolean
  readonly panels: readonly PanelWork[]
  /** sample s of order o begins at (s orders + o) stride */
  readonly data: Float64Array
  readonly stride: number
  /** middles of the two halves of the interval whose middle a sample is; -1: not yet there */
  readonly left: Int32Array
  readonly right: Int32Array
  count: number
  /** half the length of the panel in hand [s] */
  half: number
  /** bounds of the forced motion's derivatives by x: derivative n from 2 to 5 of mode r of order o at ((n - 2) orders + o) modes + r */
  readonly derivatives: Float64Array
  /** states of each order that vibrate freely, and how many */
  readonly active: Int32Array
  readonly activeCount: Int32Array
  /** size of the free vibrations at the panel's begin and of their fourth derivative, state j of order o at o count + j */
  readonly free: Float64Array
  readonly freeFourth: Float64Array
}

/** Samples that every panel has: its begin and end. The middle of the whole is a half of `WHOLE`. */
export const BEGIN = 0
export const END = 1
export const WHOLE = 2
const FIRST_FREE = 3

export function motionOf(march: March, velocity: boolean, accuracy: Accuracy = 'fine'): Motion {
  const capacity = CAPACITY[accuracy]
  const orders = march.loads.length
  const { modes, count } = march.poles
  const stride = CURVES * modes + count
  const make = (size: number) => new Float64Array(size)
  return {
    march,
    orders,
    modes,
    accuracy,
    velocity,
    panels: march.loads.map(() => panelWork(march.poles, march.plan.degree)),
    data: make((capacity + 1) * orders * stride),
    stride,
    left: new Int32Array(capacity),
    right: new Int32Array(capacity),
    count: 0,
    half: 1,
    derivatives: make(4 * orders * modes),
    active: new Int32Array(orders * count),
    activeCount: new Int32Array(orders),
    free: make(orders * count),
    freeFourth: make(orders * count),
  }
}

/** Takes a panel in hand, with samples at its begin and end. */
export function enterPanel(motion: Motion, panel: number): void {
  const { march, orders, panels } = motion
  const { count } = march.poles
  for (let o = 0; o < orders; o++) {
    refill(march, o, panel, panels[o]!)
    const own = panels[o]!.panel
    boundDerivatives(motion, own.modesRe, own.modesIm, o)
    for (let j = 0; j < count; j++) {
      const size = Math.hypot(own.freeRe[j]!, own.freeIm[j]!)
      const square = own.kappaRe[j]! ** 2 + own.kappaIm[j]! ** 2
      motion.free[o * count + j] = size
      motion.freeFourth[o * count + j] = size * square * square
    }
    dropSmall(motion, o)
  }
  motion.half = march.plan.half[panel]!
  motion.count = FIRST_FREE
  fillSample(motion, BEGIN, -1)
  fillSample(motion, END, 1)
  motion.left[WHOLE] = -1
}

/** Vibrations that are nothing beside the others and the forced motion are left out from here on. */
function dropSmall({ panels, march, free, active, activeCount, accuracy }: Motion, o: number): void {
  const { count } = march.poles
  const { panel } = panels[o]!
  let largest = 0
  for (let j = 0; j < count; j++) {
    const forced = Math.abs(panel.forcedRe[j * TERMS]!) + Math.abs(panel.forcedIm[j * TERMS]!)
    largest = Math.max(largest, free[o * count + j]!, forced)
  }
  let kept = 0
  for (let j = 0; j < count; j++) {
    if (free[o * count + j]! > NEGLIGIBLE[accuracy] * largest) active[o * count + kept++] = j
  }
  activeCount[o] = kept
}

function boundDerivatives(
  { derivatives, orders, modes }: Motion,
  re: Float64Array,
  im: Float64Array,
  o: number,
): void {
  const block = orders * modes
  for (let r = 0; r < modes; r++) {
    let two = 0
    let three = 0
    let four = 0
    let five = 0
    for (let k = 2; k < TERMS; k++) {
      const p = re[r * TERMS + k]!
      const q = im[r * TERMS + k]!
      const twice = k * (k - 1) * Math.sqrt(p * p + q * q)
      two += twice
      three += (k - 2) * twice
      four += (k - 2) * (k - 3) * twice
      five += (k - 2) * (k - 3) * (k - 4) * twice
    }
    const at = o * modes + r
    derivatives[at] = two
    derivatives[block + at] = three
    derivatives[2 * block + at] = four
    derivatives[3 * block + at] = five
  }
}

/** Middle of an interval's half: the sample, made when it is first asked for. */
export function halfOf(motion: Motion, parent: number, side: 'left' | 'right', x: number): number {
  const capacity = motion.left.length
  const known = parent < capacity ? motion[side][parent]! : -1
  if (known >= 0) return known
  if (parent >= capacity || motion.count >= capacity) return sampleAt(motion, x)
  const sample = motion.count++
  motion[side][parent] = sample
  motion.left[sample] = -1
  motion.right[sample] = -1
  fillSample(motion, sample, x)
  return sample
}

/** A sample anywhere, good until the next of its kind. */
export function sampleAt(motion: Motion, x: number): number {
  const scratch = motion.left.length
  fillSample(motion, scratch, x)
  return scratch
}

/** Where the curves of a sample and order begin: curve c of mode r at c modes + r, then the states' decay. */
export const sampleStart = ({ orders, stride }: Motion, sample: number, o: number): number =>
  (sample * orders + o) * stride

function fillSample(motion: Motion, sample: number, x: number): void {
  for (let o = 0; o < motion.orders; o++) {
    const start = sampleStart(motion, sample, o)
    forcedAt(motion, o, x, start)
    vibrationsAt(motion, o, x, start)
  }
}

/** Value and derivatives together, from the highest power down. */
function forcedAt({ panels, modes, data, velocity }: Motion, o: number, x: number, start: number): void {
  const { modesRe, modesIm, top } = panels[o]!.panel
  for (let r = 0; r < modes; r++) {
    const first = r * TERMS
    let re = 0
    let im = 0
    let slopeRe = 0
    let slopeIm = 0
    let bendRe = 0
    let bendIm = 0
    if (velocity) {
      for (let k = first + top[0]!; k >= first; k--) {
        bendRe = bendRe * x + slopeRe
        bendIm = bendIm * x + slopeIm
        slopeRe = slopeRe * x + re
        slopeIm = slopeIm * x + im
        re = re * x + modesRe[k]!
        im = im * x + modesIm[k]!
      }
    } else {
      for (let k = first + top[0]!; k >= first; k--) {
        slopeRe = slopeRe * x + re
        slopeIm = slopeIm * x + im
        re = re * x + modesRe[k]!
        im = im * x + modesIm[k]!
      }
    }
    const at = start + r
    data[at] = data[at + 6 * modes] = re
    data[at + modes] = data[at + 7 * modes] = im
    data[at + 2 * modes] = slopeRe
    data[at + 3 * modes] = slopeIm
    data[at + 4 * modes] = 2 * bendRe
    data[at + 5 * modes] = 2 * bendIm
    data[at + 8 * modes] = slopeRe
    data[at + 9 * modes] = slopeIm
  }
}

function vibrationsAt(motion: Motion, o: number, x: number, start: number): void {
  const { modes, data, velocity, active, activeCount } = motion
  const { count, shapeRe, shapeIm } = motion.march.poles
  const { freeRe, freeIm, kappaRe, kappaIm } = motion.panels[o]!.panel
  const decays = start + CURVES * modes
  for (let i = 0; i < activeCount[o]!; i++) {
    const j = active[o * count + i]!
    const a = kappaRe[j]!
    const b = kappaIm[j]!
    const decay = Math.exp(a * (x + 1))
    data[decays + j] = decay
    const cos = decay * Math.cos(b * (x + 1))
    const sin = decay * Math.sin(b * (x + 1))
    const v = freeRe[j]! * cos - freeIm[j]! * sin
    const w = freeRe[j]! * sin + freeIm[j]! * cos
    for (let r = 0; r < modes; r++) {
      const c = shapeRe[r * count + j]!
      const d = shapeIm[r * count + j]!
      if (c === 0 && d === 0) continue
      const p = c * v - d * w
      const q = c * w + d * v
      const at = start + r
      data[at]! += p
      data[at + modes]! += q
      const slopeRe = a * p - b * q
      const slopeIm = a * q + b * p
      data[at + 2 * modes]! += slopeRe
      data[at + 3 * modes]! += slopeIm
      if (!velocity) continue
      data[at + 4 * modes]! += a * slopeRe - b * slopeIm
      data[at + 5 * modes]! += a * slopeIm + b * slopeRe
    }
  }
}
