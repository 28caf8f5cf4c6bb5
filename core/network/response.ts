/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for n and BLOCK by construction */
import { combineParts, type ComplexParts } from '../numerics/block-combine.ts'
import {
  BLOCK,
  blockMatrix,
  entryAt,
  factorBlock,
  factorDiagonal,
  solveBlock,
  solveDiagonal,
  type BlockMatrix,
} from '../numerics/block-symmetric.ts'
import type { System } from './assemble.ts'
import { isUncoupled } from './damped-modes.ts'
import { varyingPart, type Law } from './laws.ts'
import { modalMatrix, type UndampedModes } from './modes.ts'
import { rowTimes } from './statics.ts'

export { BLOCK }

/** A harmonic load on every freedom: constant + squared · omega², complex. */
export interface LoadCase {
  readonly constantRe: Float64Array
  readonly constantIm: Float64Array
  readonly squaredRe: Float64Array
  readonly squaredIm: Float64Array
}

export function emptyLoad(freedoms: number): LoadCase {
  const make = () => new Float64Array(freedoms)
  return { constantRe: make(), constantIm: make(), squaredRe: make(), squaredIm: make() }
}

/** One block of frequencies with the response to one load case. Valid during the visit only. */
export interface ResponseBlock {
  /** index of the block's first frequency in the whole list, and how many it holds */
  readonly first: number
  readonly count: number
  /** which load case */
  readonly load: number
  /** [rad/s], the block's own */
  readonly omega: Float64Array
  /** displacement of freedom j at frequency f of the block: j BLOCK + f */
  readonly motion: ComplexParts
}

/**
 * A system made ready for many frequencies: in the coordinates of its undamped modes mass and
 * stiffness are diagonal and only damping couples, so that
 * (omega_r² - omega²) delta_rs + i (omega c_rs + h_rs) + varying part is all there is to solve.
 */
export interface ResponseSolver {
  readonly freedoms: number
  readonly omegaSquared: Float64Array
  /** modal C and H, row-major */
  readonly viscous: Float64Array
  readonly hysteretic: Float64Array
  /** whether damping leaves the modes uncoupled, so that each is a single freedom */
  readonly uncoupled: boolean
  readonly varying: readonly { readonly law: Law; readonly motion: Float64Array }[]
  readonly shapes: Float64Array
}

export function responseSolver(system: System, modes: UndampedModes): ResponseSolver {
  const n = modes.count
  const viscous = withoutRounding(modalMatrix(system.viscous, modes), n)
  const hysteretic = withoutRounding(modalMatrix(system.hysteretic, modes), n)
  return {
    freedoms: n,
    omegaSquared: modes.omegaSquared,
    viscous,
    hysteretic,
    uncoupled: isUncoupled(viscous, n) && isUncoupled(hysteretic, n) && system.varying.length === 0,
    varying: system.varying.map(({ law, row }) => ({
      law,
      motion: Float64Array.from({ length: n }, (_, r) =>
        rowTimes(row, modes.shapes.subarray(r * n, (r + 1) * n)),
      ),
    })),
    shapes: modes.shapes,
  }
}

/** Parts of a modal quantity below this share of its largest are rounding. */
const ROUNDING = 1e-13

/**
 * A modal damping matrix in which a mode that no damper touches has none at all: the remains of
 * rounding would couple it, and at its resonance they would be all there is.
 */
function withoutRounding(matrix: Float64Array, n: number): Float64Array {
  const own = Float64Array.from({ length: n }, (_, r) => matrix[r * n + r]!)
  const least = ROUNDING * Math.max(...own)
  return matrix.map((value, at) => {
    const [a, b] = [own[Math.floor(at / n)]!, own[at % n]!]
    if (a <= least || b <= least) return 0
    return Math.abs(value) <= ROUNDING * Math.sqrt(a * b) ? 0 : value
  })
}

/**
 * Response of every freedom to every load case at every frequency, handed over block by block.
 * @param omegas [rad/s], any order, each > 0
 * @param visit called once per block and load case; it must copy what it keeps
 */
export function respond(
  solver: ResponseSolver,
  omegas: Float64Array,
  loads: readonly LoadCase[],
  visit: (block: ResponseBlock) => void,
): void {
  const n = solver.freedoms
  const matrix = blockMatrix(n)
  const modalLoads = loads.map((load) => toModal(solver, load))
  const parts = () => ({ re: new Float64Array(n * BLOCK), im: new Float64Array(n * BLOCK) })
  const modal = parts()
  const physical = parts()
  const rows = shapeRows(solver)
  const omega = new Float64Array(BLOCK)
  for (let first = 0; first < omegas.length; first += BLOCK) {
    const count = Math.min(BLOCK, omegas.length - first)
    for (let f = 0; f < count; f++) omega[f] = omegas[first + f]!
    fillMatrix(solver, matrix, omega, count)
    if (solver.uncoupled) factorDiagonal(matrix, count)
    else factorBlock(matrix, count)
    for (let load = 0; load < modalLoads.length; load++) {
      fillLoad(modalLoads[load]!, n, omega, count, modal)
      if (solver.uncoupled) solveDiagonal(matrix, count, modal)
      else solveBlock(matrix, count, modal)
      for (let i = 0; i < n; i++) {
        combineParts(modal, rows.modes, BLOCK, rows.shapes[i]!, physical, i * BLOCK, count)
      }
      visit({ first, count, load, omega, motion: physical })
    }
  }
}

/** For each freedom its part in every mode. */
function shapeRows({ shapes, freedoms: n }: ResponseSolver) {
  return {
    modes: Int32Array.from({ length: n }, (_, r) => r),
    shapes: Array.from({ length: n }, (_, i) =>
      Float64Array.from({ length: n }, (_, r) => shapes[r * n + i]!),
    ),
  }
}

/** Only the diagonal is filled where nothing couples. */
function fillMatrix(solver: ResponseSolver, matrix: BlockMatrix, omega: Float64Array, count: number): void {
  const n = solver.freedoms
  const { re, im } = matrix.matrix
  for (let r = 0; r < n; r++) {
    for (let s = solver.uncoupled ? r : 0; s <= r; s++) {
      const at = entryAt(r, s)
      const stiffness = r === s ? solver.omegaSquared[r]! : 0
      const inertia = r === s ? 1 : 0
      const viscous = solver.viscous[r * n + s]!
      const hysteretic = solver.hysteretic[r * n + s]!
      const least = ROUNDING * Math.abs(stiffness)
      for (let f = 0; f < count; f++) {
        const w = omega[f]!
        const rest = stiffness - inertia * w * w
        re[at + f] = Math.abs(rest) <= least ? 0 : rest
        im[at + f] = hysteretic + w * viscous
      }
    }
  }
  for (const { law, motion } of solver.varying) {
    for (let f = 0; f < count; f++) {
      const z = varyingPart(law, omega[f]!)
      for (let r = 0; r < n; r++) {
        for (let s = 0; s <= r; s++) {
          const at = entryAt(r, s) + f
          const product = motion[r]! * motion[s]!
          re[at]! += z.re * product
          im[at]! += z.im * product
        }
      }
    }
  }
}

function toModal(solver: ResponseSolver, load: LoadCase): LoadCase {
  const n = solver.freedoms
  // a mode that the load does not drive gets exactly nothing, so that its resonance stays silent
  const project = (vector: Float64Array) => {
    const modal = Float64Array.from({ length: n }, (_, r) => {
      let sum = 0
      for (let i = 0; i < n; i++) sum += solver.shapes[r * n + i]! * vector[i]!
      return sum
    })
    const least = ROUNDING * modal.reduce((largest, value) => Math.max(largest, Math.abs(value)), 0)
    return modal.map((value) => (Math.abs(value) <= least ? 0 : value))
  }
  return {
    constantRe: project(load.constantRe),
    constantIm: project(load.constantIm),
    squaredRe: project(load.squaredRe),
    squaredIm: project(load.squaredIm),
  }
}

function fillLoad(
  load: LoadCase,
  n: number,
  omega: Float64Array,
  count: number,
  { re, im }: ComplexParts,
): void {
  for (let r = 0; r < n; r++) {
    const constantRe = load.constantRe[r]!
    const constantIm = load.constantIm[r]!
    const squaredRe = load.squaredRe[r]!
    const squaredIm = load.squaredIm[r]!
    const at = r * BLOCK
    for (let f = 0; f < count; f++) {
      const square = omega[f]! * omega[f]!
      re[at + f] = constantRe + square * squaredRe
      im[at + f] = constantIm + square * squaredIm
    }
  }
}
