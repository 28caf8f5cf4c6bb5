import type { Vec3 } from '../../../core/project/fields.ts'
import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'

/** Body and mounts as the reference files write them. */
export interface BodyInputs {
  readonly body: {
    readonly mass_kg: number
    readonly cg_m: Vec3
    readonly inertia_about_cg_kg_m2: Readonly<Record<'Ixx' | 'Iyy' | 'Izz' | 'Ixy' | 'Ixz' | 'Iyz', number>>
  }
  readonly mounts: readonly {
    readonly pos_m: Vec3
    readonly k_N_per_m: Vec3
    readonly eta?: number
    readonly c_N_s_per_m?: Vec3
    readonly tilt?: { readonly axis: Vec3; readonly angle_deg: number }
  }[]
  readonly unbalance?: {
    readonly U_kg_m: number
    readonly point_m: Vec3
    readonly shaft_axis: 'x' | 'y' | 'z'
  }
  readonly freqs_Hz?: readonly number[]
  readonly points_m?: Readonly<Record<string, Vec3>>
}

/**
 * A reference body on its mounts as a project; the exciting frequencies become shaft speeds.
 * The reference neglects the geometric stiffness of the weight, so it is switched off.
 * @param more parts of the project that replace the built ones, such as absorbers
 */
export function rigidBodyProject(inputs: BodyInputs, more: Partial<ProjectInput> = {}): Project {
  const { Ixx, Iyy, Izz, Ixy, Ixz, Iyz } = inputs.body.inertia_about_cg_kg_m2
  const { unbalance, freqs_Hz = [], points_m = {} } = inputs
  const speeds = freqs_Hz.map((frequency) => 2 * Math.PI * frequency)
  const input: ProjectInput = {
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties: {
        from: 'typed',
        mass: inputs.body.mass_kg,
        centreOfGravity: inputs.body.cg_m,
        inertia: { xx: Ixx, yy: Iyy, zz: Izz, xy: Ixy, xz: Ixz, yz: Iyz },
      },
      ...(unbalance ? { shaft: { axis: unbalance.shaft_axis, position: unbalance.point_m } } : {}),
      duty: { runningSpeed: speeds[0] ?? null, furtherSpeeds: speeds.slice(1) },
      points: Object.entries(points_m).map(([id, position]) => ({ id, position })),
    },
    sources: unbalance
      ? [{ kind: 'unbalance', id: 'source', amount: { by: 'unbalance', unbalance: unbalance.U_kg_m } }]
      : [],
    mounting: {
      types: inputs.mounts.map((mount, index) => ({
        id: `type ${index + 1}`,
        stiffness: mount.k_N_per_m,
        lossFactor: mount.eta ?? 0,
        viscous: mount.c_N_s_per_m ?? [0, 0, 0],
      })),
      placed: inputs.mounts.map((mount, index) => ({
        id: `M${index + 1}`,
        type: `type ${index + 1}`,
        position: mount.pos_m,
        tilt: mount.tilt ? { axis: mount.tilt.axis, angle: (mount.tilt.angle_deg * Math.PI) / 180 } : null,
      })),
    },
    analysis: { gravityStiffness: false },
    ...more,
  }
  return readProject(input)
}
