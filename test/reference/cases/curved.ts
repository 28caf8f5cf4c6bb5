import type { Vec3 } from '../../../core/project/fields.ts'
import { PROJECT_FORMAT, PROJECT_VERSION, type Project } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import type { BodyInputs } from './rigid-body.ts'

/** Body, mount types and mounts as the file of curved mounts writes them. */
export interface CurvedInputs {
  readonly body: BodyInputs['body']
  readonly types: Readonly<
    Record<
      string,
      {
        readonly k_lateral_N_per_m: readonly [number, number]
        readonly law: { readonly k: number } | { readonly points: readonly (readonly [number, number])[] }
        readonly dynamic_ratio?: number
      }
    >
  >
  readonly mounts: readonly {
    readonly type: string
    readonly pos_m: Vec3
    readonly tilt?: { readonly axis: Vec3; readonly angle_deg: number }
    readonly shim_m?: number
    readonly share?: number
  }[]
  readonly lateral?: { readonly factor: number; readonly direction: Vec3 }
  readonly by?: 'equalLoads' | 'givenShares'
}

/** The reference leaves the overturning of the weight out, so it is switched off. */
export function curvedProject({ body, types, mounts, lateral, by }: CurvedInputs): Project {
  const { Ixx, Iyy, Izz, Ixy, Ixz, Iyz } = body.inertia_about_cg_kg_m2
  return readProject({
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties: {
        from: 'typed',
        mass: body.mass_kg,
        centreOfGravity: body.cg_m,
        inertia: { xx: Ixx, yy: Iyy, zz: Izz, xy: Ixy, xz: Ixz, yz: Iyz },
      },
    },
    mounting: {
      types: Object.entries(types).map(([id, type]) => ({
        id,
        stiffness: [...type.k_lateral_N_per_m, 'k' in type.law ? type.law.k : 0],
        law: 'k' in type.law ? { kind: 'linear' } : { kind: 'curve', points: type.law.points },
        dynamicRatio: type.dynamic_ratio ?? 1,
      })),
      placed: mounts.map((mount, index) => ({
        id: `M${index + 1}`,
        type: mount.type,
        position: mount.pos_m,
        tilt: mount.tilt ? { axis: mount.tilt.axis, angle: (mount.tilt.angle_deg * Math.PI) / 180 } : null,
        shim: mount.shim_m ?? 0,
        share: mount.share ?? null,
      })),
      ...(by === undefined ? {} : { setting: { kind: 'levelled', by } }),
    },
    analysis: { gravityStiffness: false, lateralLoad: lateral ?? null },
  })
}
