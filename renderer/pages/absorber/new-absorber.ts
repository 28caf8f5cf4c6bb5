import type { Absorber } from '../../../core/project/absorber.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Evaluation, Mode } from '../../../core/results.ts'
import { operatingRange } from '../../../core/verdict/span.ts'

/** Motions that run along one machine axis, with that axis. */
const AXIS_OF_MOTION: Readonly<Record<string, Vec3>> = {
  surge: [1, 0, 0],
  sway: [0, 1, 0],
  heave: [0, 0, 1],
}
const AXES: readonly Vec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
]

/**
 * A first absorber where it would do most: on the mode that troubles the requirements, at the judged
 * point. Everything about it can be changed.
 */
export function newAbsorber(project: Project, evaluation: Evaluation | null, id: string): Absorber {
  const modes = evaluation?.modes ?? []
  const mode = troublingMode(project, evaluation, modes)
  const position = judgedPoint(project) ?? evaluation?.massSummary?.centreOfGravity ?? [0, 0, 0]
  const direction = mode ? directionOf(mode, position, evaluation) : AXES[2]
  return {
    id,
    name: `Absorber ${project.absorbers.length + 1}`,
    enabled: true,
    host: {
      kind: 'mode',
      mode: mode?.number ?? 1,
      position: [...position],
      direction: [...(direction ?? [0, 0, 1])] as Vec3, // a spread of a triple keeps its three members
    },
    size: { by: 'ratio', ratio: 0.05 },
    tuning: { by: 'minimax', objective: { excitation: 'force', response: 'displacement' } },
    strokeLimit: null,
  }
}

function judgedPoint(project: Project): Vec3 | null {
  const judged = project.requirements.flatMap((entry) =>
    entry.kind === 'vibrationVelocity' && entry.enabled ? [entry.point] : [],
  )
  const points = project.machine.points
  return (points.find((point) => judged.includes(point.id)) ?? points[0])?.position ?? null
}

/** The mode met closest to where a verdict fails; else one met within the operating speeds; else the lowest. */
function troublingMode(
  project: Project,
  evaluation: Evaluation | null,
  modes: readonly Mode[],
): Mode | undefined {
  const failing = evaluation?.verdicts.find(
    (verdict) => (verdict.status === 'fail' || verdict.status === 'near') && verdict.governingSpeed !== null,
  )
  const speed = failing?.governingSpeed ?? null
  if (speed !== null && speed > 0) {
    const distance = (mode: Mode) =>
      Math.min(Infinity, ...mode.crossings.map((crossing) => Math.abs(Math.log(crossing.speed / speed))))
    return modes.toSorted((a, b) => distance(a) - distance(b))[0]
  }
  const range = operatingRange(project)
  const met = modes.find((mode) =>
    mode.crossings.some((crossing) => range && crossing.speed >= range[0] && crossing.speed <= range[1]),
  )
  return met ?? modes[0]
}

/** The axis along which the mode moves; of a turning mode the axis along which this point moves most. */
function directionOf(mode: Mode, position: Readonly<Vec3>, evaluation: Evaluation | null): Vec3 | undefined {
  const named = AXIS_OF_MOTION[mode.name]
  if (named) return named
  const motion = motionAt(mode, position, evaluation?.massSummary?.centreOfGravity ?? [0, 0, 0])
  const most = Math.max(...motion.map(Math.abs))
  return AXES[motion.findIndex((part) => Math.abs(part) === most)]
}

/** Displacement of a point in a mode shape: u + theta x r. */
function motionAt(mode: Mode, position: Readonly<Vec3>, centre: Readonly<Vec3>): Vec3 {
  const [ux, uy, uz, rx, ry, rz] = mode.shape
  const [x, y, z] = [position[0] - centre[0], position[1] - centre[1], position[2] - centre[2]]
  return [ux + ry * z - rz * y, uy + rz * x - rx * z, uz + rx * y - ry * x]
}
