import fc from 'fast-check'
import { springDamper } from '../../../core/network/elements.ts'
import { GROUND, type Network, type NetworkElement, type NetworkNode } from '../../../core/network/network.ts'
import { turnedAxes, type Matrix3 } from '../../../core/numerics/vector3.ts'
import type { Vec3 } from '../../../core/project/fields.ts'

/** Evenly spread; `fc.double` spreads over exponents, so that most places would fall together. */
const between = (min: number, max: number) =>
  fc.integer({ min: 0, max: 1_000_000 }).map((step) => min + ((max - min) * step) / 1_000_000)
const vector = (min: number, max: number): fc.Arbitrary<Vec3> =>
  fc.tuple(between(min, max), between(min, max), between(min, max))

/** Inertia of a solid box of unit density, turned: any real body's tensor looks like it. */
const inertia: fc.Arbitrary<Matrix3> = fc
  .tuple(vector(0.4, 1.5), vector(-1, 1), between(0, 3), between(20, 400))
  .map(([[a, b, c], axis, angle, mass]): Matrix3 => {
    const own: Vec3 = [mass * (b * b + c * c), mass * (a * a + c * c), mass * (a * a + b * b)]
    const turned = turnedAxes(Math.hypot(...axis) > 0.1 ? axis : [0, 0, 1], angle)
    const at = (i: 0 | 1 | 2, j: 0 | 1 | 2) =>
      ([0, 1, 2] as const).reduce<number>((sum, k) => sum + (own[k] * turned[k][i] * turned[k][j]) / 12, 0)
    const row = (i: 0 | 1 | 2): Vec3 => [at(i, 0), at(i, 1), at(i, 2)]
    return [row(0), row(1), row(2)]
  })

const body = (id: string): fc.Arbitrary<NetworkNode> =>
  fc
    .record({ mass: between(20, 900), centre: vector(-0.3, 0.3), inertia })
    .map((values) => ({ kind: 'body' as const, id, ...values }))

/** Mounts stand near the corners of a rectangle, so that every network is held in all its freedoms. */
const CORNERS: readonly (readonly [x: number, y: number])[] = [
  [0.8, 0.6],
  [0.8, -0.6],
  [-0.8, 0.6],
  [-0.8, -0.6],
]

const mount = (
  id: string,
  from: string,
  to: string,
  [x, y]: readonly [number, number],
  z: number,
): fc.Arbitrary<NetworkElement> =>
  fc
    .record({
      position: vector(-0.2, 0.2).map((shift): Vec3 => [x + shift[0], y + shift[1], z + shift[2]]),
      stiffness: vector(2e4, 9e5),
      viscous: vector(0, 900),
      lossFactor: between(0.02, 0.3),
      axis: vector(-1, 1),
      angle: between(-1, 1),
    })
    .map(({ position, axis, angle, ...values }) =>
      springDamper(
        { id, from: { node: from, position }, to: { node: to, position } },
        values,
        Math.hypot(...axis) > 0.1 ? turnedAxes(axis, angle) : undefined,
      ),
    )

/** Two bodies one above the other on mounts, a mass on a line, both kinds of damping everywhere. */
export const dampedNetwork: fc.Arbitrary<Network> = fc
  .record({
    bodies: fc.tuple(body('machine'), body('raft')),
    lower: fc.tuple(...CORNERS.map((corner, k) => mount(`L${k}`, 'ground', 'raft', corner, -0.4))),
    upper: fc.tuple(...CORNERS.map((corner, k) => mount(`U${k}`, 'raft', 'machine', corner, 0.1))),
    mass: between(2, 60),
    line: fc.record({
      position: vector(-1, 1),
      stiffness: between(1e4, 2e5),
      seriesStiffness: between(1e4, 2e5),
      viscous: between(10, 900),
    }),
  })
  .map(({ bodies, lower, upper, mass, line: { position, ...values } }) => ({
    nodes: [GROUND, ...bodies, { kind: 'line', id: 'mass', mass, direction: [0, 0.6, 0.8] }],
    elements: [
      ...lower,
      ...upper,
      {
        id: 'spring',
        from: { node: 'machine', position },
        to: { node: 'mass', position },
        branches: [{ axis: [0, 0.6, 0.8], motion: 'shift', law: { kind: 'relaxation', ...values } }],
      },
    ],
  }))
