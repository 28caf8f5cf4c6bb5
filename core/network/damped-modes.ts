import { EVD, Matrix } from 'ml-matrix'
import type { System } from './assemble.ts'
import { varyingPart } from './laws.ts'
import { modalMatrix, type UndampedModes } from './modes.ts'
import { rowTimes } from './statics.ts'

export interface DampedMode {
  /** of the free decay [rad/s]; null when it does not oscillate */
  readonly omegaDamped: number | null
  /** share of critical damping [-] */
  readonly dampingRatio: number
}

/** Coupling between modes below this share of their own damping changes no digit of a result. */
const UNCOUPLED = 1e-12

/**
 * Damping of each mode from the free decay exp(s t), s = -zeta omega_0 + i omega_d: eigenvalues of
 * the state-space form in modal coordinates. Hysteretic damping enters as the equivalent viscous
 * value at each mode, h_rs / sqrt(omega_r omega_s), so that eta = 2 zeta; elements whose stiffness
 * changes with frequency enter with the damping that they have there.
 * L. Meirovitch, Fundamentals of Vibrations, McGraw-Hill, 2001 (state-space eigenvalue problem).
 * @returns one entry per undamped mode, in the same order; null when a mode is not stable
 */
export function dampedModes(system: System, modes: UndampedModes): readonly DampedMode[] | null {
  const n = modes.count
  const omega = Float64Array.from(modes.omegaSquared, (square) => Math.sqrt(Math.max(square, 0)))
  if (!omega.every((value) => value > 0)) return null
  const damping = equivalentViscous(system, modes, omega)
  if (isUncoupled(damping, n)) {
    return Array.from(omega, (w, r) => fromRatio((damping[r * n + r] ?? 0) / (2 * w), w))
  }
  return fromStateSpace(damping, omega)
}

/** Modal viscous matrix that dissipates at each mode what all damping there dissipates, [1/s]. */
export function equivalentViscous(system: System, modes: UndampedModes, omega: Float64Array): Float64Array {
  const n = modes.count
  const viscous = modalMatrix(system.viscous, modes)
  const hysteretic = modalMatrix(system.hysteretic, modes)
  const result = viscous.map((value, at) => {
    const middle = Math.sqrt((omega[Math.floor(at / n)] ?? 1) * (omega[at % n] ?? 1))
    return value + (hysteretic[at] ?? 0) / middle
  })
  for (const { law, row } of system.varying) {
    const motion = Float64Array.from({ length: n }, (_, r) =>
      rowTimes(row, modes.shapes.subarray(r * n, (r + 1) * n)),
    )
    for (let r = 0; r < n; r++) {
      for (let s = 0; s < n; s++) {
        const middle = Math.sqrt((omega[r] ?? 1) * (omega[s] ?? 1))
        const loss = varyingPart(law, middle).im / middle
        result[r * n + s] = (result[r * n + s] ?? 0) + loss * (motion[r] ?? 0) * (motion[s] ?? 0)
      }
    }
  }
  return result
}

/** Whether the off-diagonal terms of a positive semidefinite matrix are nothing but rounding. */
export function isUncoupled(matrix: Float64Array, n: number): boolean {
  for (let r = 0; r < n; r++) {
    for (let s = 0; s < r; s++) {
      const own = (matrix[r * n + r] ?? 0) * (matrix[s * n + s] ?? 0)
      if ((matrix[r * n + s] ?? 0) ** 2 > UNCOUPLED ** 2 * own) return false
    }
  }
  return true
}

function fromRatio(dampingRatio: number, omega: number): DampedMode {
  return {
    dampingRatio,
    omegaDamped: dampingRatio < 1 ? omega * Math.sqrt(1 - dampingRatio ** 2) : null,
  }
}

interface Pole {
  readonly damping: DampedMode
  /** how strongly each undamped mode takes part */
  readonly parts: Float64Array
}

function fromStateSpace(damping: Float64Array, omega: Float64Array): DampedMode[] | null {
  const n = omega.length
  // in units of the middle frequency the two halves of the state are of one size
  const unit = Math.sqrt((omega[0] ?? 1) * (omega[n - 1] ?? 1))
  const state = Matrix.zeros(2 * n, 2 * n)
  for (let r = 0; r < n; r++) {
    state.set(r, n + r, 1)
    state.set(n + r, r, -(((omega[r] ?? 0) / unit) ** 2))
    for (let s = 0; s < n; s++) state.set(n + r, n + s, -(damping[r * n + s] ?? 0) / unit)
  }
  const solved = new EVD(state, { assumeSymmetric: false })
  const poles = pairPoles(solved, n, unit)
  return poles === null ? null : assign(poles, n)
}

/** Complex pairs give one mode each; real eigenvalues are joined two by two, fast with slow. */
function pairPoles(solved: EVD, n: number, unit: number): Pole[] | null {
  const { realEigenvalues: re, imaginaryEigenvalues: im, eigenvectorMatrix: vectors } = solved
  const poles: Pole[] = []
  const single: number[] = []
  for (let i = 0; i < 2 * n; i++) {
    const a = re[i] ?? NaN
    const b = im[i] ?? NaN
    if (!Number.isFinite(a) || !Number.isFinite(b)) return null
    if (b > 0) {
      const size = Math.hypot(a, b)
      poles.push({
        damping: { dampingRatio: Math.max(0, -a / size), omegaDamped: b * unit },
        parts: Float64Array.from({ length: n }, (_, r) =>
          Math.hypot(vectors.get(r, i), vectors.get(r, i + 1)),
        ),
      })
    } else if (b === 0) single.push(i)
  }
  const bySize = single.toSorted((i, j) => (re[i] ?? 0) - (re[j] ?? 0))
  for (let k = 0; k < bySize.length / 2; k++) {
    const fast = bySize[k] ?? 0
    const slow = bySize[bySize.length - 1 - k] ?? 0
    const product = (re[fast] ?? 0) * (re[slow] ?? 0)
    if (!(product > 0)) return null
    poles.push({
      damping: {
        dampingRatio: -((re[fast] ?? 0) + (re[slow] ?? 0)) / (2 * Math.sqrt(product)),
        omegaDamped: null,
      },
      parts: Float64Array.from({ length: n }, (_, r) => Math.abs(vectors.get(r, slow))),
    })
  }
  return poles.length === n ? poles : null
}

/** Gives each pole to the undamped mode that takes the largest part in it, largest parts first. */
function assign(poles: readonly Pole[], n: number): DampedMode[] {
  const claims = poles.flatMap((pole, index) => {
    const total = Math.hypot(...pole.parts)
    return Array.from(pole.parts, (part, mode) => ({ index, mode, share: total > 0 ? part / total : 0 }))
  })
  const result = new Array<DampedMode | undefined>(n)
  const taken = new Set<number>()
  for (const claim of claims.toSorted((a, b) => b.share - a.share)) {
    const pole = poles[claim.index]
    if (!pole || taken.has(claim.index) || result[claim.mode] !== undefined) continue
    result[claim.mode] = pole.damping
    taken.add(claim.index)
  }
  return result.map((mode) => mode ?? { dampingRatio: 0, omegaDamped: null })
}
