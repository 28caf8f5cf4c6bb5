import type { System } from '../network/assemble.ts'
import { dampedModes } from '../network/damped-modes.ts'
import { energyShares, type UndampedModes } from '../network/modes.ts'
import type { Mode } from '../results.ts'
import type { Vec6 } from '../project/fields.ts'

/** Motion in each coordinate of the machine: x along the shaft, y athwart, z up. */
const NAMES = ['surge', 'sway', 'heave', 'roll', 'pitch', 'yaw'] as const
/** A mode is named by one motion when that holds more than this share of its kinetic energy. */
const DOMINANT = 0.6

/**
 * Modes as a person reads them. The machine's six freedoms come first in the network, then one for
 * each absorber.
 * @param orders orders whose meeting with each mode is wanted
 * @returns null when the network is not stable
 */
export function describeModes(
  system: System,
  modes: UndampedModes,
  absorberIds: readonly string[],
  orders: readonly number[],
): readonly Mode[] | null {
  const damping = dampedModes(system, modes)
  if (damping === null) return null
  const n = modes.count
  return damping.map((damped, r) => {
    const omega = Math.sqrt(modes.omegaSquared[r] ?? 0)
    const shares = energyShares(system, modes, r)
    const shape = modes.shapes.subarray(r * n, (r + 1) * n)
    const sign = signOf(shape, shares)
    const absorberShare = shares.subarray(6).reduce((sum, share) => sum + share, 0)
    return {
      number: r + 1,
      frequency: omega / (2 * Math.PI),
      dampedFrequency: damped.omegaDamped === null ? null : damped.omegaDamped / (2 * Math.PI),
      dampingRatio: damped.dampingRatio,
      shape: sixOf(shape, sign),
      absorberShape: Object.fromEntries(absorberIds.map((id, index) => [id, sign * (shape[6 + index] ?? 0)])),
      energyShare: sixOf(shares, 1),
      name: nameOf(shares, absorberShare),
      crossings: orders.map((order) => ({ order, speed: omega / order })),
    }
  })
}

/** The motion that holds the largest share counts as positive. */
function signOf(shape: Float64Array, shares: Float64Array): number {
  let largest = 0
  shares.forEach((share, index) => {
    if (Math.abs(share) > Math.abs(shares[largest] ?? 0)) largest = index
  })
  return (shape[largest] ?? 0) < 0 ? -1 : 1
}

function nameOf(shares: Float64Array, absorberShare: number): string {
  if (absorberShare > DOMINANT) return 'absorber'
  const dominant = NAMES.findIndex((_, index) => (shares[index] ?? 0) > DOMINANT)
  return NAMES[dominant] ?? 'coupled'
}

function sixOf(vector: Float64Array, sign: number): Vec6 {
  // adding zero turns a negative zero into a plain one
  const at = (i: number) => sign * (vector[i] ?? 0) + 0
  return [at(0), at(1), at(2), at(3), at(4), at(5)]
}
