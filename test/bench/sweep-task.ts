import { assemble } from '../../core/network/assemble.ts'
import { blockCurve, blockVector, readForce, type BlockVector } from '../../core/network/block-reader.ts'
import type { ComplexParts } from '../../core/numerics/block-combine.ts'
import { undampedModes } from '../../core/network/modes.ts'
import { BLOCK, emptyLoad, respond, responseSolver, type LoadCase } from '../../core/network/response.ts'
import { BENCH_NETWORK } from './bench-machine.ts'

export const SWEEP_FREQUENCIES = 20_000
export const SWEEP_LOADS: readonly (readonly number[])[] = [
  [100, 0, 0, 0, 20, 5],
  [0, 100, 30, -10, 0, 0],
  [0, 0, 100, 15, -25, 0],
]

export interface SweepOutput {
  /** by load and freedom */
  readonly body: readonly (readonly ComplexParts[])[]
  /** by load, mount and direction */
  readonly forces: readonly (readonly BlockVector[])[]
}

export function sweepOutput(): SweepOutput {
  return {
    body: SWEEP_LOADS.map(() => Array.from({ length: 6 }, () => blockCurve(SWEEP_FREQUENCIES))),
    forces: SWEEP_LOADS.map(() => BENCH_NETWORK.elements.map(() => blockVector(SWEEP_FREQUENCIES))),
  }
}

export function sweepOmegas(): Float64Array {
  return Float64Array.from(
    { length: SWEEP_FREQUENCIES },
    (_, i) => 2 * Math.PI * (0.5 + (99.5 * i) / (SWEEP_FREQUENCIES - 1)),
  )
}

/** T1: all body displacements and mount forces for three loads at 20 000 frequencies, from the network up. */
export function sweepTask(output: SweepOutput, omegas: Float64Array): void {
  const system = assemble(BENCH_NETWORK)
  const modes = undampedModes(system)
  if (modes === null) throw new Error('no modes')
  const solver = responseSolver(system, modes)
  const loads: LoadCase[] = SWEEP_LOADS.map((load) => ({
    ...emptyLoad(6),
    constantRe: Float64Array.from(load),
  }))
  const scratch = blockCurve()
  respond(solver, omegas, loads, (block) => {
    const { first, count, motion } = block
    const body = output.body[block.load] ?? []
    for (let freedom = 0; freedom < body.length; freedom++) {
      const target = body[freedom]
      if (!target) continue
      for (let f = 0; f < count; f++) {
        target.re[first + f] = motion.re[freedom * BLOCK + f] ?? 0
        target.im[first + f] = motion.im[freedom * BLOCK + f] ?? 0
      }
    }
    const forces = output.forces[block.load] ?? []
    for (let index = 0; index < forces.length; index++) {
      const element = system.elements[index]
      const target = forces[index]
      if (element && target) readForce(element, block, scratch, target, first)
    }
  })
}
