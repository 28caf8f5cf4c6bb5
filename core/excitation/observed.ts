import type { AssembledElement, System } from '../network/assemble.ts'
import type { SparseRow } from '../network/kinematics.ts'
import { emptyLoad, type LoadCase, type ResponseSolver } from '../network/response.ts'
import type { SourceLoad } from './order-loads.ts'

/** A network ready to be excited, and what is looked at. */
export interface Observed {
  readonly system: System
  readonly solver: ResponseSolver
  /** first freedom of the machine, whose six are [ux uy uz rx ry rz] at its centre of gravity */
  readonly machineFreedom: number
  /** elements that pass force into the support */
  readonly supports: readonly AssembledElement[]
  /** displacement of each point along x, y, z */
  readonly points: readonly (readonly [SparseRow, SparseRow, SparseRow])[]
  readonly absorbers: readonly {
    readonly id: string
    /** travel of the mass along its line, and the same relative to its attachment */
    readonly mass: SparseRow
    readonly stroke: SparseRow
  }[]
}

/** One order's sources as a load on all freedoms. */
export function orderLoadCase(observed: Observed, loads: readonly SourceLoad[]): LoadCase {
  const total = emptyLoad(observed.solver.freedoms)
  for (const { law, force, moment } of loads) {
    const re = law === 'squared' ? total.squaredRe : total.constantRe
    const im = law === 'squared' ? total.squaredIm : total.constantIm
    for (const axis of [0, 1, 2] as const) {
      const at = observed.machineFreedom + axis
      re[at] = (re[at] ?? 0) + force.re[axis]
      im[at] = (im[at] ?? 0) + force.im[axis]
      re[at + 3] = (re[at + 3] ?? 0) + moment.re[axis]
      im[at + 3] = (im[at + 3] ?? 0) + moment.im[axis]
    }
  }
  return total
}
