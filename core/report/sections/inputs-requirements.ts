import { severityScales } from '../../criteria/severity.ts'
import { assertNever } from '../../errors.ts'
import type { Project } from '../../project/project.ts'
import type { Requirement } from '../../project/requirements.ts'
import { nameOf } from '../names.ts'
import { textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'

const SPANS = {
  running: 'running speed',
  operating: 'operating speeds',
  chart: 'every speed of the chart',
} as const

const DURING = {
  both: 'run-up and coast-down',
  up: 'run-up',
  down: 'coast-down',
} as const

/** The requirements as they were put in; how they fare stands under the verdicts. */
export function requirementInputs(project: Project, writer: Writer): readonly Block[] {
  if (project.requirements.length === 0) return []
  const table = {
    caption: 'Requirements as given',
    columns: [
      textColumn('Requirement'),
      textColumn('Speeds'),
      textColumn('Limit'),
      textColumn('Source'),
      textColumn('State'),
    ],
    rows: project.requirements.map((requirement): readonly Cell[] => [
      subject(requirement, project, writer),
      'speeds' in requirement
        ? SPANS[requirement.speeds]
        : 'during' in requirement
          ? DURING[requirement.during]
          : 'at rest',
      limitWords(requirement, writer),
      requirement.source,
      requirement.enabled ? 'on' : 'switched off',
    ]),
    marks: project.requirements.map((requirement) => (requirement.enabled ? 'plain' : 'off')),
  } as const
  return [{ kind: 'heading', text: 'Requirements' }, writeTable(table, writer)]
}

function subject(requirement: Requirement, project: Project, writer: Writer): string {
  switch (requirement.kind) {
    case 'isolation':
      return 'isolation efficiency'
    case 'transmittedForce':
      return requirement.place === 'support'
        ? 'dynamic force into the support'
        : 'dynamic force through the hardest loaded mount'
    case 'vibrationVelocity': {
      const point = project.machine.points.find((candidate) => candidate.id === requirement.point)
      const direction =
        requirement.direction === 'worst' ? 'worst direction' : `direction ${requirement.direction}`
      return `RMS velocity of ${point ? nameOf(point) : 'a point not chosen'}, ${direction}`
    }
    case 'modeSeparation': {
      const orders = requirement.orders.map((order) => writer.number(order, 'ratio')).join(', ')
      return `natural frequencies clear of ${requirement.orders.length > 1 ? 'orders' : 'order'} ${orders}`
    }
    case 'mountLoad':
      return 'static load of the mounts as a share of the rated load'
    case 'mountDeflection':
      return 'static deflection of the mounts'
    case 'absorberStroke': {
      const absorber = project.absorbers.find((candidate) => candidate.id === requirement.absorber)
      return `travel of ${absorber ? nameOf(absorber) : 'every absorber'}, zero to peak`
    }
    case 'runUpMotion': {
      const point = project.machine.points.find((candidate) => candidate.id === requirement.point)
      const place =
        requirement.place === 'mounts'
          ? 'across the mounts'
          : `of ${point ? nameOf(point) : 'a point not chosen'}`
      const direction = requirement.direction === 'resultant' ? '' : `, direction ${requirement.direction}`
      return `dynamic displacement ${place}${direction}, zero to peak`
    }
    case 'runUpForce':
      return 'dynamic force through the hardest loaded mount'
    default:
      return assertNever(requirement, 'requirement')
  }
}

function limitWords(requirement: Requirement, writer: Writer): string {
  switch (requirement.kind) {
    case 'isolation':
    case 'modeSeparation':
      return bound('at least', requirement.limit, (value) => writer.quantity(value, 'share'))
    case 'transmittedForce':
    case 'runUpForce':
      return bound('at most', requirement.limit, (value) => writer.quantity(value, 'force'))
    case 'vibrationVelocity':
      return requirement.scale === 'own'
        ? bound('at most', requirement.limit, (value) => writer.quantity(value, 'velocity'))
        : severityWords(requirement)
    case 'mountLoad':
      return `at most ${writer.quantity(requirement.limit ?? 1, 'share')}`
    case 'mountDeflection':
      return requirement.limit === null
        ? "each mount's own limit"
        : `at most ${writer.quantity(requirement.limit, 'deflection')}`
    case 'runUpMotion':
      return bound('at most', requirement.limit, (value) => writer.quantity(value, 'deflection'))
    case 'absorberStroke':
      return requirement.limit === null
        ? "each absorber's own limit"
        : `at most ${writer.quantity(requirement.limit, 'deflection')}`
    default:
      return assertNever(requirement, 'requirement')
  }
}

function severityWords(requirement: Extract<Requirement, { kind: 'vibrationVelocity' }>): string {
  const scale = severityScales.find((candidate) => candidate.id === requirement.scale)
  const machineClass = scale?.classes.find((candidate) => candidate.id === requirement.machineClass)
  const zone = requirement.zone === '' ? 'a zone not chosen' : requirement.zone
  return `upper limit of ${zone}, ${scale?.name ?? requirement.scale}, ${machineClass?.name ?? 'class not chosen'}`
}

function bound(words: string, limit: number | null, write: (value: number) => string): string {
  return limit === null ? NOT_KNOWN_WORDS : `${words} ${write(limit)}`
}
