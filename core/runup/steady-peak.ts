/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Poles } from '../network/poles.ts'
import { steadyStates } from './march.ts'
import type { StateLoad } from './state-load.ts'
import { amplitudesOfStates, amplitudeWork, objectivesOf } from './amplitude.ts'
import type { Watch } from './watch.ts'

/** Speeds looked at besides those about the resonances. */
const EVEN = 32
/** Distances from a resonance in half-power widths. */
const AROUND = [-6, -2.5, -1.2, -0.5, 0, 0.5, 1.2, 2.5, 6] as const
/** Rounds of moving onto the top of the curve through three points. */
const ROUNDS = 6
/** A share of a quantity's drive below which a mode takes part by rounding only. */
const ROUNDING = 1e-12

/**
 * Largest steady values of watched quantities over a range of speeds: each direction, then the
 * resultant, orders added up as in the run-up.
 * @param range lowest and highest speed [rad/s]
 * @returns Infinity where an order meets a resonance without damping
 */
export function steadyPeaks(
  poles: Poles,
  loads: readonly StateLoad[],
  watches: readonly Watch[],
  range: readonly [number, number],
): readonly Float64Array[] {
  const speeds = speedsToTry(poles, loads, range)
  const block = loads.length * poles.count
  const re = new Float64Array(block * speeds.length)
  const im = new Float64Array(block * speeds.length)
  speeds.forEach((speed, s) => {
    loads.forEach((load, o) => {
      steadyStates(poles, load, speed, re, im, s * block + o * poles.count)
    })
  })
  return watches.map((watch) => {
    const peaks = peaksOf(poles, loads, watch, speeds, re, im)
    const sizes = [...watch.axes.map(({ size }) => size.state), watch.all.state]
    return peaks.map((value, q) => (meetsUndamped(poles, loads, sizes[q]!, range) ? Infinity : value))
  })
}

function speedsToTry(
  poles: Poles,
  loads: readonly StateLoad[],
  [lowest, highest]: readonly [number, number],
): Float64Array {
  const speeds = Array.from({ length: EVEN }, (_, i) => lowest + ((highest - lowest) * i) / (EVEN - 1))
  for (const { order } of loads) {
    for (let j = 0; j < poles.count; j++) {
      if (!(poles.im[j]! > 0)) continue
      const width = Math.max(-poles.re[j]!, 1e-6 * poles.im[j]!)
      for (const away of AROUND) {
        // without damping there is no value at the very resonance
        if (away === 0 && poles.re[j] === 0) continue
        speeds.push((poles.im[j]! + away * width) / order)
      }
    }
  }
  return Float64Array.from(speeds.filter((speed) => speed >= lowest && speed <= highest && speed > 0)).sort()
}

/** Whether an order that drives a resonance without damping, and so the quantity, meets it in the range. */
function meetsUndamped(
  poles: Poles,
  loads: readonly StateLoad[],
  size: Float64Array,
  [lowest, highest]: readonly [number, number],
): boolean {
  return loads.some((load) => {
    const driven = Float64Array.from(size, (weight, j) => weight * driveOf(load, j))
    const whole = driven.reduce((sum, part) => sum + part, 0)
    return driven.some((part, j) => {
      const speed = poles.im[j]! / load.order
      const met = poles.re[j] === 0 && speed >= lowest && speed <= highest && speed > 0
      return met && part > ROUNDING * whole
    })
  })
}

function driveOf(load: StateLoad, j: number): number {
  return (
    Math.abs(load.constantRe[j]!) +
    Math.abs(load.constantIm[j]!) +
    Math.abs(load.squaredRe[j]!) +
    Math.abs(load.squaredIm[j]!) +
    Math.abs(load.inertialRe[j]!) +
    Math.abs(load.inertialIm[j]!)
  )
}

function peaksOf(
  poles: Poles,
  loads: readonly StateLoad[],
  watch: Watch,
  speeds: Float64Array,
  re: Float64Array,
  im: Float64Array,
): Float64Array {
  const block = loads.length * poles.count
  const objectives = objectivesOf(watch)
  const work = amplitudeWork()
  const values = new Float64Array(speeds.length * objectives)
  for (let s = 0; s < speeds.length; s++) {
    amplitudesOfStates(work, watch, loads.length, poles.count, re, im, s * block, values, s * objectives)
  }
  const oneRe = new Float64Array(block)
  const oneIm = new Float64Array(block)
  const one = new Float64Array(objectives)
  const valueAt = (speed: number, q: number) => {
    for (let o = 0; o < loads.length; o++) {
      steadyStates(poles, loads[o]!, speed, oneRe, oneIm, o * poles.count)
    }
    amplitudesOfStates(work, watch, loads.length, poles.count, oneRe, oneIm, 0, one, 0)
    return one[q]!
  }
  return Float64Array.from({ length: objectives }, (_, q) => {
    let top = 0
    for (let s = 1; s < speeds.length; s++) {
      if (values[s * objectives + q]! > values[top * objectives + q]!) top = s
    }
    const a = Math.max(0, top - 1)
    const b = Math.min(speeds.length - 1, top + 1)
    const value = (s: number) => values[s * objectives + q]!
    if (speeds.length === 0) return 0
    if (a === top || b === top) return value(top)
    return climb(
      (speed) => valueAt(speed, q),
      [speeds[a]!, speeds[top]!, speeds[b]!],
      [value(a), value(top), value(b)],
    )
  })
}

/** Highest value within a bracket whose middle is the highest of three, by parabolas through three points. */
function climb(
  valueAt: (speed: number) => number,
  at: readonly [number, number, number],
  values: readonly [number, number, number],
): number {
  let [a, m, b] = at
  let [fa, fm, fb] = values
  for (let round = 0; round < ROUNDS; round++) {
    const p = (m - a) * (fm - fb)
    const q = (m - b) * (fm - fa)
    const x = m - ((m - a) * p - (m - b) * q) / (2 * (p - q))
    if (!(x > a && x < b) || x === m) break
    const fx = valueAt(x)
    if (fx > fm) {
      if (x < m) [b, fb] = [m, fm]
      else [a, fa] = [m, fm]
      ;[m, fm] = [x, fx]
    } else if (x < m) [a, fa] = [x, fx]
    else [b, fb] = [x, fx]
  }
  return fm
}
