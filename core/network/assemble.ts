import { assertNever } from '../errors.ts'
import { branchRow, numberFreedoms, type Freedoms, type SparseRow } from './kinematics.ts'
import { steadyPart, varies, type Law } from './laws.ts'
import type { Branch, Network, NetworkElement, NetworkNode } from './network.ts'

/** A branch with its row over all freedoms. */
export interface AssembledBranch {
  readonly branch: Branch
  readonly law: Law
  readonly row: SparseRow
}

export interface AssembledElement {
  readonly element: NetworkElement
  readonly branches: readonly AssembledBranch[]
}

/**
 * The network as matrices: (K + i H + i omega C - omega² M + varying part) q = f, row-major and
 * symmetric, n by n. K carries the geometric stiffness where it has been added.
 */
export interface System {
  readonly freedoms: Freedoms
  readonly mass: Float64Array
  readonly stiffness: Float64Array
  readonly hysteretic: Float64Array
  readonly viscous: Float64Array
  readonly elements: readonly AssembledElement[]
  /** branches whose dynamic stiffness changes with frequency beyond K, H and C */
  readonly varying: readonly AssembledBranch[]
}

export function assemble(network: Network): System {
  const freedoms = numberFreedoms(network)
  const n = freedoms.count
  const mass = new Float64Array(n * n)
  for (const { node, first } of freedoms.nodes.values()) addMass(mass, n, first, node)
  const stiffness = new Float64Array(n * n)
  const hysteretic = new Float64Array(n * n)
  const viscous = new Float64Array(n * n)
  const elements = network.elements.map((element) => ({
    element,
    branches: element.branches.map((branch) => ({
      branch,
      law: branch.law,
      row: branchRow(freedoms, element.from, element.to, branch),
    })),
  }))
  const branches = elements.flatMap((element) => element.branches)
  for (const { law, row } of branches) {
    const steady = steadyPart(law)
    addProduct(stiffness, n, row, steady.stiffness)
    addProduct(hysteretic, n, row, steady.hysteretic)
    addProduct(viscous, n, row, steady.viscous)
  }
  return {
    freedoms,
    mass,
    stiffness,
    hysteretic,
    viscous,
    elements,
    varying: branches.filter(({ law }) => varies(law)),
  }
}

function addMass(mass: Float64Array, n: number, first: number, node: NetworkNode): void {
  const at = (i: number, j: number) => (first + i) * n + first + j
  switch (node.kind) {
    case 'ground':
      return
    case 'line':
      mass[at(0, 0)] = node.mass
      return
    case 'body':
      for (let i = 0; i < 3; i++) mass[at(i, i)] = node.mass
      node.inertia.forEach((row, i) => {
        row.forEach((value, j) => {
          mass[at(3 + i, 3 + j)] = value
        })
      })
      return
    default:
      assertNever(node, 'node')
  }
}

/** matrix += factor · row rowᵀ */
export function addProduct(matrix: Float64Array, n: number, row: SparseRow, factor: number): void {
  if (factor === 0) return
  const { indices, values } = row
  for (let i = 0; i < indices.length; i++) {
    for (let j = 0; j < indices.length; j++) {
      const at = (indices[i] ?? 0) * n + (indices[j] ?? 0)
      matrix[at] = (matrix[at] ?? 0) + factor * (values[i] ?? 0) * (values[j] ?? 0)
    }
  }
}
