import fc from 'fast-check'
import { Matrix, solve } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import { assemble, type System } from '../../../core/network/assemble.ts'
import { blockCurve, blockVector, readForce, readRow } from '../../../core/network/block-reader.ts'
import { placeRow } from '../../../core/network/kinematics.ts'
import { dynamicStiffness } from '../../../core/network/laws.ts'
import { undampedModes } from '../../../core/network/modes.ts'
import type { Network } from '../../../core/network/network.ts'
import { pointReceptance } from '../../../core/network/receptance.ts'
import { BLOCK, emptyLoad, respond, responseSolver } from '../../../core/network/response.ts'
import { addScaled, rowTimes } from '../../../core/network/statics.ts'
import { cross, turnedAxes, type Matrix3 } from '../../../core/numerics/vector3.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { Complex } from '../../../core/results.ts'
import { dampedNetwork } from './random-network.ts'

/** A network of random numbers is as simple as any: shrinking it only takes time. */
const RUNS = { numRuns: 60, endOnFailure: true }
const omega = fc.double({ min: 3, max: 300, noNaN: true })

function ready(network: Network) {
  const system = assemble(network)
  const modes = undampedModes(system)
  if (modes === null) throw new Error('no modes')
  return { system, solver: responseSolver(system, modes) }
}

/** Displacement of all freedoms under one real load at one frequency. */
function displacement(network: Network, load: Float64Array, w: number) {
  const { system, solver } = ready(network)
  const re: number[] = []
  const im: number[] = []
  respond(solver, Float64Array.of(w), [{ ...emptyLoad(load.length), constantRe: load }], ({ motion }) => {
    for (let j = 0; j < load.length; j++) {
      re.push(motion.re[j * BLOCK] ?? NaN)
      im.push(motion.im[j * BLOCK] ?? NaN)
    }
  })
  return { system, re, im }
}

/** The same from the matrices, by a general-purpose library: [A -B; B A] [x; y] = [f; 0]. */
function byLibrary(system: System, load: Float64Array, w: number): number[] {
  const n = system.freedoms.count
  const real = Matrix.zeros(n, n)
  const imaginary = Matrix.zeros(n, n)
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const at = i * n + j
      real.set(i, j, (system.stiffness[at] ?? NaN) - w * w * (system.mass[at] ?? NaN))
      imaginary.set(i, j, (system.hysteretic[at] ?? NaN) + w * (system.viscous[at] ?? NaN))
    }
  }
  for (const { law, row } of system.varying) {
    const total = dynamicStiffness(law, w)
    if (law.kind !== 'relaxation') throw new Error('unexpected law')
    const full = new Float64Array(n)
    addScaled(full, row, 1)
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const product = (full[i] ?? 0) * (full[j] ?? 0)
        real.set(i, j, real.get(i, j) + (total.re - law.stiffness) * product)
        imaginary.set(i, j, imaginary.get(i, j) + total.im * product)
      }
    }
  }
  const whole = Matrix.zeros(2 * n, 2 * n)
  whole.setSubMatrix(real, 0, 0)
  whole.setSubMatrix(imaginary, n, 0)
  whole.setSubMatrix(Matrix.mul(imaginary, -1), 0, n)
  whole.setSubMatrix(real, n, n)
  return solve(whole, Matrix.columnVector([...load, ...new Array<number>(n).fill(0)])).to1DArray()
}

const someLoad = (n: number) => Float64Array.from({ length: n }, (_, i) => Math.cos(1 + 3 * i))

describe('respond', () => {
  // SOURCE ml-matrix (general-purpose library), LU of the real form. 1e-9 of the largest component:
  // the condition of these matrices reaches 1e6 at a lightly damped resonance.
  it('solves what a general-purpose library solves from the same matrices', () => {
    fc.assert(
      fc.property(dampedNetwork, omega, (network, w) => {
        const load = someLoad(13)
        const { system, re, im } = displacement(network, load, w)
        const expected = byLibrary(system, load, w)
        const largest = Math.max(...expected.map(Math.abs))
        ;[...re, ...im].forEach((value, i) => {
          expect(Math.abs(value - (expected[i] ?? NaN))).toBeLessThan(1e-9 * largest)
        })
      }),
      RUNS,
    )
  })

  it('gives the same motion at a frequency wherever it stands in a long list', () => {
    const network = fc.sample(dampedNetwork, { numRuns: 1, seed: 4 })[0]
    if (!network) throw new Error('no network')
    const { solver } = ready(network)
    const omegas = Float64Array.from({ length: 3 * BLOCK + 7 }, (_, k) => 5 + 0.7 * k)
    const load = { ...emptyLoad(13), constantRe: someLoad(13) }
    const whole: number[] = []
    respond(solver, omegas, [load], ({ count, motion }) => {
      for (let f = 0; f < count; f++) whole.push(motion.re[2 * BLOCK + f] ?? NaN)
    })
    omegas.forEach((w, k) => {
      respond(solver, Float64Array.of(w), [load], ({ motion }) => {
        expect(motion.re[2 * BLOCK]).toBe(whole[k])
      })
    })
  })

  it('adds loads that grow with the square of the frequency', () => {
    const network = fc.sample(dampedNetwork, { numRuns: 1, seed: 5 })[0]
    if (!network) throw new Error('no network')
    const { solver } = ready(network)
    const [w, load] = [40, someLoad(13)]
    const squared = { ...emptyLoad(13), squaredRe: load }
    const constant = { ...emptyLoad(13), constantRe: load.map((value) => value * w * w) }
    const seen: number[] = []
    respond(solver, Float64Array.of(w), [squared, constant], ({ motion }) => {
      seen.push(motion.im[0] ?? NaN)
    })
    expect(seen[0]).toBeCloseTo(seen[1] ?? NaN, 12)
  })
})

describe('physics that holds for any passive linear network', () => {
  // Maxwell and Betti's reciprocal theorem. 1e-9: as above.
  it('is reciprocal: force here, motion there, and the other way round', () => {
    fc.assert(
      fc.property(dampedNetwork, omega, (network, w) => {
        const unit = (at: number) => Float64Array.from({ length: 13 }, (_, i) => (i === at ? 1 : 0))
        const [a, b] = [displacement(network, unit(1), w), displacement(network, unit(9), w)]
        const size = Math.hypot(a.re[9] ?? NaN, a.im[9] ?? NaN)
        const scale = Math.max(size, 1e-3 * Math.max(...a.re.map(Math.abs)))
        expect(Math.abs((a.re[9] ?? NaN) - (b.re[1] ?? NaN))).toBeLessThan(1e-9 * scale)
        expect(Math.abs((a.im[9] ?? NaN) - (b.im[1] ?? NaN))).toBeLessThan(1e-9 * scale)
      }),
      RUNS,
    )
  })

  it('dissipates in its elements exactly the power that the load brings in', () => {
    fc.assert(
      fc.property(dampedNetwork, omega, (network, w) => {
        const load = someLoad(13)
        const { system, re, im } = displacement(network, load, w)
        // mean power of force f and velocity i w q: -w f Im(q) / 2
        const brought = load.reduce((sum, force, i) => sum - (w * force * (im[i] ?? NaN)) / 2, 0)
        const dissipated = system.elements
          .flatMap(({ branches }) => branches)
          .reduce((sum, { law, row }) => {
            const square = rowTimes(row, re) ** 2 + rowTimes(row, im) ** 2
            return sum + (w * dynamicStiffness(law, w).im * square) / 2
          }, 0)
        expect(brought).toBeGreaterThan(0)
        expect(Math.abs(dissipated / brought - 1)).toBeLessThan(1e-8) // cancellation far from resonance
      }),
      RUNS,
    )
  })

  it('does not care how the axes lie', () => {
    fc.assert(
      fc.property(dampedNetwork, omega, (network, w) => {
        const axes = turnedAxes([0.3, -0.5, 0.8], 1.1)
        const place = { node: 'machine', position: [0.4, -0.2, 0.5] as Vec3 }
        const direction: Vec3 = [0.1, -0.7, 0.6]
        const frequencies = Float64Array.of(w / (2 * Math.PI))
        const { system, solver } = ready(network)
        const straight = pointReceptance(system, solver, place, direction, frequencies)
        const turned = ready(turnNetwork(network, axes))
        const again = pointReceptance(
          turned.system,
          turned.solver,
          { node: 'machine', position: turn(axes, place.position) },
          turn(axes, direction),
          frequencies,
        )
        const size = Math.hypot(straight.re[0] ?? NaN, straight.im[0] ?? NaN)
        expect(Math.abs((straight.re[0] ?? NaN) - (again.re[0] ?? NaN))).toBeLessThan(1e-9 * size)
        expect(Math.abs((straight.im[0] ?? NaN) - (again.im[0] ?? NaN))).toBeLessThan(1e-9 * size)
      }),
      RUNS,
    )
  })
})

/** The components of a vector in axes turned against it: v becomes sum of v_i times axis i. */
function turn(axes: Matrix3, v: Readonly<Vec3>): Vec3 {
  const part = (i: 0 | 1 | 2) => v[0] * axes[0][i] + v[1] * axes[1][i] + v[2] * axes[2][i]
  return [part(0), part(1), part(2)]
}

function turnNetwork({ nodes, elements }: Network, axes: Matrix3): Network {
  return {
    nodes: nodes.map((node) => {
      switch (node.kind) {
        case 'ground':
          return node
        case 'line':
          return { ...node, direction: turn(axes, node.direction) }
        case 'body': {
          // R J Rᵀ: turn the rows, then the columns
          const rows = node.inertia.map((row) => turn(axes, row))
          const columns = ([0, 1, 2] as const).map((j) =>
            turn(axes, [rows[0]?.[j] ?? NaN, rows[1]?.[j] ?? NaN, rows[2]?.[j] ?? NaN]),
          )
          const entry = (i: number, j: number) => columns[j]?.[i] ?? NaN
          const row = (i: number): Vec3 => [entry(i, 0), entry(i, 1), entry(i, 2)]
          return { ...node, centre: turn(axes, node.centre), inertia: [row(0), row(1), row(2)] }
        }
      }
    }),
    elements: elements.map((element) => ({
      ...element,
      from: { ...element.from, position: turn(axes, element.from.position) },
      to: { ...element.to, position: turn(axes, element.to.position) },
      branches: element.branches.map((branch) => ({ ...branch, axis: turn(axes, branch.axis) })),
    })),
  }
}

describe('readForce', () => {
  it('adds up branches along slanting axes and leaves turning springs out', () => {
    const network: Network = {
      nodes: [
        { kind: 'ground', id: 'ground' },
        { kind: 'line', id: 'mass', mass: 2, direction: [0, 0, 1] },
      ],
      elements: [
        {
          id: 'pair',
          from: { node: 'ground', position: [0, 0, 0] },
          to: { node: 'mass', position: [0, 0, 0] },
          branches: [
            spring([0.6, 0, 0.8], 1000, 'shift'),
            spring([-0.6, 0, 0.8], 3000, 'shift'),
            spring([0, 0, 1], 5, 'turn'),
          ],
        },
      ],
    }
    const { system, solver } = ready(network)
    const force = blockVector()
    const load = { ...emptyLoad(1), constantRe: Float64Array.of(10) }
    respond(solver, Float64Array.of(1), [load], (block) => {
      const element = system.elements[0]
      if (element) readForce(element, block, blockCurve(), force)
    })
    // by hand: k_z = 0.64 · 4000 = 2560, u = 10 / (2560 - 2); along x 0.48 (1000 - 3000) u
    const u = 10 / 2558
    expect(force.map(({ re }) => re[0])).toEqual([
      expect.closeTo(-960 * u, 12),
      0,
      expect.closeTo(2560 * u, 12),
    ])
  })

  function spring(axis: Vec3, stiffness: number, motion: 'shift' | 'turn') {
    return { axis, motion, law: { kind: 'springDamper', stiffness, lossFactor: 0, viscous: 0 } } as const
  }
})

describe('placeRow', () => {
  it('gives u + theta x r at a place of a body', () => {
    const network = fc.sample(dampedNetwork, { numRuns: 1, seed: 1 })[0]
    if (!network) throw new Error('no network')
    const { system } = ready(network)
    const node = network.nodes[1]
    if (node?.kind !== 'body') throw new Error('not the body')
    const position: Vec3 = [0.9, 0.2, -0.4]
    const motion = [0.1, -0.2, 0.3, 0.01, 0.02, -0.03]
    const arm: Vec3 = [
      position[0] - node.centre[0],
      position[1] - node.centre[1],
      position[2] - node.centre[2],
    ]
    const expected = cross([0.01, 0.02, -0.03], arm)
    for (const [i, axis] of (
      [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ] satisfies Vec3[]
    ).entries()) {
      const row = placeRow(system.freedoms, { node: 'machine', position }, axis)
      expect(rowTimes(row, [...motion, 0, 0, 0, 0, 0, 0, 0])).toBeCloseTo(
        (motion[i] ?? NaN) + (expected[i] ?? NaN),
        14,
      )
    }
  })

  it('reads the same at every frequency of a block', () => {
    const value: Complex = { re: 3, im: -2 }
    const target = blockCurve()
    const motion = { re: new Float64Array(BLOCK).fill(value.re), im: new Float64Array(BLOCK).fill(value.im) }
    const row = { indices: Int32Array.of(0), values: Float64Array.of(2) }
    readRow(row, { first: 0, count: BLOCK, load: 0, omega: new Float64Array(BLOCK), motion }, target)
    expect([target.re[BLOCK - 1], target.im[BLOCK - 1]]).toEqual([6, -4])
  })
})
