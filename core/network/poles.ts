/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized for n by construction */
import { EVD, inverse, Matrix } from 'ml-matrix'
import type { System } from './assemble.ts'
import { equivalentViscous, isUncoupled } from './damped-modes.ts'
import type { UndampedModes } from './modes.ts'

/**
 * First-order form of a network in the coordinates of its undamped modes, taken apart: with modal
 * displacements eta, the states y_j of y_j' = lambda_j y_j + sum_r input_jr f_r (f_r modal forces) give
 * eta_r = sum_j shape_rj y_j and its velocity = sum_j lambda_j shape_rj y_j. Twice as many poles as modes.
 */
export interface Poles {
  readonly modes: number
  readonly count: number
  /** lambda_j [1/s] */
  readonly re: Float64Array
  readonly im: Float64Array
  /** shape_rj at r * count + j */
  readonly shapeRe: Float64Array
  readonly shapeIm: Float64Array
  /** input_jr at j * modes + r */
  readonly inputRe: Float64Array
  readonly inputIm: Float64Array
}

/**
 * Where two poles of one mode meet (critical damping) the states cannot be told apart; damping off by
 * this share moves them apart and changes no result that anybody reads.
 */
const NUDGE = 1e-9
/** Closer to critical than this share counts as meeting; of the order of the nudge. */
const MEETING = 1e-10
/** Largest error of shapes times inputs against what they must give before the damping is nudged. */
const SOUND = 1e-8

/**
 * Poles of a network. Viscous damping is exact, however it couples the modes; hysteretic damping enters
 * as the equivalent viscous value at each mode, as does the loss of elements that change with frequency.
 * L. Meirovitch, Fundamentals of Vibrations, McGraw-Hill, 2001 (state-space modal analysis).
 * @returns null when a mode has no positive stiffness or a pole grows
 */
export function polesOf(system: System, modes: UndampedModes): Poles | null {
  const omega = Float64Array.from(modes.omegaSquared, (square) => Math.sqrt(Math.max(square, 0)))
  if (!omega.every((value) => value > 0)) return null
  return polesFromModal(omega, equivalentViscous(system, modes, omega))
}

/** @param omega natural frequencies [rad/s] @param damping modal viscous matrix, row-major [1/s] */
export function polesFromModal(omega: Float64Array, damping: Float64Array): Poles | null {
  if (isUncoupled(damping, omega.length)) return uncoupled(omega, damping)
  return coupled(omega, damping) ?? coupled(omega, nudged(damping, omega.length))
}

function emptyPoles(modes: number): Poles {
  const make = (size: number) => new Float64Array(size)
  const count = 2 * modes
  return {
    modes,
    count,
    re: make(count),
    im: make(count),
    shapeRe: make(modes * count),
    shapeIm: make(modes * count),
    inputRe: make(count * modes),
    inputIm: make(count * modes),
  }
}

/** Each mode by itself: eta = y_a + y_b with inputs 1 / (lambda_a - lambda_b) and its negative. */
function uncoupled(omega: Float64Array, damping: Float64Array): Poles {
  const n = omega.length
  const poles = emptyPoles(n)
  for (let r = 0; r < n; r++) {
    const w = omega[r]!
    let zeta = damping[r * n + r]! / (2 * w)
    if (Math.abs(zeta * zeta - 1) < MEETING) zeta = 1 - NUDGE
    const [a, b] = [2 * r, 2 * r + 1]
    poles.shapeRe[r * poles.count + a] = 1
    poles.shapeRe[r * poles.count + b] = 1
    if (zeta < 1) {
      const damped = w * Math.sqrt(1 - zeta * zeta)
      poles.re[a] = poles.re[b] = -zeta * w
      poles.im[a] = damped
      poles.im[b] = -damped
      poles.inputIm[a * n + r] = -1 / (2 * damped)
      poles.inputIm[b * n + r] = 1 / (2 * damped)
    } else {
      const apart = w * Math.sqrt(zeta * zeta - 1)
      poles.re[a] = -(w * w) / (zeta * w + apart)
      poles.re[b] = -zeta * w - apart
      poles.inputRe[a * n + r] = 1 / (2 * apart)
      poles.inputRe[b * n + r] = -1 / (2 * apart)
    }
  }
  return poles
}

function coupled(omega: Float64Array, damping: Float64Array): Poles | null {
  const n = omega.length
  // in units of the middle frequency the two halves of the state are of one size
  const unit = Math.sqrt(omega[0]! * omega[n - 1]!)
  const state = Matrix.zeros(2 * n, 2 * n)
  for (let r = 0; r < n; r++) {
    state.set(r, n + r, 1)
    state.set(n + r, r, -((omega[r]! / unit) ** 2))
    for (let s = 0; s < n; s++) state.set(n + r, n + s, -damping[r * n + s]! / unit)
  }
  const { realEigenvalues, imaginaryEigenvalues, eigenvectorMatrix } = new EVD(state, {
    assumeSymmetric: false,
  })
  let inverted: Matrix
  try {
    inverted = inverse(eigenvectorMatrix)
  } catch {
    return null
  }
  const poles = emptyPoles(n)
  for (let j = 0; j < 2 * n; j++) {
    const re = realEigenvalues[j]!
    const im = imaginaryEigenvalues[j]!
    if (!Number.isFinite(re) || !Number.isFinite(im) || re > 1e-9) return null
    poles.re[j] = Math.min(0, re) * unit
    poles.im[j] = im * unit
    // a complex pair shares two columns, real and imaginary part of the first one's vector, in which
    // the states are (xi_1 - i xi_2) / 2 and its mirror
    const first = im < 0 ? j - 1 : j
    const sign = Math.sign(im)
    const half = sign === 0 ? 1 : 0.5
    for (let r = 0; r < n; r++) {
      poles.shapeRe[r * poles.count + j] = eigenvectorMatrix.get(r, first)
      poles.shapeIm[r * poles.count + j] = sign === 0 ? 0 : sign * eigenvectorMatrix.get(r, first + 1)
      // velocity in the scaled time is velocity / unit, and so is what a force adds to it
      poles.inputRe[j * n + r] = (half * inverted.get(first, n + r)) / unit
      poles.inputIm[j * n + r] = sign === 0 ? 0 : (-sign * half * inverted.get(first + 1, n + r)) / unit
    }
  }
  return isSound(poles) ? poles : null
}

/** Whether a force moves nothing at once and changes the velocity of its own mode only. */
function isSound({ modes: n, count, re, im, shapeRe, shapeIm, inputRe, inputIm }: Poles): boolean {
  const size = Math.max(...re.map((value, j) => Math.hypot(value, im[j]!)))
  for (let r = 0; r < n; r++) {
    for (let s = 0; s < n; s++) {
      let shift = 0
      let speed = 0
      for (let j = 0; j < count; j++) {
        const [a, b] = [shapeRe[r * count + j]!, shapeIm[r * count + j]!]
        const [c, d] = [inputRe[j * n + s]!, inputIm[j * n + s]!]
        const [x, y] = [a * c - b * d, a * d + b * c]
        shift += x
        speed += re[j]! * x - im[j]! * y
      }
      if (!(Math.abs(shift) * size < SOUND && Math.abs(speed - (r === s ? 1 : 0)) < SOUND)) return false
    }
  }
  return true
}

/** Damping of each mode changed by another small share, so that poles which met move apart. */
function nudged(damping: Float64Array, n: number): Float64Array {
  const factor = (r: number) => 1 - NUDGE * 1000 * (r + 1)
  return damping.map((value, at) => value * Math.sqrt(factor(Math.floor(at / n)) * factor(at % n)))
}
