/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of one length by construction */
import { isUnbounded } from '../numerics/block-symmetric.ts'
import { BLOCK, respond } from '../network/response.ts'
import type { Complex, ComplexVec3, ComplexVec6, OrderResponse, SpeedResponse } from '../results.ts'
import type { Vec3 } from '../project/fields.ts'
import {
  addPeakSquared,
  addSizeSquared,
  blockCurve,
  blockVector,
  readForce,
  readRow,
  type BlockVector,
} from '../network/block-reader.ts'
import { orderLoadCase, type Observed } from './observed.ts'
import { orderVector, type SourceLoad } from './order-loads.ts'

type Orders = readonly { readonly order: number; readonly loads: readonly SourceLoad[] }[]

interface Detail {
  readonly response: OrderResponse
  /** squares for the overall values */
  readonly support: number
  readonly supportSize: number
  readonly excitation: number
  readonly mounts: readonly number[]
}

/** Whether every amplitude has a bound; none has at a resonance without damping. */
export function isBounded(response: SpeedResponse): boolean {
  const overall = [
    response.supportForce,
    ...response.mountForces,
    ...response.pointVelocity.flat(),
    ...response.strokes,
  ]
  const motion = response.orders.flatMap(({ body }) => body.flatMap(({ re, im }) => [re, im]))
  return ![...overall, ...motion].some(isUnbounded)
}

/**
 * The full complex response at given shaft speeds, order by order, with the overall values.
 * @param speeds [rad/s]
 */
export function responseAtSpeeds(
  observed: Observed,
  orders: Orders,
  speeds: readonly number[],
): readonly SpeedResponse[] {
  const details = orders.map(({ order, loads }) => detailOfOrder(observed, order, loads, speeds))
  return speeds.map((speed, index) =>
    overall(
      observed,
      speed,
      details.map((list) => list[index]!),
    ),
  )
}

function detailOfOrder(
  observed: Observed,
  order: number,
  loads: readonly SourceLoad[],
  speeds: readonly number[],
): Detail[] {
  const load = orderLoadCase(observed, loads)
  const omegas = Float64Array.from(speeds, (speed) => order * speed)
  const details: Detail[] = []
  const scratch = blockCurve()
  const forces = observed.supports.map(() => blockVector())
  const points = observed.points.map(() => blockVector())
  const masses = observed.absorbers.map(() => blockCurve())
  const strokes = observed.absorbers.map(() => blockCurve())
  respond(observed.solver, omegas, [load], (block) => {
    observed.supports.forEach((support, index) => {
      readForce(support, block, scratch, forces[index]!)
    })
    observed.points.forEach((rows, index) => {
      rows.forEach((row, axis) => {
        readRow(row, block, points[index]![axis]!)
      })
    })
    observed.absorbers.forEach(({ mass, stroke }, index) => {
      readRow(mass, block, masses[index]!)
      readRow(stroke, block, strokes[index]!)
    })
    const at = (freedom: number, f: number): Complex => ({
      re: block.motion.re[freedom * BLOCK + f]!,
      im: block.motion.im[freedom * BLOCK + f]!,
    })
    const peaks = forces.map((force) => {
      const peak = new Float64Array(BLOCK)
      addPeakSquared(force, block.count, peak, 0)
      return peak
    })
    for (let f = 0; f < block.count; f++) {
      const total = sumAt(forces, f)
      const { re, im } = orderVector(loads, block.omega[f]!)
      const excitation = sixOf((i) => ({ re: re[i]!, im: im[i]! }))
      details.push({
        response: {
          order,
          frequency: block.omega[f]! / (2 * Math.PI),
          excitation,
          body: sixOf((i) => at(observed.machineFreedom + i, f)),
          mountForces: forces.map((force) => vectorAt(force, f)),
          points: points.map((point) => vectorAt(point, f)),
          absorbers: observed.absorbers.map(({ id }, index) => ({
            id,
            mass: { re: masses[index]!.re[f]!, im: masses[index]!.im[f]! },
            stroke: { re: strokes[index]!.re[f]!, im: strokes[index]!.im[f]! },
          })),
          support: vectorAt(total, 0),
        },
        support: atOne(total, addPeakSquared),
        supportSize: atOne(total, addSizeSquared),
        excitation: squareOf(excitation.slice(0, 3)),
        mounts: peaks.map((peak) => peak[f]!),
      })
    }
  })
  return details
}

function overall(observed: Observed, speed: number, details: readonly Detail[]): SpeedResponse {
  const sum = (part: (detail: Detail) => number) => details.reduce((total, detail) => total + part(detail), 0)
  const excitation = sum((detail) => detail.excitation)
  const ratio = excitation > 0 ? Math.sqrt(sum((detail) => detail.supportSize) / excitation) : null
  return {
    speed,
    orders: details.map((detail) => detail.response),
    forceRatio: ratio,
    isolationEfficiency: ratio === null ? null : 1 - ratio,
    supportForce: Math.sqrt(sum((detail) => detail.support)),
    mountForces: observed.supports.map((_, index) => Math.sqrt(sum((detail) => detail.mounts[index]!))),
    pointVelocity: observed.points.map((_, index) => {
      const rms = (axis: 0 | 1 | 2) =>
        Math.sqrt(
          sum(({ response }) => {
            const { re, im } = response.points[index]![axis]
            return (2 * Math.PI * response.frequency) ** 2 * (re * re + im * im)
          }) / 2,
        )
      return [rms(0), rms(1), rms(2)] satisfies Vec3
    }),
    strokes: observed.absorbers.map((_, index) =>
      sum(({ response }) => {
        const { stroke } = response.absorbers[index]!
        return Math.hypot(stroke.re, stroke.im)
      }),
    ),
  }
}

/** What an adding function makes of a vector's first entry. */
function atOne(vector: BlockVector, add: typeof addPeakSquared): number {
  const sum = new Float64Array(1)
  add(vector, 1, sum, 0)
  return sum[0]!
}

function sumAt(forces: readonly BlockVector[], f: number): BlockVector {
  const total = [0, 1, 2].map((axis) => ({
    re: Float64Array.of(forces.reduce((sum, force) => sum + force[axis]!.re[f]!, 0)),
    im: Float64Array.of(forces.reduce((sum, force) => sum + force[axis]!.im[f]!, 0)),
  }))
  return [total[0]!, total[1]!, total[2]!]
}

function vectorAt(vector: BlockVector, f: number): ComplexVec3 {
  const part = (axis: 0 | 1 | 2): Complex => ({ re: vector[axis].re[f]!, im: vector[axis].im[f]! })
  return [part(0), part(1), part(2)]
}

function sixOf(entry: (index: number) => Complex): ComplexVec6 {
  return [entry(0), entry(1), entry(2), entry(3), entry(4), entry(5)]
}

function squareOf(parts: readonly Complex[]): number {
  return parts.reduce((sum, { re, im }) => sum + re * re + im * im, 0)
}
