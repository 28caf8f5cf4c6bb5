import { severityLimit } from '../../criteria/severity.ts'
import type { ObservedPoint } from '../../project/machine.ts'
import type { Project } from '../../project/project.ts'
import type { Requirement, SpeedSpan } from '../../project/requirements.ts'
import type { AbsorberResult, Evaluation, ResponseResult, Sweep } from '../../results.ts'
import type { Dimension } from '../../units/dimensions.ts'
import { operatingRange } from '../../verdict/span.ts'
import { nameOf, tuningWords } from '../names.ts'
import type { Figure, FigureLimit, FigureMark, FigureSeries, ReportSection } from '../report.ts'
import { NOISE, type Writer } from '../writer.ts'
import { runUpFigures } from './figures-run-up.ts'

/** More points than this would make a book: those with a requirement come first. */
const MOST_POINTS = 6

/** The charts: force ratio, force, velocities against their limits, and each absorber's own curve. */
export function figureSection(project: Project, evaluation: Evaluation, writer: Writer): ReportSection {
  const { response } = evaluation
  const figures = [
    ...(response ? responseFigures(project, evaluation, response, writer) : []),
    ...runUpFigures(project, evaluation, writer),
    ...evaluation.absorbers.flatMap((result) => absorberFigure(project, result)),
  ]
  return {
    id: 'charts',
    heading: 'Charts',
    blocks:
      figures.length === 0
        ? [{ kind: 'paragraph', text: 'Nothing can be drawn: the response is not known.' }]
        : figures.map((figure) => ({ kind: 'figure', figure })),
  }
}

/** Lines for the modes; beyond this those of the highest orders are left out. */
const MOST_MARKS = 24

/** What all charts against shaft speed share. */
interface SpeedFrame {
  readonly x: Figure['x']
  readonly marks: readonly FigureMark[]
  readonly operating: Figure['operating']
}

function responseFigures(
  project: Project,
  evaluation: Evaluation,
  response: ResponseResult,
  writer: Writer,
): readonly Figure[] {
  const frame = speedFrame(project, evaluation, response, writer)
  const { sweep, sweepWithoutAbsorbers: bare } = response
  const curve = (pick: (sweep: Sweep) => Float64Array | null, dimension: Dimension): FigureSeries[] => {
    const withAbsorbers = pick(sweep)
    const without = bare ? pick(bare) : null
    return [
      ...(withAbsorbers
        ? [series(bare ? 'with absorbers' : 'as computed', 'main', sweep, withAbsorbers, dimension, writer)]
        : []),
      ...(bare && without ? [series('without absorbers', 'without', bare, without, dimension, writer)] : []),
    ]
  }
  const limitsOf = (kind: 'isolation' | 'transmittedForce') =>
    enabled(project).flatMap((requirement) =>
      requirement.kind === kind && (requirement.kind === 'isolation' || requirement.place === 'support')
        ? limit(requirement, project, response, writer)
        : [],
    )
  const figures: Figure[] = []
  if (sweep.forceRatio !== null) {
    figures.push({
      ...frame,
      id: 'force-ratio',
      title: 'Force ratio against shaft speed',
      description: 'Force into the rigid support over the exciting force; below 1 the mounts isolate.',
      y: { label: 'Force ratio', unit: '', scale: 'log' },
      series: curve((one) => one.forceRatio, 'ratio'),
      limits: limitsOf('isolation'),
    })
  }
  figures.push({
    ...frame,
    id: 'support-force',
    title: 'Dynamic force into the support against shaft speed',
    description: 'Peak of the resultant over all orders.',
    y: { label: 'Force, peak', unit: writer.unit('force'), scale: 'log' },
    series: curve((one) => one.supportForce, 'force'),
    limits: limitsOf('transmittedForce'),
  })
  const mountLimits = enabled(project).flatMap((requirement) =>
    requirement.kind === 'transmittedForce' && requirement.place === 'worstMount'
      ? limit(requirement, project, response, writer)
      : [],
  )
  if (mountLimits.length > 0) {
    figures.push({
      ...frame,
      id: 'mount-force',
      title: 'Dynamic force through the hardest shaken mount',
      description: 'Largest of the mounts at each speed, peak over all orders.',
      y: { label: 'Force, peak', unit: writer.unit('force'), scale: 'log' },
      series: curve((one) => envelope(one.mountForces), 'force'),
      limits: mountLimits,
    })
  }
  return [...figures, ...velocityFigures(project, response, frame, writer)]
}

function velocityFigures(
  project: Project,
  response: ResponseResult,
  frame: SpeedFrame,
  writer: Writer,
): readonly Figure[] {
  const judged = (point: ObservedPoint) =>
    enabled(project).some(
      (requirement) => requirement.kind === 'vibrationVelocity' && requirement.point === point.id,
    )
  const points = project.machine.points.map((point, index) => ({ point, index }))
  const chosen = [
    ...points.filter(({ point }) => judged(point)),
    ...points.filter(({ point }) => !judged(point)),
  ].slice(0, MOST_POINTS)
  const styles = ['main', 'second', 'third'] as const
  const { sweep, sweepWithoutAbsorbers: bare } = response
  return chosen.map(({ point, index }) => {
    const curves = sweep.pointVelocity[index] ?? []
    const before = bare?.pointVelocity[index]
    const largest = Math.max(...curves.map(peakOf))
    return {
      ...frame,
      id: `velocity-${point.id}`,
      title: `Vibration velocity of ${nameOf(point)} against shaft speed`,
      description: 'Overall RMS velocity by direction; a direction without motion is left out.',
      y: { label: 'Velocity, RMS', unit: writer.unit('velocity'), scale: 'log' },
      series: [
        ...(['x', 'y', 'z'] as const).flatMap((axis, direction) => {
          const values = curves[direction]
          const style = styles[direction]
          if (!values || !style || peakOf(values) <= NOISE * largest) return []
          return [series(axis, style, sweep, values, 'velocity', writer)]
        }),
        ...(bare && before
          ? [series('largest, without absorbers', 'without', bare, envelope(before), 'velocity', writer)]
          : []),
      ],
      limits: enabled(project).flatMap((requirement) =>
        requirement.kind === 'vibrationVelocity' && requirement.point === point.id
          ? limit(requirement, project, response, writer)
          : [],
      ),
    }
  })
}

function peakOf(values: Float64Array): number {
  return values.reduce((a, b) => Math.max(a, b), 0)
}

function absorberFigure(project: Project, result: AbsorberResult): readonly Figure[] {
  const absorber = project.absorbers.find((candidate) => candidate.id === result.id)
  if (!absorber || result.curve.g.length === 0) return []
  const x = [...result.curve.g]
  const finite = (values: Float64Array) => [...values].map((value) => (Number.isFinite(value) ? value : null))
  return [
    {
      id: `absorber-${result.id}`,
      title: `${nameOf(absorber)}: the host as one freedom, without and with the absorber`,
      description: `${tuningWords(absorber)}; frequency over the host's own frequency.`,
      x: { label: 'Exciting frequency over host frequency', unit: '', scale: 'linear' },
      y: { label: 'Response, dimensionless', unit: '', scale: 'log' },
      series: [
        { label: 'with the absorber', style: 'main', x, y: finite(result.curve.with) },
        { label: 'without', style: 'without', x, y: finite(result.curve.without) },
        { label: 'travel of the absorber', style: 'second', x, y: finite(result.curve.stroke) },
      ],
      limits: [],
      marks: [],
      operating: null,
    },
  ]
}

function speedFrame(
  project: Project,
  evaluation: Evaluation,
  response: ResponseResult,
  writer: Writer,
): SpeedFrame {
  const shown = (speed: number) => writer.plotted(speed, 'shaftSpeed') ?? 0
  const first = response.sweep.speed[0] ?? 0
  const last = response.sweep.speed.at(-1) ?? 0
  const running = project.machine.duty.runningSpeed
  const range = operatingRange(project)
  const modes = evaluation.modesWithAbsorbers ?? evaluation.modes ?? []
  const crossings = modes
    .flatMap((mode) => mode.crossings.map((crossing) => ({ ...crossing, mode: mode.number })))
    .filter(({ speed }) => speed >= first && speed <= last)
    .sort((a, b) => a.order - b.order)
    .slice(0, MOST_MARKS)
    .map(({ order, speed, mode }): FigureMark => ({
      at: shown(speed),
      label: order === 1 ? String(mode) : `${mode}·${writer.number(order, 'ratio')}×`,
      kind: 'mode',
    }))
  return {
    x: { label: 'Shaft speed', unit: writer.unit('shaftSpeed'), scale: 'linear' },
    marks: [
      ...(running === null ? [] : [{ at: shown(running), label: 'running', kind: 'running' } as const]),
      ...crossings,
    ],
    operating: range && range[1] > range[0] ? [shown(range[0]), shown(range[1])] : null,
  }
}

function series(
  label: string,
  style: FigureSeries['style'],
  sweep: Sweep,
  values: Float64Array,
  dimension: Dimension,
  writer: Writer,
): FigureSeries {
  return {
    label,
    style,
    x: Array.from(sweep.speed, (speed) => writer.plotted(speed, 'shaftSpeed') ?? 0),
    y: Array.from(values, (value) => writer.plotted(value, dimension)),
  }
}

/** The largest of several curves at each place. */
function envelope(curves: readonly Float64Array[]): Float64Array {
  const [first] = curves
  if (!first) return new Float64Array()
  return first.map((_, index) => Math.max(...curves.map((curve) => curve[index] ?? 0)))
}

function enabled(project: Project): readonly Requirement[] {
  return project.requirements.filter((requirement) => requirement.enabled)
}

type Limited = Extract<Requirement, { kind: 'isolation' | 'transmittedForce' | 'vibrationVelocity' }>

/** The limit of a requirement as a line in its chart; none where it is not known. */
function limit(
  requirement: Limited,
  project: Project,
  response: ResponseResult,
  writer: Writer,
): readonly FigureLimit[] {
  const { value, dimension } = limitValue(requirement)
  const shown = value === null ? null : writer.plotted(value, dimension)
  if (shown === null) return []
  return [
    {
      value: shown,
      label: 'limit',
      forbidden: 'above',
      over: spanShown(requirement.speeds, project, response, writer),
    },
  ]
}

function limitValue(requirement: Limited): { value: number | null; dimension: Dimension } {
  switch (requirement.kind) {
    case 'isolation':
      return { value: requirement.limit === null ? null : 1 - requirement.limit, dimension: 'ratio' }
    case 'transmittedForce':
      return { value: requirement.limit, dimension: 'force' }
    case 'vibrationVelocity':
      return {
        value:
          requirement.scale === 'own'
            ? requirement.limit
            : severityLimit(requirement.scale, requirement.machineClass, requirement.zone),
        dimension: 'velocity',
      }
  }
}

function spanShown(
  span: SpeedSpan,
  project: Project,
  response: ResponseResult,
  writer: Writer,
): FigureLimit['over'] {
  const shown = (speed: number) => writer.plotted(speed, 'shaftSpeed') ?? 0
  const running = project.machine.duty.runningSpeed
  const range = operatingRange(project)
  if (span === 'running') return running === null ? null : [shown(running), shown(running)]
  if (span === 'operating') return range === null ? null : [shown(range[0]), shown(range[1])]
  return [shown(response.sweep.speed[0] ?? 0), shown(response.sweep.speed.at(-1) ?? 0)]
}
