import type { Project } from '../../project/project.ts'
import type { Evaluation, RunUpEnvelope } from '../../results.ts'
import type { Figure, FigureLimit } from '../report.ts'
import type { Writer } from '../writer.ts'
import { PASS_NAMES } from './inputs-run-up.ts'
import { peakGroups } from './run-up-peaks.ts'

type Side = 'up' | 'down'

/** Of each passage: the envelope of the place that moves most, and the shaft speed, against time. */
export function runUpFigures(project: Project, evaluation: Evaluation, writer: Writer): readonly Figure[] {
  const { runUp } = evaluation
  if (!runUp) return []
  const rows = peakGroups(project, runUp).flatMap((group) => group.rows)
  return (['up', 'down'] as const).flatMap((side): readonly Figure[] => {
    const envelope = runUp[side]?.envelope
    if (!envelope) return []
    const place = rows.find(({ id }) => id === envelope.place)?.place ?? envelope.place
    const x = { label: 'Time', unit: writer.unit('time'), scale: 'linear' } as const
    const time = Array.from(envelope.time, (value) => writer.plotted(value, 'time') ?? 0)
    return [
      {
        id: `run-up-${side}`,
        title: `${PASS_NAMES[side]}: displacement of ${place} against time`,
        description: `Envelope of the resultant at the ${envelope.of === 'point' ? 'observed point' : 'mount'} that moves most.`,
        x,
        y: { label: 'Displacement, zero to peak', unit: writer.unit('deflection'), scale: 'linear' },
        series: [
          {
            label: 'envelope',
            style: 'main',
            x: time,
            y: Array.from(envelope.displacement, (value) => writer.plotted(value, 'deflection')),
          },
        ],
        limits: clearances(project, envelope, side, writer),
        marks: [],
        operating: null,
      },
      {
        id: `run-up-${side}-speed`,
        title: `${PASS_NAMES[side]}: shaft speed against time`,
        description: 'The speed that the law gives.',
        x,
        y: { label: 'Shaft speed', unit: writer.unit('shaftSpeed'), scale: 'linear' },
        series: [
          {
            label: 'shaft speed',
            style: 'main',
            x: time,
            y: Array.from(envelope.speed, (value) => writer.plotted(value, 'shaftSpeed')),
          },
        ],
        limits: [],
        marks: [],
        operating: null,
      },
    ]
  })
}

/** Clearances of the drawn place that hold during this passage. */
function clearances(
  project: Project,
  envelope: RunUpEnvelope,
  side: Side,
  writer: Writer,
): readonly FigureLimit[] {
  return project.requirements.flatMap((requirement): readonly FigureLimit[] => {
    if (!requirement.enabled || requirement.kind !== 'runUpMotion') return []
    const { place, point, direction, during, limit } = requirement
    const drawn = envelope.of === 'mount' ? place === 'mounts' : place === 'point' && point === envelope.place
    const shown = limit === null ? null : writer.plotted(limit, 'deflection')
    if (!drawn || direction !== 'resultant' || shown === null) return []
    if (during !== 'both' && during !== side) return []
    return [{ value: shown, label: 'limit', forbidden: 'above', over: null }]
  })
}
