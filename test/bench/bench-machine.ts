import { springDamper } from '../../core/network/elements.ts'
import { GROUND, type Network } from '../../core/network/network.ts'
import type { Vec3 } from '../../core/project/fields.ts'

/** The machine of tasks T1 and T2: off-centre body, eight unequal mounts, both kinds of damping. */
export const BENCH_BODY = {
  mass: 2400,
  centre: [0.11, 0.04, 0.55],
  inertia: [
    [420, -35, 60],
    [-35, 1350, -22],
    [60, -22, 1500],
  ],
} as const satisfies { mass: number; centre: Vec3; inertia: [Vec3, Vec3, Vec3] }

export interface BenchMount {
  readonly position: Vec3
  readonly stiffness: Vec3
  readonly lossFactor: number
  readonly viscous: Vec3
}

export const BENCH_MOUNTS: readonly BenchMount[] = Array.from({ length: 8 }, (_, i) => {
  const side = i % 2 === 0 ? 1 : -1
  const softness = 1 + 0.07 * i
  return {
    position: [1.2 - 0.8 * Math.floor(i / 2), side * (0.5 + 0.02 * i), 0.01 * (i % 3)],
    stiffness: [4e5 * softness, 3.5e5 / softness, 7e5 * softness],
    lossFactor: 0.05 + 0.02 * i,
    viscous: [300 + 40 * i, 250, 500 - 30 * i],
  }
})

export const BENCH_NETWORK: Network = {
  nodes: [GROUND, { kind: 'body', id: 'machine', ...BENCH_BODY }],
  elements: BENCH_MOUNTS.map((mount, index) =>
    springDamper(
      {
        id: `M${index + 1}`,
        from: { node: 'ground', position: mount.position },
        to: { node: 'machine', position: mount.position },
      },
      mount,
    ),
  ),
}
