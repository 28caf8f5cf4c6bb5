/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for n and BLOCK by construction */
import { BLOCK, blockMatrix, factorBlock, solveBlock, type BlockMatrix } from '../numerics/block-symmetric.ts'
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
  readonly re: Float64Array
  readonly im: Float64Array
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
  const viscous = modalMatrix(system.viscous, modes)
  const hysteretic = modalMatrix(system.hysteretic, modes)
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
  const yRe = new Float64Array(n * BLOCK)
  const yIm = new Float64Array(n * BLOCK)
  const re = new Float64Array(n * BLOCK)
  const im = new Float64Array(n * BLOCK)
  const omega = new Float64Array(BLOCK)
  for (let first = 0; first < omegas.length; first += BLOCK) {
    const count = Math.min(BLOCK, omegas.length - first)
    for (let f = 0; f < count; f++) omega[f] = omegas[first + f]!
    fillMatrix(solver, matrix, omega, count)
    if (solver.uncoupled) invertDiagonal(matrix, count)
    else factorBlock(matrix, count)
    modalLoads.forEach((load, index) => {
      fillLoad(load, n, omega, count, yRe, yIm)
      if (solver.uncoupled) scaleByPivots(matrix, count, yRe, yIm)
      else solveBlock(matrix, count, yRe, yIm)
      fromModal(solver.shapes, n, count, yRe, yIm, re, im)
      visit({ first, count, load: index, omega, re, im })
    })
  }
}

/** Only the diagonal is filled where nothing couples. */
function fillMatrix(solver: ResponseSolver, matrix: BlockMatrix, omega: Float64Array, count: number): void {
  const n = solver.freedoms
  const { re, im } = matrix
  for (let r = 0; r < n; r++) {
    for (let s = solver.uncoupled ? r : 0; s <= r; s++) {
      const at = ((r * (r + 1)) / 2 + s) * BLOCK
      const stiffness = r === s ? solver.omegaSquared[r]! : 0
      const inertia = r === s ? 1 : 0
      const viscous = solver.viscous[r * n + s]!
      const hysteretic = solver.hysteretic[r * n + s]!
      for (let f = 0; f < count; f++) {
        const w = omega[f]!
        re[at + f] = stiffness - inertia * w * w
        im[at + f] = hysteretic + w * viscous
      }
    }
  }
  for (const { law, motion } of solver.varying) {
    for (let f = 0; f < count; f++) {
      const z = varyingPart(law, omega[f]!)
      for (let r = 0; r < n; r++) {
        for (let s = 0; s <= r; s++) {
          const at = ((r * (r + 1)) / 2 + s) * BLOCK + f
          const product = motion[r]! * motion[s]!
          re[at]! += z.re * product
          im[at]! += z.im * product
        }
      }
    }
  }
}

function invertDiagonal({ size, re, im, pivotRe, pivotIm }: BlockMatrix, count: number): void {
  for (let r = 0; r < size; r++) {
    const at = ((r * (r + 1)) / 2 + r) * BLOCK
    for (let f = 0; f < count; f++) {
      const a = re[at + f]!
      const b = im[at + f]!
      const square = a * a + b * b
      pivotRe[r * BLOCK + f] = a / square
      pivotIm[r * BLOCK + f] = -b / square
    }
  }
}

function scaleByPivots(
  { size, pivotRe, pivotIm }: BlockMatrix,
  count: number,
  re: Float64Array,
  im: Float64Array,
): void {
  for (let at = 0; at < size * BLOCK; at += BLOCK) {
    for (let f = 0; f < count; f++) {
      const a = re[at + f]!
      const b = im[at + f]!
      const c = pivotRe[at + f]!
      const d = pivotIm[at + f]!
      re[at + f] = a * c - b * d
      im[at + f] = a * d + b * c
    }
  }
}

function toModal(solver: ResponseSolver, load: LoadCase): LoadCase {
  const n = solver.freedoms
  const project = (vector: Float64Array) =>
    Float64Array.from({ length: n }, (_, r) => {
      let sum = 0
      for (let i = 0; i < n; i++) sum += solver.shapes[r * n + i]! * vector[i]!
      return sum
    })
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
  re: Float64Array,
  im: Float64Array,
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

function fromModal(
  shapes: Float64Array,
  n: number,
  count: number,
  yRe: Float64Array,
  yIm: Float64Array,
  re: Float64Array,
  im: Float64Array,
): void {
  re.fill(0)
  im.fill(0)
  for (let i = 0; i < n; i++) {
    const to = i * BLOCK
    for (let r = 0; r < n; r++) {
      const shape = shapes[r * n + i]!
      const from = r * BLOCK
      for (let f = 0; f < count; f++) {
        re[to + f]! += shape * yRe[from + f]!
        im[to + f]! += shape * yIm[from + f]!
      }
    }
  }
}
