import { assertNever } from '../errors.ts'
import { cross, dot, subtract } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import type { Attachment, Branch, Network, NetworkNode } from './network.ts'

/** How many freedoms a node brings into the network. */
export function freedomsOf(node: NetworkNode): number {
  switch (node.kind) {
    case 'ground':
      return 0
    case 'body':
      return 6
    case 'line':
      return 1
    default:
      return assertNever(node, 'node')
  }
}

/**
 * Motion of a place on a node along an axis (or about it) per unit of each of its freedoms.
 * For a body: u + theta x r, so that axis . (theta x r) = theta . (r x axis).
 */
export function motionRow(
  node: NetworkNode,
  position: Readonly<Vec3>,
  axis: Readonly<Vec3>,
  motion: Branch['motion'],
): readonly number[] {
  switch (node.kind) {
    case 'ground':
      return []
    case 'body':
      return motion === 'turn'
        ? [0, 0, 0, ...axis]
        : [...axis, ...cross(subtract(position, node.centre), axis)]
    case 'line':
      return [motion === 'turn' ? 0 : dot(axis, node.direction)]
    default:
      return assertNever(node, 'node')
  }
}

/** Where each node's freedoms begin in the vector of all freedoms. */
export interface Freedoms {
  readonly count: number
  readonly nodes: ReadonlyMap<string, { readonly node: NetworkNode; readonly first: number }>
}

export function numberFreedoms(network: Network): Freedoms {
  const nodes = new Map<string, { node: NetworkNode; first: number }>()
  let count = 0
  for (const node of network.nodes) {
    if (nodes.has(node.id)) throw new Error(`two nodes are called ${node.id}`)
    nodes.set(node.id, { node, first: count })
    count += freedomsOf(node)
  }
  return { count, nodes }
}

/** A row over all freedoms with its zeros left out. */
export interface SparseRow {
  readonly indices: Int32Array
  readonly values: Float64Array
}

/** Motion of a place along an axis as a row over all freedoms. */
export function placeRow(
  freedoms: Freedoms,
  place: Attachment,
  axis: Readonly<Vec3>,
  motion: Branch['motion'] = 'shift',
): SparseRow {
  return sparse(accumulateRow(new Float64Array(freedoms.count), freedoms, place, axis, motion, 1))
}

/** Relative motion (`to` less `from`) of an element's ends along a branch. */
export function branchRow(
  freedoms: Freedoms,
  from: Attachment,
  to: Attachment,
  { axis, motion }: Branch,
): SparseRow {
  const row = new Float64Array(freedoms.count)
  accumulateRow(row, freedoms, to, axis, motion, 1)
  accumulateRow(row, freedoms, from, axis, motion, -1)
  return sparse(row)
}

function accumulateRow(
  row: Float64Array,
  freedoms: Freedoms,
  place: Attachment,
  axis: Readonly<Vec3>,
  motion: Branch['motion'],
  sign: number,
): Float64Array {
  const entry = freedoms.nodes.get(place.node)
  if (!entry) throw new Error(`no node is called ${place.node}`)
  motionRow(entry.node, place.position, axis, motion).forEach((value, index) => {
    row[entry.first + index] = (row[entry.first + index] ?? 0) + sign * value
  })
  return row
}

function sparse(row: Float64Array): SparseRow {
  const indices: number[] = []
  row.forEach((value, index) => {
    if (value !== 0) indices.push(index)
  })
  return { indices: Int32Array.from(indices), values: Float64Array.from(indices, (index) => row[index] ?? 0) }
}
