import { branchRow, numberFreedoms } from '../../core/network/kinematics.ts'
import { assemble } from '../../core/network/assemble.ts'
import { cholesky, invertLower } from '../../core/numerics/cholesky.ts'
import { generalisedEigen, symmetricEigenWork } from '../../core/numerics/symmetric-eigen.ts'
import { BENCH_MOUNTS, BENCH_NETWORK } from './bench-machine.ts'

export const MODE_VARIANTS = 10_000

/** Stiffness factor of each of the eight mounts in each variant, between 0.7 and 1.3. */
export function variantScales(): Float64Array {
  const golden = 0.618_033_988_7
  return Float64Array.from(
    { length: MODE_VARIANTS * BENCH_MOUNTS.length },
    (_, i) => 0.7 + 0.6 * ((i * golden) % 1),
  )
}

export interface ModesOutput {
  /** [Hz], six per variant */
  readonly frequencies: Float64Array
  /** mass-normalised, 36 per variant */
  readonly shapes: Float64Array
}

export function modesOutput(): ModesOutput {
  return {
    frequencies: new Float64Array(6 * MODE_VARIANTS),
    shapes: new Float64Array(36 * MODE_VARIANTS),
  }
}

/** T2: frequencies and shapes of 10 000 stiffness variants of the six-freedom body. */
export function modesTask(scales: Float64Array, output: ModesOutput): void {
  const system = assemble(BENCH_NETWORK)
  const mountMatrices = mountStiffness()
  const factor = new Float64Array(36)
  const inverse = new Float64Array(36)
  if (!cholesky(system.mass, 6, factor)) throw new Error('no mass')
  invertLower(factor, 6, inverse)
  const work = symmetricEigenWork(6)
  const stiffness = new Float64Array(36)
  const scratch = new Float64Array(36)
  const shapes = new Float64Array(36)
  const count = mountMatrices.length
  for (let v = 0; v < MODE_VARIANTS; v++) {
    stiffness.fill(0)
    for (let m = 0; m < count; m++) {
      const scale = scales[v * count + m] ?? 1
      const own = mountMatrices[m]
      if (!own) continue
      for (let i = 0; i < 36; i++) stiffness[i] = (stiffness[i] ?? 0) + scale * (own[i] ?? 0)
    }
    generalisedEigen(stiffness, inverse, work, shapes, scratch)
    for (let r = 0; r < 6; r++) {
      output.frequencies[v * 6 + r] = Math.sqrt(work.diagonal[r] ?? 0) / (2 * Math.PI)
    }
    output.shapes.set(shapes, v * 36)
  }
}

/** Stiffness matrix of each mount alone. */
function mountStiffness(): Float64Array[] {
  const freedoms = numberFreedoms(BENCH_NETWORK)
  return BENCH_NETWORK.elements.map((element) => {
    const matrix = new Float64Array(36)
    for (const branch of element.branches) {
      const { indices, values } = branchRow(freedoms, element.from, element.to, branch)
      const k = branch.law.stiffness
      for (const [a, i] of indices.entries()) {
        for (const [b, j] of indices.entries()) {
          matrix[i * 6 + j] = (matrix[i * 6 + j] ?? 0) + k * (values[a] ?? 0) * (values[b] ?? 0)
        }
      }
    }
    return matrix
  })
}
