/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Poles } from '../network/poles.ts'
import { TERMS, type Panel, type PanelWork } from './panel.ts'
import type { Watch, WatchAxis, WatchSize } from './watch.ts'

/** Powers that are added up before their size is taken; of the higher ones, state by state. */
const HEAD = 8

/**
 * What bounds the motion over every panel without following it: no power series is larger on -1 to 1
 * than the sum of its coefficients' sizes. Velocity is P' / half + i rate P.
 */
export interface PanelBounds {
  readonly modes: number
  readonly count: number
  readonly panels: number
  /** of the forced motion: order o, panel p, mode r at (o panels + p) modes + r */
  readonly displacement: Float64Array
  readonly velocity: Float64Array
  /** lowest powers: power k at ((o panels + p) modes + r) HEAD + k; the rest's size, and its derivative's */
  readonly headRe: Float64Array
  readonly headIm: Float64Array
  readonly tail: Float64Array
  readonly tailSlope: Float64Array
  /** order · speed in the panel's middle [rad/s]: order o, panel p at o panels + p */
  readonly rate: Float64Array
  /** exp(-i order rest) in the same powers, by which the motion is turned back to the true phase */
  readonly turnRe: Float64Array
  readonly turnIm: Float64Array
  /** one direction's powers, while they are bounded */
  readonly oneRe: Float64Array
  readonly oneIm: Float64Array
  /** of the free vibrations, and of the whole motion of slow states: state j at (o panels + p) count + j */
  readonly free: Float64Array
}

export function panelBounds({ modes, count }: Poles, orders: number, panels: number): PanelBounds {
  const make = (size: number) => new Float64Array(orders * panels * size)
  return {
    modes,
    count,
    panels,
    displacement: make(modes),
    velocity: make(modes),
    headRe: make(modes * HEAD),
    headIm: make(modes * HEAD),
    tail: make(modes),
    tailSlope: make(modes),
    rate: make(1),
    turnRe: make(HEAD),
    turnIm: make(HEAD),
    oneRe: new Float64Array(HEAD),
    oneIm: new Float64Array(HEAD),
    free: make(count),
  }
}

/** Takes the bounds of one panel of an order. @param half its half length [s] */
export function boundPanel(
  bounds: PanelBounds,
  { panel, force }: PanelWork,
  poles: Poles,
  half: number,
  o: number,
  p: number,
): void {
  const { modes, count, displacement, velocity, headRe, headIm, tail, tailSlope } = bounds
  const { forcedRe, forcedIm, freeRe, freeIm, terms } = panel
  const block = o * bounds.panels + p
  const rate = Math.abs(panel.rate[0]!)
  bounds.rate[block] = panel.rate[0]!
  const { baseRe, baseIm } = force
  for (let k = 0; k < HEAD; k++) {
    bounds.turnRe[block * HEAD + k] = baseRe[k]!
    bounds.turnIm[block * HEAD + k] = -baseIm[k]!
  }
  headRe.fill(0, block * modes * HEAD, (block + 1) * modes * HEAD)
  headIm.fill(0, block * modes * HEAD, (block + 1) * modes * HEAD)
  for (let j = 0; j < count; j++) {
    if (panel.slow[j] === 1) {
      // near a resonance forced and free motion of a state all but cancel: bounded apart they mean nothing
      bounds.free[block * count + j] = wholeBound(panel, j)
      continue
    }
    bounds.free[block * count + j] = Math.sqrt(freeRe[j]! * freeRe[j]! + freeIm[j]! * freeIm[j]!)
    let rest = 0
    let restSlope = 0
    for (let k = HEAD; k < terms[j]!; k++) {
      const x = forcedRe[j * TERMS + k]!
      const y = forcedIm[j * TERMS + k]!
      const size = Math.sqrt(x * x + y * y)
      rest += size
      restSlope += k * size
    }
    for (let r = 0; r < modes; r++) {
      const a = poles.shapeRe[r * count + j]!
      const b = poles.shapeIm[r * count + j]!
      if (a === 0 && b === 0) continue
      const to = (block * modes + r) * HEAD
      for (let k = 0; k < HEAD; k++) {
        const x = forcedRe[j * TERMS + k]!
        const y = forcedIm[j * TERMS + k]!
        headRe[to + k]! += a * x - b * y
        headIm[to + k]! += a * y + b * x
      }
      const part = Math.sqrt(a * a + b * b)
      tail[block * modes + r]! += part * rest
      tailSlope[block * modes + r]! += part * restSlope
    }
  }
  for (let r = 0; r < modes; r++) {
    const at = block * modes + r
    let size = tail[at]!
    let slope = tailSlope[at]!
    for (let k = at * HEAD; k < (at + 1) * HEAD; k++) {
      const one = Math.sqrt(headRe[k]! * headRe[k]! + headIm[k]! * headIm[k]!)
      size += one
      slope += (k - at * HEAD) * one
    }
    displacement[at] = size
    velocity[at] = slope / half + rate * size
  }
}

/** Samples of a slow state, evenly from end to end. */
const SAMPLES = 9

/**
 * Bound of |v| from samples: between two of them it exceeds the larger by at most step² / 8 of its second
 * derivative, and v'' = kappa² v + kappa g + g', with g read back from the powers of P.
 */
function wholeBound(
  { forcedRe, forcedIm, freeRe, freeIm, kappaRe, kappaIm, terms }: Panel,
  j: number,
): number {
  const at = j * TERMS
  const a = kappaRe[j]!
  const b = kappaIm[j]!
  const kappa = Math.sqrt(a * a + b * b)
  let force = 0
  let forceSlope = 0
  for (let k = 0; k < terms[j]!; k++) {
    const p = forcedRe[at + k]!
    const q = forcedIm[at + k]!
    const above = k + 1 < terms[j]! ? k + 1 : 0
    const x = above * forcedRe[at + above]! - (a * p - b * q)
    const y = above * forcedIm[at + above]! - (a * q + b * p)
    const size = Math.sqrt(x * x + y * y)
    force += size
    forceSlope += k * size
  }
  let largest = 0
  for (let i = 0; i < SAMPLES; i++) {
    const x = -1 + (2 * i) / (SAMPLES - 1)
    let re = 0
    let im = 0
    for (let k = terms[j]! - 1; k >= 0; k--) {
      re = re * x + forcedRe[at + k]!
      im = im * x + forcedIm[at + k]!
    }
    const decay = Math.exp(a * (x + 1))
    const cos = decay * Math.cos(b * (x + 1))
    const sin = decay * Math.sin(b * (x + 1))
    re += freeRe[j]! * cos - freeIm[j]! * sin
    im += freeRe[j]! * sin + freeIm[j]! * cos
    largest = Math.max(largest, Math.sqrt(re * re + im * im))
  }
  const eighth = 0.5 / (SAMPLES - 1) ** 2
  return (largest + eighth * (kappa * force + forceSlope)) / (1 - eighth * kappa * kappa)
}

/** Upper bound of a quantity over a panel, every mode by itself. */
export function roughBound(
  bounds: PanelBounds,
  size: WatchSize,
  moves: boolean,
  orders: number,
  p: number,
): number {
  const { modes, count, panels, displacement, velocity, free } = bounds
  let bound = 0
  for (let o = 0; o < orders; o++) {
    const block = o * panels + p
    for (let r = 0; r < modes; r++) {
      bound += size.displacement[r]! * displacement[block * modes + r]!
      if (moves) bound += size.velocity[r]! * velocity[block * modes + r]!
    }
    for (let j = 0; j < count; j++) bound += size.state[j]! * free[block * count + j]!
  }
  return bound
}

/**
 * Closer ones, modes taken together, written to `target`: of the directions and the resultant that are
 * wanted (1).
 */
export function closeBounds(
  bounds: PanelBounds,
  watch: Watch,
  half: number,
  orders: number,
  p: number,
  wanted: Uint8Array,
  target: Float64Array,
): void {
  const { axes } = watch
  const all = wanted[axes.length] === 1
  target.fill(0)
  for (let o = 0; o < orders; o++) {
    const block = o * bounds.panels + p
    let square = 0
    for (let d = 0; d < axes.length; d++) {
      if (!all && wanted[d] !== 1) continue
      const forced = forcedBound(bounds, watch, axes[d]!, half, block)
      square += forced * forced
      target[d]! += forced + freeBound(bounds, axes[d]!.size, block)
    }
    if (all) target[axes.length]! += Math.sqrt(square) + freeBound(bounds, watch.all, block)
  }
}

function freeBound({ count, free }: PanelBounds, { state }: WatchSize, block: number): number {
  let sum = 0
  for (let j = 0; j < count; j++) sum += state[j]! * free[block * count + j]!
  return sum
}

/**
 * Against the true phase the motion hardly turns within a panel, so that its powers fall fast. The
 * powers below HEAD of the product are exact; what they leave is bounded factor by factor.
 */
function forcedBound(
  bounds: PanelBounds,
  { moves }: Watch,
  axis: WatchAxis,
  half: number,
  block: number,
): number {
  const { modes, tail, tailSlope, rate, turnRe, turnIm, oneRe, oneIm } = bounds
  const turning = moves ? rate[block]! : 0
  combineHeads(bounds, axis, moves, turning, half, block)
  const turn = block * HEAD
  let bound = 0
  for (let k = 0; k < HEAD; k++) {
    let x = 0
    let y = 0
    for (let i = 0; i <= k; i++) {
      const c = turnRe[turn + k - i]!
      const s = turnIm[turn + k - i]!
      x += oneRe[i]! * c - oneIm[i]! * s
      y += oneRe[i]! * s + oneIm[i]! * c
    }
    bound += Math.sqrt(x * x + y * y)
  }
  // from power m on, all sizes of the turn; its powers beyond HEAD are a small share of the last ones
  let from = 0
  for (let m = HEAD - 1; m >= 0; m--) {
    const c = turnRe[turn + m]!
    const s = turnIm[turn + m]!
    from += Math.sqrt(c * c + s * s) * (m === HEAD - 1 || m === HEAD - 2 ? BEYOND : 1)
    const i = HEAD - m
    if (i < HEAD) bound += from * Math.sqrt(oneRe[i]! * oneRe[i]! + oneIm[i]! * oneIm[i]!)
  }
  let rest = 0
  for (let r = 0; r < modes; r++) {
    const at = block * modes + r
    rest += axis.size.displacement[r]! * tail[at]!
    if (moves) rest += axis.velocity[r]! * (Math.abs(turning) * tail[at]! + tailSlope[at]! / half)
  }
  return bound + from * rest
}

/** The panels' bend is so small that each power of the turn is under a fifth of the last but one. */
const BEYOND = 1.25

/** One direction's lowest powers: weights times displacement, and velocity = P' / half + i rate P. */
function combineHeads(
  { modes, headRe, headIm, oneRe, oneIm }: PanelBounds,
  { re, im, velocity }: WatchAxis,
  moves: boolean,
  turning: number,
  half: number,
  block: number,
): void {
  oneRe.fill(0)
  oneIm.fill(0)
  for (let r = 0; r < modes; r++) {
    const at = (block * modes + r) * HEAD
    const own = re[r]!
    const across = im[r]! + turning * velocity[r]!
    for (let k = 0; k < HEAD; k++) {
      oneRe[k]! += own * headRe[at + k]! - across * headIm[at + k]!
      oneIm[k]! += own * headIm[at + k]! + across * headRe[at + k]!
    }
    if (!moves) continue
    for (let k = 0; k < HEAD - 1; k++) {
      const along = ((k + 1) * velocity[r]!) / half
      oneRe[k]! += along * headRe[at + k + 1]!
      oneIm[k]! += along * headIm[at + k + 1]!
    }
  }
}
