import type { Absorber } from '../project/absorber.ts'
import type { Vec3 } from '../project/fields.ts'
import type { HostSummary, Mode, Problem } from '../results.ts'
import { invalid, missing } from './problems.ts'

/** The single freedom on which an absorber is designed. */
export interface Host extends HostSummary {
  /** natural frequency [rad/s] */
  readonly omega: number
  /** amplitude of the force on the host [N]; 1 when none is given */
  readonly force: number
}

/** Share of a mode in the mobility of a point below which it counts as standing still there. */
const LEAST_SHARE = 1e-8

/** Either the host, or what keeps it from being known. */
export type HostFinding = { readonly host: Host } | { readonly problems: readonly Problem[] }

/**
 * Host of an absorber: the typed single freedom, or a mode of the machine on its mounts seen at the
 * attachment, whose mass there is 1 / phi(p, d)².
 * @param field path of the absorber in the project, such as `absorbers[0]`
 */
export function hostOf(
  absorber: Absorber,
  field: string,
  modes: readonly Mode[] | null,
  centreOfGravity: Vec3 | null,
): HostFinding {
  const { host } = absorber
  if (host.kind === 'single') {
    const problems: Problem[] = []
    if (host.mass === null) problems.push(missing(`${field}.host.mass`, 'Give the modal mass of the host.'))
    if (host.frequency === null) {
      problems.push(missing(`${field}.host.frequency`, 'Give the natural frequency of the host.'))
    }
    if (host.mass === null || host.frequency === null) return { problems }
    return { host: single(host.mass, host.frequency, host.dampingRatio, host.force ?? 1) }
  }
  if (modes === null || centreOfGravity === null) {
    return {
      problems: [
        missing(`${field}.host.mode`, 'The host is a mode of the machine, and its modes are not known yet.'),
      ],
    }
  }
  const mode = modes.find(({ number }) => number === host.mode)
  if (!mode) {
    return {
      problems: [
        invalid(`${field}.host.mode`, `There is no mode ${host.mode}: the machine has ${modes.length}.`),
      ],
    }
  }
  if (!(mode.frequency > 0)) {
    return {
      problems: [
        invalid(`${field}.host.mode`, `Mode ${host.mode} is a free motion without a natural frequency.`),
      ],
    }
  }
  const all = modes.reduce((sum, other) => sum + motion(other, host, centreOfGravity) ** 2, 0)
  const share = motion(mode, host, centreOfGravity) ** 2
  if (!(share > LEAST_SHARE * all)) {
    return {
      problems: [
        invalid(
          `${field}.host.direction`,
          `Mode ${host.mode} does not move at this point along this direction: choose another point, direction or mode.`,
        ),
      ],
    }
  }
  return { host: single(1 / share, mode.frequency, Math.max(0, mode.dampingRatio), 1) }
}

/** Mass-normalised displacement of the mode at the attachment along its direction. */
function motion(
  mode: Mode,
  host: { readonly position: Vec3; readonly direction: Vec3 },
  centreOfGravity: Vec3,
): number {
  const [ux, uy, uz, rx, ry, rz] = mode.shape
  const [x, y, z] = [
    host.position[0] - centreOfGravity[0],
    host.position[1] - centreOfGravity[1],
    host.position[2] - centreOfGravity[2],
  ]
  const [dx, dy, dz] = host.direction
  const at: Vec3 = [ux + ry * z - rz * y, uy + rz * x - rx * z, uz + rx * y - ry * x]
  return (at[0] * dx + at[1] * dy + at[2] * dz) / Math.hypot(dx, dy, dz)
}

function single(mass: number, frequency: number, dampingRatio: number, force: number): Host {
  const omega = 2 * Math.PI * frequency
  return { mass, stiffness: mass * omega * omega, frequency, dampingRatio, omega, force }
}
