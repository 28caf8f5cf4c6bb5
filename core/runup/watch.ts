/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Observed } from '../excitation/observed.ts'
import { orderLoadCase } from '../excitation/observed.ts'
import type { SourceLoad } from '../excitation/order-loads.ts'
import type { AssembledElement, System } from '../network/assemble.ts'
import { branchRow, type SparseRow } from '../network/kinematics.ts'
import { steadyPart, varies, varyingPart } from '../network/laws.ts'
import type { Poles } from '../network/poles.ts'
import type { StateLoad } from './panel.ts'

/**
 * A quantity that is watched: one or three directions, each a sum over the states with complex
 * weights. Judged by each direction's amplitude and, of three, by the resultant's peak.
 */
export interface Watch {
  readonly axes: readonly WatchAxis[]
  /** per state the length of its weights over the directions */
  readonly size: Float64Array
}
export interface WatchAxis {
  readonly re: Float64Array
  readonly im: Float64Array
  readonly size: Float64Array
}

/** How many values a quantity is judged by. */
export const objectivesOf = ({ axes }: Watch): number => (axes.length === 1 ? 1 : axes.length + 1)

/** Longer half-axis of the ellipse that a complex vector F draws: sqrt((|F|² + |F.F|) / 2). */
export function resultant(square: number, unconjugatedRe: number, unconjugatedIm: number): number {
  return Math.sqrt(
    (square + Math.sqrt(unconjugatedRe * unconjugatedRe + unconjugatedIm * unconjugatedIm)) / 2,
  )
}

/**
 * Amplitude by direction, then the resultant, orders added up, written from `to` on.
 * @param apart from one order's states to the next's
 */
export function addAmplitudes(
  watch: Watch,
  orders: number,
  count: number,
  apart: number,
  re: Float64Array,
  im: Float64Array,
  from: number,
  target: Float64Array,
  to: number,
): void {
  const axes = watch.axes.length
  target.fill(0, to, to + objectivesOf(watch))
  for (let o = 0; o < orders; o++) {
    let square = 0
    let unconjugatedRe = 0
    let unconjugatedIm = 0
    for (let d = 0; d < axes; d++) {
      const { re: wRe, im: wIm } = watch.axes[d]!
      let x = 0
      let y = 0
      for (let j = 0; j < count; j++) {
        const p = re[from + o * apart + j]!
        const q = im[from + o * apart + j]!
        x += wRe[j]! * p - wIm[j]! * q
        y += wRe[j]! * q + wIm[j]! * p
      }
      target[to + d]! += Math.sqrt(x * x + y * y)
      square += x * x + y * y
      unconjugatedRe += x * x - y * y
      unconjugatedIm += 2 * x * y
    }
    if (axes > 1) target[to + axes]! += resultant(square, unconjugatedRe, unconjugatedIm)
  }
}

/** Modal coordinates of rows over the freedoms. */
interface Modal {
  readonly poles: Poles
  /** mass-normalised shapes, freedom i of mode r at r * modes + i */
  readonly shapes: Float64Array
}

/** Displacement along each row. */
export function watchRows(modal: Modal, rows: readonly SparseRow[]): Watch {
  return watchOf(rows.map((row) => stateWeights(modal, row)))
}

/**
 * Force of an element on its carrying side, machine axes: (k + i h) displacement + c velocity of each
 * branch. Hysteretic damping keeps its own force here, k (1 + i eta) times a motion that turns with
 * the shaft, so that at a steady speed it is the force of the steady response; a stiffness that changes
 * with frequency counts as it is at each pole.
 */
export function watchForce(modal: Modal, element: AssembledElement): Watch {
  const axes = [0, 1, 2].map(() => emptyAxis(modal.poles.count))
  for (const { branch, law, row } of element.branches) {
    if (branch.motion === 'turn') continue
    const { stiffness, hysteretic, viscous } = steadyPart(law)
    const changing = varies(law)
    const travel = stateWeights(modal, row)
    for (let j = 0; j < modal.poles.count; j++) {
      const extra = changing
        ? varyingPart(law, Math.hypot(modal.poles.re[j]!, modal.poles.im[j]!))
        : { re: 0, im: 0 }
      const a = stiffness + extra.re + viscous * modal.poles.re[j]!
      const b = hysteretic + extra.im + viscous * modal.poles.im[j]!
      const re = a * travel.re[j]! - b * travel.im[j]!
      const im = a * travel.im[j]! + b * travel.re[j]!
      axes.forEach((axis, direction) => {
        const share = branch.axis[direction as 0 | 1 | 2] // three axes
        axis.re[j]! += share * re
        axis.im[j]! += share * im
      })
    }
  }
  return watchOf(axes)
}

/** Several quantities of three directions together, such as the force of all mounts. */
export function watchSum(watches: readonly Watch[]): Watch {
  const count = watches[0]?.size.length ?? 0
  return watchOf(
    [0, 1, 2].map((direction) => {
      const sum = emptyAxis(count)
      for (const watch of watches) {
        const axis = watch.axes[direction]!
        for (let j = 0; j < count; j++) {
          sum.re[j]! += axis.re[j]!
          sum.im[j]! += axis.im[j]!
        }
      }
      return sum
    }),
  )
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

function emptyAxis(count: number) {
  return { re: new Float64Array(count), im: new Float64Array(count) }
}

function watchOf(axes: readonly { readonly re: Float64Array; readonly im: Float64Array }[]): Watch {
  const count = axes[0]?.re.length ?? 0
  const withSize = axes.map(({ re, im }) => ({
    re,
    im,
    size: re.map((value, j) => Math.hypot(value, im[j]!)),
  }))
  return {
    axes: withSize,
    size: Float64Array.from({ length: count }, (_, j) => Math.hypot(...withSize.map(({ size }) => size[j]!))),
  }
}

/** A row over the freedoms as weights of the states. */
function stateWeights({ poles, shapes }: Modal, { indices, values }: SparseRow) {
  const weights = emptyAxis(poles.count)
  for (let r = 0; r < poles.modes; r++) {
    let motion = 0
    for (let i = 0; i < indices.length; i++) motion += values[i]! * shapes[r * poles.modes + indices[i]!]!
    if (motion === 0) continue
    for (let j = 0; j < poles.count; j++) {
      weights.re[j]! += motion * poles.shapeRe[r * poles.count + j]!
      weights.im[j]! += motion * poles.shapeIm[r * poles.count + j]!
    }
  }
  return weights
}

/** One order's sources as forces on the states. */
export function stateLoad(
  observed: Observed,
  poles: Poles,
  order: number,
  loads: readonly SourceLoad[],
): StateLoad {
  const inertial = orderLoadCase(
    observed,
    loads.filter((load) => load.inertial === true),
  )
  const rest = orderLoadCase(
    observed,
    loads.filter((load) => load.inertial !== true),
  )
  const { shapes } = observed.solver
  const onStates = (re: Float64Array, im: Float64Array) => forceOnStates({ poles, shapes }, re, im)
  const [constantRe, constantIm] = onStates(rest.constantRe, rest.constantIm)
  const [squaredRe, squaredIm] = onStates(rest.squaredRe, rest.squaredIm)
  const [inertialRe, inertialIm] = onStates(inertial.squaredRe, inertial.squaredIm)
  return { order, constantRe, constantIm, squaredRe, squaredIm, inertialRe, inertialIm }
}

function forceOnStates(
  { poles, shapes }: Modal,
  loadRe: Float64Array,
  loadIm: Float64Array,
): readonly [Float64Array, Float64Array] {
  const n = poles.modes
  const re = new Float64Array(poles.count)
  const im = new Float64Array(poles.count)
  for (let r = 0; r < n; r++) {
    let a = 0
    let b = 0
    let size = 0
    for (let i = 0; i < n; i++) {
      const shape = shapes[r * n + i]!
      a += shape * loadRe[i]!
      b += shape * loadIm[i]!
      size += Math.abs(shape) * (Math.abs(loadRe[i]!) + Math.abs(loadIm[i]!))
    }
    // what cancels to rounding does not drive the mode: without damping it would have no bound
    if (Math.abs(a) + Math.abs(b) < 1e-13 * size) continue
    for (let j = 0; j < poles.count; j++) {
      const c = poles.inputRe[j * n + r]!
      const d = poles.inputIm[j * n + r]!
      re[j]! += a * c - b * d
      im[j]! += a * d + b * c
    }
  }
  return [re, im]
}
