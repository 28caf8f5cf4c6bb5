import type { Project } from '../../../core/project/project.ts'
import type { Evaluation, Sweep } from '../../../core/results.ts'
import type { Dimension } from '../../../core/units/dimensions.ts'
import { mountName } from '../../../core/verdict/names.ts'
import { valueAt } from '../../charts/sample.ts'

export interface Reading {
  readonly id: string
  readonly label: string
  readonly dimension: Dimension
  readonly value: number | null
  /** the same without absorbers; null also where there are none */
  readonly without: number | null
}

export interface ReadingGroup {
  readonly name: string
  readonly rows: readonly Reading[]
}

type Curve = (sweep: Sweep) => Float64Array | null | undefined

/**
 * What the curves say at one speed: at the support, per mount, per point, per absorber.
 * @param project the one that was evaluated: names are paired with curves by position
 * @param speed [rad/s]
 */
export function readingsAt(project: Project, evaluation: Evaluation, speed: number): readonly ReadingGroup[] {
  const response = evaluation.response
  if (!response) return []
  const at = (sweep: Sweep | null, curve: Curve): number | null => {
    const values = sweep ? curve(sweep) : null
    return sweep && values ? valueAt(sweep.speed, values, speed) : null
  }
  const read = (id: string, label: string, dimension: Dimension, curve: Curve): Reading => ({
    id,
    label,
    dimension,
    value: at(response.sweep, curve),
    without: at(response.sweepWithoutAbsorbers, curve),
  })
  const ratio = read('force-ratio', 'Force ratio', 'ratio', (sweep) => sweep.forceRatio)
  const groups: ReadingGroup[] = [
    {
      name: 'Support',
      rows: [
        ratio,
        {
          ...ratio,
          id: 'isolation',
          label: isolationWords(ratio.value),
          dimension: 'share',
          value: complement(ratio.value),
          without: complement(ratio.without),
        },
        read('support-force', 'Force into the support, peak', 'force', (sweep) => sweep.supportForce),
      ],
    },
    {
      name: 'Force through each mount, peak',
      rows: project.mounting.placed.map((mount, index) =>
        read(`mount-${mount.id}`, mountName(project, mount.id), 'force', (sweep) => sweep.mountForces[index]),
      ),
    },
    {
      name: 'Vibration velocity, RMS',
      rows: project.machine.points.flatMap((point, index) =>
        (['x', 'y', 'z'] as const).map((axis, direction) =>
          read(
            `point-${point.id}-${axis}`,
            `${point.name || point.id}, ${axis}`,
            'velocity',
            (sweep) => sweep.pointVelocity[index]?.[direction],
          ),
        ),
      ),
    },
    {
      name: 'Travel of the absorbers, zero to peak',
      rows: absorbersInPlace(project, evaluation).map(({ id, name }, index) => ({
        ...read(`stroke-${id}`, name, 'deflection', (sweep) => sweep.strokes[index]),
        without: null,
      })),
    },
  ]
  return groups.filter((group) => group.rows.length > 0)
}

/** A machine that passes on more than its exciting force is said to amplify, not to isolate by less than nothing. */
function isolationWords(ratio: number | null): string {
  return ratio !== null && ratio > 1 ? 'Isolation efficiency (negative: amplified)' : 'Isolation efficiency'
}

function complement(ratio: number | null): number | null {
  return ratio === null ? null : 1 - ratio
}

/** Absorbers that stand on the machine, in the order of the strokes. */
export function absorbersInPlace(
  project: Project,
  evaluation: Evaluation,
): readonly { readonly id: string; readonly name: string }[] {
  const count = evaluation.response?.sweep.strokes.length ?? 0
  const ids =
    evaluation.response?.atSpeeds[0]?.orders[0]?.absorbers.map((absorber) => absorber.id) ??
    project.absorbers.filter((entry) => entry.enabled && entry.host.kind === 'mode').map((entry) => entry.id)
  return ids.slice(0, count).map((id) => {
    const index = project.absorbers.findIndex((absorber) => absorber.id === id)
    return { id, name: project.absorbers[index]?.name || `Absorber ${index + 1}` }
  })
}
