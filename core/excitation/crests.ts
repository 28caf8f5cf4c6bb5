/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of one length by construction */
import type { Sweep } from '../results.ts'

/** New speeds closer together than this share of the gap they stand in show the same crest. */
const SAME_CREST = 0.02

/** A crest whose 1 / value² would fall below this share of its neighbour's is a resonance without damping. */
const NO_BOUND = 1e-4

/**
 * Speeds at which the crests of curves stand between the speeds of a sweep: the top of the parabola
 * through 1 / value² at the highest of three neighbours, which a single resonance follows exactly. A
 * resonance without damping has no crest.
 * @returns rising; none where every crest is on a speed of the sweep already
 */
export function crestSpeeds({ speed, ...sweep }: Sweep): Float64Array {
  const curves = [
    ...(sweep.forceRatio === null ? [] : [sweep.forceRatio]),
    sweep.supportForce,
    ...sweep.mountForces,
    ...sweep.pointVelocity.flat(),
    ...sweep.strokes,
  ]
  const tops: { readonly at: number; readonly gap: number }[] = []
  for (const curve of curves) {
    for (let i = 1; i < speed.length - 1; i++) {
      if (!(curve[i]! > curve[i - 1]! && curve[i]! >= curve[i + 1]!)) continue
      const gap = speed[i + 1]! - speed[i - 1]!
      const at = topBetween(speed, curve, i)
      if (at !== null && Math.abs(at - speed[i]!) > SAME_CREST * gap) tops.push({ at, gap })
    }
  }
  tops.sort((a, b) => a.at - b.at)
  let last = -Infinity
  return Float64Array.from(
    tops.flatMap(({ at, gap }) => {
      if (at - last <= SAME_CREST * gap) return []
      last = at
      return [at]
    }),
  )
}

/** Top of the parabola through three neighbours of 1 / value²; null where it lies outside them. */
function topBetween(speed: Float64Array, curve: Float64Array, i: number): number | null {
  const [before, after] = [speed[i - 1]! - speed[i]!, speed[i + 1]! - speed[i]!]
  const inverse = (at: number) => (curve[i]! / curve[at]!) ** 2 - 1
  const [left, right] = [inverse(i - 1) / before, inverse(i + 1) / after]
  const bend = (right - left) / (after - before)
  const slope = left - bend * before
  const away = -slope / (2 * bend)
  if (1 - slope ** 2 / (4 * bend) < NO_BOUND) return null
  return away > before && away < after ? speed[i]! + away : null
}

/** Two sweeps of the same machine as one, each speed once. */
export function mergedSweeps(one: Sweep, other: Sweep): Sweep {
  const speeds = [...one.speed, ...other.speed]
  const order = Array.from(speeds, (_, i) => i)
    .sort((a, b) => speeds[a]! - speeds[b]!)
    .filter((at, k, sorted) => k === 0 || speeds[at]! > speeds[sorted[k - 1]!]!)
  const split = one.speed.length
  const merge = (a: Float64Array, b: Float64Array) =>
    Float64Array.from(order, (at) => (at < split ? a[at]! : b[at - split]!))
  return {
    speed: merge(one.speed, other.speed),
    forceRatio:
      one.forceRatio === null || other.forceRatio === null ? null : merge(one.forceRatio, other.forceRatio),
    supportForce: merge(one.supportForce, other.supportForce),
    mountForces: one.mountForces.map((curve, i) => merge(curve, other.mountForces[i]!)),
    pointVelocity: one.pointVelocity.map(([x, y, z], i) => {
      const [otherX, otherY, otherZ] = other.pointVelocity[i]!
      return [merge(x, otherX), merge(y, otherY), merge(z, otherZ)] as const
    }),
    strokes: one.strokes.map((curve, i) => merge(curve, other.strokes[i]!)),
  }
}
