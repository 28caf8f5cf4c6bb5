/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for BLOCK by construction */
import type { AssembledElement } from './assemble.ts'
import type { SparseRow } from './kinematics.ts'
import type { Branch } from './network.ts'
import { combineParts, type ComplexParts } from '../numerics/block-combine.ts'
import { steadyPart, varies, varyingPart, type Law } from './laws.ts'
import { BLOCK, type ResponseBlock } from './response.ts'

/** A complex vector over a block, parts apart, one curve per direction. */
export type BlockVector = readonly [ComplexParts, ComplexParts, ComplexParts]

export function blockCurve(length = BLOCK): ComplexParts {
  return { re: new Float64Array(length), im: new Float64Array(length) }
}
export function blockVector(length = BLOCK): BlockVector {
  return [blockCurve(length), blockCurve(length), blockCurve(length)]
}

/** target[at + f] = row · displacement, at every frequency of the block. */
export function readRow(row: SparseRow, block: ResponseBlock, target: ComplexParts, at = 0): void {
  combineParts(block.motion, row.indices, BLOCK, row.values, target, at, block.count)
}

/**
 * Force of an element on its carrying side, fixed axes, written from index `at` on: the sum over its
 * branches of axis · z(omega) · relative motion. `scratch` is used up.
 */
export function readForce(
  { branches }: AssembledElement,
  block: ResponseBlock,
  scratch: ComplexParts,
  target: BlockVector,
  at = 0,
): void {
  const { count } = block
  let written = 0
  for (const { branch, law, row } of branches) {
    if (branch.motion === 'turn') continue
    const only = onlyAxis(branch.axis)
    if (only >= 0 && (written & (1 << only)) === 0 && row.indices.length <= 3 && !varies(law)) {
      writeForce(law, block, branch.axis[only]!, row, target[only]!, at)
      written |= 1 << only
      continue
    }
    readRow(row, block, scratch)
    for (let axis = 0; axis < 3; axis++) {
      const share = branch.axis[axis]!
      if (share === 0) continue
      const more = (written & (1 << axis)) !== 0
      addForce(law, block, share, scratch, target[axis]!, at, more)
      written |= 1 << axis
    }
  }
  for (let axis = 0; axis < 3; axis++) {
    if ((written & (1 << axis)) !== 0) continue
    target[axis]!.re.fill(0, at, at + count)
    target[axis]!.im.fill(0, at, at + count)
  }
}

/** The one axis along which a direction lies, or -1. */
function onlyAxis([x, y, z]: Branch['axis']): number {
  if (x === 0 && y === 0) return 2
  if (x === 0 && z === 0) return 1
  return y === 0 && z === 0 ? 0 : -1
}

/**
 * The usual case in one pass over memory: a branch along one axis whose motion depends on at most
 * three freedoms (a mount between a body and the ground), with a law of k, h and c alone.
 */
function writeForce(
  law: Law,
  { count, omega, motion: { re: motionRe, im: motionIm } }: ResponseBlock,
  share: number,
  { indices, values }: SparseRow,
  { re, im }: ComplexParts,
  at: number,
): void {
  const steady = steadyPart(law)
  const stiffness = share * steady.stiffness
  const hysteretic = share * steady.hysteretic
  const viscous = share * steady.viscous
  const terms = indices.length
  const p = terms > 0 ? indices[0]! * BLOCK : 0
  const q = terms > 1 ? indices[1]! * BLOCK : 0
  const r = terms > 2 ? indices[2]! * BLOCK : 0
  const c = terms > 0 ? values[0]! : 0
  const d = terms > 1 ? values[1]! : 0
  const e = terms > 2 ? values[2]! : 0
  for (let f = 0; f < count; f++) {
    const a = c * motionRe[p + f]! + d * motionRe[q + f]! + e * motionRe[r + f]!
    const b = c * motionIm[p + f]! + d * motionIm[q + f]! + e * motionIm[r + f]!
    const loss = hysteretic + omega[f]! * viscous
    re[at + f] = stiffness * a - loss * b
    im[at + f] = stiffness * b + loss * a
  }
}

/** target = share · z(omega) · motion, or added to it where something stands there already. */
function addForce(
  law: Law,
  { count, omega }: ResponseBlock,
  share: number,
  { re: motionRe, im: motionIm }: ComplexParts,
  { re, im }: ComplexParts,
  at: number,
  more: boolean,
): void {
  const { stiffness, hysteretic, viscous } = steadyPart(law)
  const changing = varies(law)
  for (let f = 0; f < count; f++) {
    let zRe = stiffness
    let zIm = hysteretic + omega[f]! * viscous
    if (changing) {
      const extra = varyingPart(law, omega[f]!)
      zRe += extra.re
      zIm += extra.im
    }
    const a = share * motionRe[f]!
    const b = share * motionIm[f]!
    re[at + f] = zRe * a - zIm * b + (more ? re[at + f]! : 0)
    im[at + f] = zRe * b + zIm * a + (more ? im[at + f]! : 0)
  }
}

/**
 * Adds to `sum`, from index `first` on, the square of the largest length that the vector
 * Re(F exp(i omega t)) reaches in a cycle: (|F|² + |F·F|) / 2 with F·F the sum of squares,
 * unconjugated (semi-major axis of its ellipse).
 */
export function addPeakSquared(
  [{ re: xRe, im: xIm }, { re: yRe, im: yIm }, { re: zRe, im: zIm }]: BlockVector,
  count: number,
  sum: Float64Array,
  first: number,
): void {
  for (let f = 0; f < count; f++) {
    const a = xRe[f]!
    const b = xIm[f]!
    const c = yRe[f]!
    const d = yIm[f]!
    const e = zRe[f]!
    const g = zIm[f]!
    const real = a * a + c * c + e * e
    const imaginary = b * b + d * d + g * g
    const difference = real - imaginary
    const cross = 2 * (a * b + c * d + e * g)
    sum[first + f]! += (real + imaginary + Math.sqrt(difference * difference + cross * cross)) / 2
  }
}

/** Adds |F|², the sum over the three directions, to `sum` from index `first` on. */
export function addSizeSquared(
  [{ re: xRe, im: xIm }, { re: yRe, im: yIm }, { re: zRe, im: zIm }]: BlockVector,
  count: number,
  sum: Float64Array,
  first: number,
): void {
  for (let f = 0; f < count; f++) {
    sum[first + f]! += xRe[f]! ** 2 + xIm[f]! ** 2 + yRe[f]! ** 2 + yIm[f]! ** 2 + zRe[f]! ** 2 + zIm[f]! ** 2
  }
}

/** target += vector */
export function addVector(target: BlockVector, vector: BlockVector, count: number): void {
  for (let axis = 0; axis < 3; axis++) {
    const { re: toRe, im: toIm } = target[axis]!
    const { re, im } = vector[axis]!
    for (let f = 0; f < count; f++) {
      toRe[f]! += re[f]!
      toIm[f]! += im[f]!
    }
  }
}
