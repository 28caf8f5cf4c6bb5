import type { Project } from '../../project/project.ts'
import type { Evaluation } from '../../results.ts'
import type { Block, Fact, ReportSection } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'
import { verdictCount } from './verdicts.ts'

/** Lines of the title block. @param madeAt as given by the caller, or null */
export function titleBlock(
  project: Project,
  evaluation: Evaluation,
  madeAt: string | null,
  checksum: string,
): readonly Fact[] {
  const { job } = project
  const { verdicts } = evaluation
  return [
    { label: 'Job or order number', value: job.reference },
    { label: 'Site', value: job.site },
    { label: 'Prepared by', value: job.preparedBy },
    { label: 'Requirements', value: verdicts.length === 0 ? 'none judged' : verdictCount(verdicts) },
    { label: 'Made', value: madeAt ?? '' },
    { label: 'Checksum of the inputs', value: `${checksum.slice(0, 16)}…` },
  ].filter((fact) => fact.value !== '')
}

/** What the calculation is about, in a few lines, with the story that came with the project. */
export function jobSection(project: Project, evaluation: Evaluation, writer: Writer): ReportSection {
  const { machine, job } = project
  const { duty } = machine
  const rows: Fact[] = [
    { label: 'Machine', value: machine.description || NOT_KNOWN_WORDS },
    { label: 'Mass on the mounts', value: writer.quantity(evaluation.massSummary?.mass, 'mass') },
    { label: 'Running speed', value: writer.quantity(duty.runningSpeed, 'shaftSpeed') },
    { label: 'Operating speeds', value: operatingWords(project, writer) },
    {
      label: 'Mounts',
      value: `${project.mounting.placed.length} in place, on a rigid support`,
    },
    { label: 'Absorbers', value: absorberCount(project) },
    ...(job.tags.length > 0 ? [{ label: 'Tags', value: job.tags.join(', ') }] : []),
  ]
  const notes: Block[] = job.notes
    .split(/\n\s*\n/)
    .map((text) => text.trim())
    .filter((text) => text !== '')
    .map((text) => ({ kind: 'paragraph', text }))
  return {
    id: 'job',
    heading: 'Job',
    blocks: [
      { kind: 'facts', rows },
      ...(notes.length > 0 ? [{ kind: 'heading', text: 'Notes' } as const, ...notes] : []),
    ],
  }
}

function operatingWords(project: Project, writer: Writer): string {
  const { runningSpeed, lowestSpeed, highestSpeed } = project.machine.duty
  if (lowestSpeed === null && highestSpeed === null) {
    return runningSpeed === null ? NOT_KNOWN_WORDS : 'the running speed only'
  }
  const [from, to] = [lowestSpeed ?? runningSpeed, highestSpeed ?? runningSpeed]
  return `${writer.number(from, 'shaftSpeed')} to ${writer.quantity(to, 'shaftSpeed')}`
}

function absorberCount(project: Project): string {
  const { absorbers } = project
  if (absorbers.length === 0) return 'none'
  const enabled = absorbers.filter((absorber) => absorber.enabled).length
  return `${enabled} in place, ${absorbers.length - enabled} designed but not in place`
}
