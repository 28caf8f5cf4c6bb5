import { describe, expect, it } from 'vitest'
import { assemble } from '../../../core/network/assemble.ts'
import { springDamper } from '../../../core/network/elements.ts'
import { undampedModes } from '../../../core/network/modes.ts'
import { GROUND, type BodyNode, type Network } from '../../../core/network/network.ts'
import { endLoads, staticEquilibrium, withGeometricStiffness } from '../../../core/network/statics.ts'
import { norm, scale, turnedAxes } from '../../../core/numerics/vector3.ts'
import type { Vec3 } from '../../../core/project/fields.ts'

const GRAVITY = 9.80665

describe('withGeometricStiffness', () => {
  it('makes a body on a pivot an inverted pendulum', () => {
    // SOURCE equation of motion of a physical pendulum upside down with a turning spring:
    // (J + m h²) theta'' + (k - m g h) theta = 0; common practice, no source.
    const [mass, height, inertia, turning] = [320, 0.8, 41, 5200]
    const pivot = [0, 0, 0] as const
    const network: Network = {
      nodes: [GROUND, body(mass, [0, 0, height], [inertia, inertia, 30])],
      elements: [
        {
          id: 'pivot',
          from: { node: 'ground', position: pivot },
          to: { node: 'machine', position: pivot },
          branches: [
            ...([0, 1, 2] as const).map((i) => branch(unit(i), 1e13, 'shift')),
            ...([0, 1, 2] as const).map((i) => branch(unit(i), turning, 'turn')),
          ],
        },
      ],
    }
    const system = assemble(network)
    const weight = {
      at: { node: 'machine', position: [0, 0, height] as const },
      force: [0, 0, -mass * GRAVITY] as const,
    }
    const state = staticEquilibrium(system, [weight])
    if (state === null) throw new Error('it stands')
    const modes = undampedModes(withGeometricStiffness(system, endLoads(system, state.forces)))
    const expected = (turning - mass * GRAVITY * height) / (inertia + mass * height ** 2)
    const slow = modes?.omegaSquared.subarray(0, 3) ?? []
    // two tilts; the pivot's stiffness of 1e13 N/m leaves 1e-8, rounding against it 1e-5
    expect(slow[0]).toBeCloseTo(expected, 3)
    expect(slow[1]).toBeCloseTo(expected, 3)
    expect(slow[2]).toBeCloseTo(turning / 30, 3)
  })

  it('is the second variation of the energy under finite rotation', () => {
    const node = body(150, [0.1, -0.05, 0.6], [12, 19, 16])
    const mounts = [
      [0.5, 0.3, 0],
      [0.5, -0.35, 0.1],
      [-0.45, 0.3, 0.02],
      [-0.5, -0.25, 0],
    ] satisfies Vec3[]
    const network: Network = {
      nodes: [GROUND, node],
      elements: mounts.map((position, i) =>
        springDamper(
          { id: `M${i}`, from: { node: 'ground', position }, to: { node: 'machine', position } },
          { stiffness: [3e4 + 1e4 * i, 2e4, 5e4 - 5e3 * i], viscous: [0, 0, 0], lossFactor: 0 },
          turnedAxes([1, 1, 0], 0.2 * i),
        ),
      ),
    }
    const system = assemble(network)
    const weight = { at: { node: 'machine', position: node.centre }, force: [0, 0, -150 * GRAVITY] as const }
    const state = staticEquilibrium(system, [weight])
    if (state === null) throw new Error('it stands')
    const tangent = withGeometricStiffness(system, endLoads(system, state.forces)).stiffness
    const linear = state.displacement

    /** Energy at a displacement q beyond equilibrium, with the rotation vector taken exactly. */
    const energy = (q: readonly number[]): number => {
      const rotation: Vec3 = [q[3] ?? 0, q[4] ?? 0, q[5] ?? 0]
      const axes = norm(rotation) > 0 ? turnedAxes(rotation, norm(rotation)) : turnedAxes([0, 0, 1], 0)
      let sum = 150 * GRAVITY * (q[2] ?? 0)
      system.elements.forEach(({ element, branches }) => {
        const arm = element.to.position.map((value, i) => value - (node.centre[i] ?? 0))
        // static displacement as the linear solution has it, the step beyond it exact
        const moved = [0, 1, 2].map((i) => {
          const turned = [0, 1, 2].reduce(
            (total, k) => total + (arm[k] ?? 0) * (axes[k as 0 | 1 | 2][i] ?? 0),
            0,
          )
          return (q[i] ?? 0) + turned - (arm[i] ?? 0)
        })
        for (const { branch, law, row } of branches) {
          const along = branch.axis.reduce((total, value, i) => total + value * (moved[i] ?? 0), 0)
          let before = 0
          row.indices.forEach((index, k) => (before += (row.values[k] ?? 0) * (linear[index] ?? 0)))
          sum += (law.stiffness * (before + along) ** 2) / 2
        }
      })
      return sum
    }
    const step = 1e-4
    const at = (...moves: readonly (readonly [number, number])[]) => {
      const q = [0, 0, 0, 0, 0, 0]
      for (const [i, sign] of moves) q[i] = (q[i] ?? 0) + sign * step
      return energy(q)
    }
    const largest = Math.max(...tangent)
    for (let i = 0; i < 6; i++) {
      for (let j = 0; j < 6; j++) {
        const second =
          (at([i, 1], [j, 1]) - at([i, 1], [j, -1]) - at([i, -1], [j, 1]) + at([i, -1], [j, -1])) /
          (4 * step ** 2)
        // central differences of step 1e-4 keep six digits; the geometric part is 5e-3 of the largest
        expect(Math.abs(second - (tangent[i * 6 + j] ?? NaN))).toBeLessThan(2e-6 * largest)
      }
    }
  })
})

describe('a body that carries another one', () => {
  it('is overturned by what it carries as well as by its own weight', () => {
    // SOURCE two bodies on one another through a rigid joint are one inverted pendulum: as above
    const [turning, stiff] = [9000, 1e13]
    const lower = { ...body(100, [0, 0, 0.4], [5, 5, 5]), id: 'lower' }
    const upper = body(60, [0, 0, 1.1], [3, 3, 3])
    const joint = (
      id: string,
      from: string,
      to: string,
      height: number,
      spring: (i: 0 | 1 | 2) => number,
    ) => ({
      id,
      from: { node: from, position: [0, 0, height] as const },
      to: { node: to, position: [0, 0, height] as const },
      branches: [
        ...([0, 1, 2] as const).map((i) => branch(unit(i), stiff, 'shift')),
        ...([0, 1, 2] as const).map((i) => branch(unit(i), spring(i), 'turn')),
      ],
    })
    const system = assemble({
      nodes: [GROUND, lower, upper],
      elements: [
        joint('foot', 'ground', 'lower', 0, () => turning),
        joint('joint', 'lower', 'machine', 0.8, () => stiff),
      ],
    })
    const weights = [lower, upper].map(({ id, centre, mass }) => ({
      at: { node: id, position: centre },
      force: [0, 0, -mass * GRAVITY] as const,
    }))
    const state = staticEquilibrium(system, weights)
    if (state === null) throw new Error('it stands')
    const modes = undampedModes(withGeometricStiffness(system, endLoads(system, state.forces)))
    const moment = GRAVITY * (100 * 0.4 + 60 * 1.1)
    const expected = (turning - moment) / (5 + 100 * 0.4 ** 2 + 3 + 60 * 1.1 ** 2)
    // rounding against the stiff joints
    expect((modes?.omegaSquared[0] ?? NaN) / expected).toBeCloseTo(1, 3)
  })
})

describe('staticEquilibrium', () => {
  it('says null where nothing resists a motion', () => {
    const network: Network = {
      nodes: [GROUND, { kind: 'line', id: 'mass', mass: 1, direction: [0, 0, 1] }],
      elements: [],
    }
    expect(staticEquilibrium(assemble(network), [])).toBeNull()
  })
})

function body(mass: number, centre: Vec3, [a, b, c]: Vec3): BodyNode {
  return {
    kind: 'body',
    id: 'machine',
    mass,
    centre,
    inertia: [
      [a, 0, 0],
      [0, b, 0],
      [0, 0, c],
    ],
  }
}

function unit(i: 0 | 1 | 2): Vec3 {
  return scale([i === 0 ? 1 : 0, i === 1 ? 1 : 0, i === 2 ? 1 : 0], 1)
}

function branch(axis: Vec3, stiffness: number, motion: 'shift' | 'turn') {
  return { axis, motion, law: { kind: 'springDamper', stiffness, lossFactor: 0, viscous: 0 } } as const
}
