/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of the sweep's length by construction */
import { respond } from '../network/response.ts'
import { isUnbounded } from '../numerics/block-symmetric.ts'
import type { Sweep } from '../results.ts'
import {
  addVector,
  blockCurve,
  blockVector,
  peakSquared,
  readForce,
  readRow,
  sizeSquared,
} from '../network/block-reader.ts'
import { orderLoadCase, type Observed } from './observed.ts'
import type { SourceLoad } from './order-loads.ts'

type Orders = readonly { readonly order: number; readonly loads: readonly SourceLoad[] }[]

/**
 * Curves against shaft speed. Orders act one at a time and combine as the root of the sum of
 * squares; strokes add, since their peaks may meet.
 * @param speed shaft speeds [rad/s], rising
 */
export function sweepResponse(observed: Observed, orders: Orders, speed: Float64Array): Sweep {
  const size = speed.length
  const make = () => new Float64Array(size)
  const sums = {
    support: make(),
    supportSize: make(),
    excitation: make(),
    mounts: observed.supports.map(make),
    points: observed.points.map(() => [make(), make(), make()] as const),
    strokes: observed.absorbers.map(make),
  }
  for (const { order, loads } of orders) addOrder(observed, order, loads, speed, sums)
  return withoutUnbounded({
    speed,
    forceRatio: forceRatio(sums.supportSize, sums.excitation),
    supportForce: sums.support.map(Math.sqrt),
    mountForces: sums.mounts.map((curve) => curve.map(Math.sqrt)),
    pointVelocity: sums.points.map(([x, y, z]) => [x.map(rms), y.map(rms), z.map(rms)] as const),
    strokes: sums.strokes,
  })
}

/** At a resonance without damping there is no value, and so no point on the curve. */
function withoutUnbounded(sweep: Sweep): Sweep {
  const curves = [sweep.supportForce, ...sweep.mountForces, ...sweep.pointVelocity.flat(), ...sweep.strokes]
  const bounded = sweep.speed.map((_, f) => (curves.some((curve) => isUnbounded(curve[f]!)) ? 0 : 1))
  if (bounded.every((one) => one === 1)) return sweep
  const keep = (curve: Float64Array) => curve.filter((_, f) => bounded[f] === 1)
  return {
    speed: keep(sweep.speed),
    forceRatio: sweep.forceRatio === null ? null : keep(sweep.forceRatio),
    supportForce: keep(sweep.supportForce),
    mountForces: sweep.mountForces.map(keep),
    pointVelocity: sweep.pointVelocity.map(([x, y, z]) => [keep(x), keep(y), keep(z)] as const),
    strokes: sweep.strokes.map(keep),
  }
}

function rms(sumOfPeakSquares: number): number {
  return Math.sqrt(sumOfPeakSquares / 2)
}

/** Null where no force acts at some speed (moments alone have no force to compare with). */
function forceRatio(support: Float64Array, excitation: Float64Array): Float64Array | null {
  if (!excitation.every((value) => value > 0)) return null
  return support.map((value, f) => Math.sqrt(value / excitation[f]!))
}

interface Sums {
  readonly support: Float64Array
  readonly supportSize: Float64Array
  readonly excitation: Float64Array
  readonly mounts: readonly Float64Array[]
  readonly points: readonly (readonly [Float64Array, Float64Array, Float64Array])[]
  readonly strokes: readonly Float64Array[]
}

function addOrder(
  observed: Observed,
  order: number,
  loads: readonly SourceLoad[],
  speed: Float64Array,
  sums: Sums,
): void {
  const load = orderLoadCase(observed, loads)
  const scratch = blockCurve()
  const force = blockVector()
  const total = blockVector()
  const omegas = speed.map((value) => order * value)
  respond(observed.solver, omegas, [load], (block) => {
    const { first, count, omega } = block
    for (const part of total) {
      part.re.fill(0)
      part.im.fill(0)
    }
    observed.supports.forEach((support, index) => {
      readForce(support, block, scratch, force)
      addVector(total, force, count)
      const sum = sums.mounts[index]!
      for (let f = 0; f < count; f++) sum[first + f]! += peakSquared(force, f)
    })
    for (let f = 0; f < count; f++) {
      sums.support[first + f]! += peakSquared(total, f)
      sums.supportSize[first + f]! += sizeSquared(total, f)
      sums.excitation[first + f]! += excitingForceSquared(observed, load, omega[f]!)
    }
    observed.points.forEach((rows, index) => {
      rows.forEach((row, axis) => {
        readRow(row, block, scratch)
        const sum = sums.points[index]![axis]!
        for (let f = 0; f < count; f++) {
          sum[first + f]! += omega[f]! ** 2 * (scratch.re[f]! ** 2 + scratch.im[f]! ** 2)
        }
      })
    })
    observed.absorbers.forEach(({ stroke }, index) => {
      readRow(stroke, block, scratch)
      const sum = sums.strokes[index]!
      for (let f = 0; f < count; f++) sum[first + f]! += Math.sqrt(scratch.re[f]! ** 2 + scratch.im[f]! ** 2)
    })
  })
}

function excitingForceSquared(
  { machineFreedom }: Observed,
  load: ReturnType<typeof orderLoadCase>,
  omega: number,
): number {
  let sum = 0
  const square = omega * omega
  for (let at = machineFreedom; at < machineFreedom + 3; at++) {
    const re = load.constantRe[at]! + square * load.squaredRe[at]!
    const im = load.constantIm[at]! + square * load.squaredIm[at]!
    sum += re * re + im * im
  }
  return sum
}
