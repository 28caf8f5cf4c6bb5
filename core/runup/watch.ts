/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { AssembledElement, System } from '../network/assemble.ts'
import { branchRow, type SparseRow } from '../network/kinematics.ts'
import { steadyPart, varies, varyingPart } from '../network/laws.ts'
import type { Poles } from '../network/poles.ts'

/**
 * A quantity that is watched: none, one or three directions. Each is a sum over the modes, complex
 * weights times displacement and real ones times velocity; the same stands ready as a sum over the
 * states. Judged by each direction's amplitude and, of three, by the resultant's peak.
 */
export interface Watch {
  readonly axes: readonly WatchAxis[]
  /** lengths of the weights over the directions */
  readonly all: WatchSize
  /** whether any imaginary weight, any velocity takes part */
  readonly turns: boolean
  readonly moves: boolean
}

export interface WatchSize {
  readonly displacement: Float64Array
  readonly velocity: Float64Array
  readonly state: Float64Array
}

export interface WatchAxis {
  /** by mode */
  readonly re: Float64Array
  readonly im: Float64Array
  readonly velocity: Float64Array
  /** by state */
  readonly stateRe: Float64Array
  readonly stateIm: Float64Array
  readonly size: WatchSize
}

/** Modes by which rows over the freedoms become weights. */
export interface Modal {
  readonly poles: Poles
  /** [rad²/s²] */
  readonly omegaSquared: Float64Array
  /** mass-normalised shapes, freedom i of mode r at r * modes + i */
  readonly shapes: Float64Array
}

interface ModalWeights {
  readonly re: Float64Array
  readonly im: Float64Array
  readonly velocity: Float64Array
}

/** Displacement along each row. */
export function watchRows(modal: Modal, rows: readonly SparseRow[]): Watch {
  return watchOf(
    modal.poles,
    rows.map((row) => ({ ...emptyWeights(modal.poles.modes), re: modalRow(modal, row) })),
  )
}

/**
 * Force of an element on its carrying side, machine axes: (k + i h) displacement + c velocity of each
 * branch. Hysteretic damping keeps its own force here, k (1 + i eta) times a motion that turns with
 * the shaft, so that at a steady speed it is the force of the steady response; a stiffness that changes
 * with frequency counts as it is at each mode.
 */
export function watchForce(modal: Modal, element: AssembledElement): Watch {
  return watchOf(modal.poles, forceWeights(modal, element))
}

/** Force of several elements together. */
export function watchForces(modal: Modal, elements: readonly AssembledElement[]): Watch {
  const sum = threeWeights(modal.poles.modes)
  for (const element of elements) {
    forceWeights(modal, element).forEach((weights, d) => {
      add(sum[d]!.re, weights.re)
      add(sum[d]!.im, weights.im)
      add(sum[d]!.velocity, weights.velocity)
    })
  }
  return watchOf(modal.poles, sum)
}

/** Rows of the relative displacement of an element's ends along x, y and z. */
export function travelRows(system: System, { element }: AssembledElement): readonly SparseRow[] {
  const law = element.branches[0]?.law
  if (!law) return []
  return ([0, 1, 2] as const).map((direction) =>
    branchRow(system.freedoms, element.from, element.to, {
      axis: [direction === 0 ? 1 : 0, direction === 1 ? 1 : 0, direction === 2 ? 1 : 0],
      motion: 'shift',
      law,
    }),
  )
}

function forceWeights(modal: Modal, element: AssembledElement): readonly ModalWeights[] {
  const axes = threeWeights(modal.poles.modes)
  for (const { branch, law, row } of element.branches) {
    if (branch.motion === 'turn') continue
    const { stiffness, hysteretic, viscous } = steadyPart(law)
    const changing = varies(law)
    const motion = modalRow(modal, row)
    for (let r = 0; r < motion.length; r++) {
      const extra = changing ? varyingPart(law, Math.sqrt(modal.omegaSquared[r]!)) : { re: 0, im: 0 }
      for (const d of [0, 1, 2] as const) {
        const share = branch.axis[d] * motion[r]!
        axes[d].re[r]! += share * (stiffness + extra.re)
        axes[d].im[r]! += share * (hysteretic + extra.im)
        axes[d].velocity[r]! += share * viscous
      }
    }
  }
  return axes
}

function emptyWeights(modes: number): ModalWeights {
  const make = () => new Float64Array(modes)
  return { re: make(), im: make(), velocity: make() }
}

function threeWeights(modes: number) {
  return [emptyWeights(modes), emptyWeights(modes), emptyWeights(modes)] as const
}

function add(target: Float64Array, more: Float64Array): void {
  for (let i = 0; i < target.length; i++) target[i]! += more[i]!
}

function modalRow({ poles: { modes }, shapes }: Modal, { indices, values }: SparseRow): Float64Array {
  const motion = new Float64Array(modes)
  for (let r = 0; r < modes; r++) {
    let sum = 0
    for (let i = 0; i < indices.length; i++) sum += values[i]! * shapes[r * modes + indices[i]!]!
    motion[r] = sum
  }
  return motion
}

function watchOf(poles: Poles, axes: readonly ModalWeights[]): Watch {
  const complete = axes.map((weights) => axisOf(poles, weights))
  const lengths = (count: number, of: (size: WatchSize) => Float64Array) => {
    const total = new Float64Array(count)
    for (const { size } of complete) {
      for (let i = 0; i < count; i++) total[i]! += of(size)[i]! ** 2
    }
    return total.map(Math.sqrt)
  }
  return {
    axes: complete,
    all: {
      displacement: lengths(poles.modes, (size) => size.displacement),
      velocity: lengths(poles.modes, (size) => size.velocity),
      state: lengths(poles.count, (size) => size.state),
    },
    turns: axes.some(({ im }) => im.some((value) => value !== 0)),
    moves: axes.some(({ velocity }) => velocity.some((value) => value !== 0)),
  }
}

/** A state moves mode r by shape_rj and at the rate lambda_j shape_rj. */
function axisOf(poles: Poles, { re, im, velocity }: ModalWeights): WatchAxis {
  const { modes, count } = poles
  const stateRe = new Float64Array(count)
  const stateIm = new Float64Array(count)
  for (let r = 0; r < modes; r++) {
    for (let j = 0; j < count; j++) {
      const p = poles.shapeRe[r * count + j]!
      const q = poles.shapeIm[r * count + j]!
      const a = re[r]! + velocity[r]! * poles.re[j]!
      const b = im[r]! + velocity[r]! * poles.im[j]!
      stateRe[j]! += a * p - b * q
      stateIm[j]! += a * q + b * p
    }
  }
  const length = (x: Float64Array, y: Float64Array) => x.map((value, i) => Math.sqrt(value ** 2 + y[i]! ** 2))
  return {
    re,
    im,
    velocity,
    stateRe,
    stateIm,
    size: { displacement: length(re, im), velocity: velocity.map(Math.abs), state: length(stateRe, stateIm) },
  }
}
