/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of the sweep's length by construction */
import { respond, type LoadCase } from '../network/response.ts'
import type { ComplexParts } from '../numerics/block-combine.ts'
import { isUnbounded } from '../numerics/block-symmetric.ts'
import type { Sweep } from '../results.ts'
import {
  addPeakSquared,
  addSizeSquared,
  addVector,
  blockCurve,
  blockVector,
  readForce,
  readRow,
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
  if (curves.every(isBounded)) return sweep
  const bounded = sweep.speed.map((_, f) => (curves.some((curve) => isUnbounded(curve[f]!)) ? 0 : 1))
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
  const { supports, points, absorbers } = observed
  const omegas = speed.map((value) => order * value)
  respond(observed.solver, omegas, [load], (block) => {
    const { first, count, omega } = block
    for (const part of total) {
      part.re.fill(0)
      part.im.fill(0)
    }
    for (let m = 0; m < supports.length; m++) {
      readForce(supports[m]!, block, scratch, force)
      addVector(total, force, count)
      addPeakSquared(force, count, sums.mounts[m]!, first)
    }
    addPeakSquared(total, count, sums.support, first)
    addSizeSquared(total, count, sums.supportSize, first)
    addExcitingForce(observed, load, omega, count, sums.excitation, first)
    for (let p = 0; p < points.length; p++) {
      for (let axis = 0; axis < 3; axis++) {
        readRow(points[p]![axis]!, block, scratch)
        addVelocitySquared(scratch, omega, count, sums.points[p]![axis]!, first)
      }
    }
    for (let a = 0; a < absorbers.length; a++) {
      readRow(absorbers[a]!.stroke, block, scratch)
      addSize(scratch, count, sums.strokes[a]!, first)
    }
  })
}

function addExcitingForce(
  { machineFreedom }: Observed,
  load: LoadCase,
  omega: Float64Array,
  count: number,
  sum: Float64Array,
  first: number,
): void {
  for (let at = machineFreedom; at < machineFreedom + 3; at++) {
    const constantRe = load.constantRe[at]!
    const constantIm = load.constantIm[at]!
    const squaredRe = load.squaredRe[at]!
    const squaredIm = load.squaredIm[at]!
    for (let f = 0; f < count; f++) {
      const square = omega[f]! * omega[f]!
      const re = constantRe + square * squaredRe
      const im = constantIm + square * squaredIm
      sum[first + f]! += re * re + im * im
    }
  }
}

function addVelocitySquared(
  { re, im }: ComplexParts,
  omega: Float64Array,
  count: number,
  sum: Float64Array,
  first: number,
): void {
  for (let f = 0; f < count; f++) {
    sum[first + f]! += omega[f]! * omega[f]! * (re[f]! * re[f]! + im[f]! * im[f]!)
  }
}

function addSize({ re, im }: ComplexParts, count: number, sum: Float64Array, first: number): void {
  for (let f = 0; f < count; f++) sum[first + f]! += Math.sqrt(re[f]! * re[f]! + im[f]! * im[f]!)
}

function isBounded(curve: Float64Array): boolean {
  for (let f = 0; f < curve.length; f++) if (isUnbounded(curve[f]!)) return false
  return true
}
