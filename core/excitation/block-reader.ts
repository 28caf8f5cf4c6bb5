/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for BLOCK by construction */
import type { AssembledElement } from '../network/assemble.ts'
import type { SparseRow } from '../network/kinematics.ts'
import { steadyPart, varies, varyingPart } from '../network/laws.ts'
import { BLOCK, type ResponseBlock } from '../network/response.ts'

/** A complex quantity at every frequency of a block, parts apart. */
export interface BlockCurve {
  readonly re: Float64Array
  readonly im: Float64Array
}
export type BlockVector = readonly [BlockCurve, BlockCurve, BlockCurve]

export function blockCurve(): BlockCurve {
  return { re: new Float64Array(BLOCK), im: new Float64Array(BLOCK) }
}
export function blockVector(): BlockVector {
  return [blockCurve(), blockCurve(), blockCurve()]
}

/** target = row · displacement, at every frequency of the block. */
export function readRow({ indices, values }: SparseRow, block: ResponseBlock, target: BlockCurve): void {
  const { count, re, im } = block
  target.re.fill(0, 0, count)
  target.im.fill(0, 0, count)
  for (let k = 0; k < indices.length; k++) {
    const from = indices[k]! * BLOCK
    const factor = values[k]!
    for (let f = 0; f < count; f++) {
      target.re[f]! += factor * re[from + f]!
      target.im[f]! += factor * im[from + f]!
    }
  }
}

/**
 * Force of an element on its carrying side, fixed axes: the sum over its branches of
 * axis · z(omega) · relative motion. `scratch` is used up.
 */
export function readForce(
  { branches }: AssembledElement,
  block: ResponseBlock,
  scratch: BlockCurve,
  target: BlockVector,
): void {
  const { count, omega } = block
  for (const part of target) {
    part.re.fill(0, 0, count)
    part.im.fill(0, 0, count)
  }
  for (const { branch, law, row } of branches) {
    if (branch.motion === 'turn') continue
    readRow(row, block, scratch)
    const { stiffness, hysteretic, viscous } = steadyPart(law)
    const changing = varies(law)
    for (let f = 0; f < count; f++) {
      let zRe = stiffness
      let zIm = hysteretic + omega[f]! * viscous
      if (changing) {
        const more = varyingPart(law, omega[f]!)
        zRe += more.re
        zIm += more.im
      }
      const a = scratch.re[f]!
      const b = scratch.im[f]!
      scratch.re[f] = zRe * a - zIm * b
      scratch.im[f] = zRe * b + zIm * a
    }
    for (let axis = 0; axis < 3; axis++) {
      const share = branch.axis[axis]!
      if (share === 0) continue
      const { re, im } = target[axis]!
      for (let f = 0; f < count; f++) {
        re[f]! += share * scratch.re[f]!
        im[f]! += share * scratch.im[f]!
      }
    }
  }
}

/**
 * Square of the largest length that the vector Re(F exp(i omega t)) reaches in a cycle:
 * (|F|² + |F·F|) / 2 with F·F the sum of squares, unconjugated (semi-major axis of its ellipse).
 */
export function peakSquared(vector: BlockVector, f: number): number {
  let size = 0
  let real = 0
  let imaginary = 0
  for (let axis = 0; axis < 3; axis++) {
    const a = vector[axis]!.re[f]!
    const b = vector[axis]!.im[f]!
    size += a * a + b * b
    real += a * a - b * b
    imaginary += 2 * a * b
  }
  return (size + Math.sqrt(real * real + imaginary * imaginary)) / 2
}

/** Sum of |F|² over the three directions. */
export function sizeSquared(vector: BlockVector, f: number): number {
  let size = 0
  for (let axis = 0; axis < 3; axis++) {
    const a = vector[axis]!.re[f]!
    const b = vector[axis]!.im[f]!
    size += a * a + b * b
  }
  return size
}

/** target += vector */
export function addVector(target: BlockVector, vector: BlockVector, count: number): void {
  for (let axis = 0; axis < 3; axis++) {
    const to = target[axis]!
    const from = vector[axis]!
    for (let f = 0; f < count; f++) {
      to.re[f]! += from.re[f]!
      to.im[f]! += from.im[f]!
    }
  }
}
