/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import { orderLoadCase, type Observed } from '../excitation/observed.ts'
import type { SourceLoad } from '../excitation/order-loads.ts'
import type { Poles } from '../network/poles.ts'

/** One order's force on every state, each complex: constant + squared · w² + inertial · (w² - i w'), w = order · speed. */
export interface StateLoad {
  readonly order: number
  readonly constantRe: Float64Array
  readonly constantIm: Float64Array
  readonly squaredRe: Float64Array
  readonly squaredIm: Float64Array
  readonly inertialRe: Float64Array
  readonly inertialIm: Float64Array
}

/** A share of a mode's force below which it is what rounding left of a force that cancels. */
const CANCELLED = 1e-13

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
  const onStates = (re: Float64Array, im: Float64Array) =>
    forceOnStates(poles, observed.solver.shapes, re, im)
  const [constantRe, constantIm] = onStates(rest.constantRe, rest.constantIm)
  const [squaredRe, squaredIm] = onStates(rest.squaredRe, rest.squaredIm)
  const [inertialRe, inertialIm] = onStates(inertial.squaredRe, inertial.squaredIm)
  return { order, constantRe, constantIm, squaredRe, squaredIm, inertialRe, inertialIm }
}

function forceOnStates(
  poles: Poles,
  shapes: Float64Array,
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
    // a mode that is driven by rounding only would have no bound without damping
    if (Math.abs(a) + Math.abs(b) <= CANCELLED * size) continue
    for (let j = 0; j < poles.count; j++) {
      const c = poles.inputRe[j * n + r]!
      const d = poles.inputIm[j * n + r]!
      re[j]! += a * c - b * d
      im[j]! += a * d + b * c
    }
  }
  return [re, im]
}
