import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { runUpSchema } from '../../../core/project/run-up.ts'
import { rigidBodyProject, type BodyInputs } from './rigid-body.ts'
import { singleFreedomProject } from './single-freedom.ts'

/** As the reference files write a passage of one freedom, everything against its natural frequency. */
export interface PassageInputs {
  readonly zeta: number
  /** acceleration over natural frequency squared */
  readonly alpha: number
  readonly forcing: 'constant' | 'unbalance_omega2' | 'unbalance_full'
  readonly r_start: number
  readonly r_end: number
}

/** Any mass, frequency and force would do. */
export const FREEDOM = { mass: 240, omega: 31, force: 90, unbalance: 0.004 } as const

/** What a response of 1 in the reference is here [m]. */
export function unitOf({ forcing }: PassageInputs): number {
  const { mass, omega, force, unbalance } = FREEDOM
  return forcing === 'constant' ? force / (mass * omega ** 2) : unbalance / mass
}

/** One vertical freedom taken at constant acceleration from one frequency ratio to another. */
export function passageProject(inputs: PassageInputs): Project {
  const { mass, omega, force, unbalance } = FREEDOM
  const highest = Math.max(inputs.r_start, inputs.r_end) * omega
  const project = singleFreedomProject({
    mass,
    stiffness: mass * omega ** 2,
    viscous: 2 * inputs.zeta * mass * omega,
    source: inputs.forcing === 'unbalance_full' ? { unbalance } : { force },
    speeds: [highest],
  })
  const time = Math.abs(inputs.r_end - inputs.r_start) / (inputs.alpha * omega)
  const law = { by: 'ramp', from: inputs.r_start * omega, to: inputs.r_end * omega, time } as const
  const up = inputs.r_end > inputs.r_start
  return {
    ...project,
    sources: project.sources.map((source) =>
      source.kind === 'harmonic' && inputs.forcing === 'unbalance_omega2'
        ? {
            ...source,
            load: { ...source.load, amplitude: unbalance * highest ** 2 },
            dependence: { on: 'speedSquared', referenceSpeed: highest },
          }
        : source,
    ),
    runUp: runUpSchema.parse({
      enabled: true,
      up: { enabled: up, law: up ? law : undefined, hold: 0 },
      down: { enabled: !up, law: up ? undefined : law, hold: 0 },
    }),
  }
}

export interface SixFreedomInputs extends BodyInputs {
  readonly unbalance: NonNullable<BodyInputs['unbalance']>
  readonly end_frequency_Hz: number
  readonly duration_s: number
}

/**
 * A reference body run up from rest under a force that turns about y as U speed² (z - i x), without the
 * tangential part of an unbalance: two harmonic forces a quarter turn apart.
 */
export function sixFreedomProject(inputs: SixFreedomInputs): Project {
  const { unbalance, end_frequency_Hz, duration_s } = inputs
  const highest = 2 * Math.PI * end_frequency_Hz
  const push = (id: string, direction: [number, number, number], phase: number) => ({
    kind: 'harmonic' as const,
    id,
    position: unbalance.point_m,
    load: { kind: 'force' as const, direction, amplitude: unbalance.U_kg_m * highest ** 2 },
    dependence: { on: 'speedSquared' as const, referenceSpeed: highest },
    phase,
  })
  const more: Partial<ProjectInput> = {
    sources: [push('along z', [0, 0, 1], 0), push('along x', [1, 0, 0], -Math.PI / 2)],
    runUp: {
      enabled: true,
      up: { law: { by: 'ramp', to: highest, time: duration_s }, hold: 0 },
      down: { enabled: false },
    },
  }
  return rigidBodyProject(inputs, more)
}
