import type { Project } from '../../project/project.ts'
import type { Evaluation, Problem } from '../../results.ts'
import { column, textColumn, writeTable } from '../raw-table.ts'
import type { Block, Fact } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'

const PROBLEM_WORDS: Readonly<Record<Problem['kind'], string>> = {
  missing: 'missing',
  invalid: 'cannot be used',
  caution: 'take care',
}

/** What the inputs lack or what a person must know about them. */
export function problemBlocks(evaluation: Evaluation, writer: Writer): readonly Block[] {
  if (evaluation.problems.length === 0) return []
  const table = {
    caption: 'Remarks on the inputs',
    columns: [textColumn('Field'), textColumn('Kind'), textColumn('Remark')],
    rows: evaluation.problems.map((problem) => [problem.field, PROBLEM_WORDS[problem.kind], problem.message]),
    marks: evaluation.problems.map((problem) => (problem.kind === 'caution' ? 'near' : 'bad')),
  } as const
  return [writeTable(table, writer)]
}

export function massBlocks(evaluation: Evaluation, writer: Writer): readonly Block[] {
  const { massSummary } = evaluation
  if (massSummary === null) {
    return [{ kind: 'paragraph', text: 'The mass of the machine is not known.' }]
  }
  const [x, y, z] = massSummary.inertia
  const table = {
    caption: 'Inertia tensor about the centre of gravity (products carry their minus sign)',
    columns: [textColumn('Axis'), column('x', 'inertia'), column('y', 'inertia'), column('z', 'inertia')],
    rows: [
      ['x', ...x],
      ['y', ...y],
      ['z', ...z],
    ],
  }
  const facts: Fact[] = [
    { label: 'Mass on the mounts', value: writer.quantity(massSummary.mass, 'mass') },
    {
      label: 'Centre of gravity from the datum',
      value: writer.vector(massSummary.centreOfGravity, 'length'),
    },
  ]
  return [{ kind: 'facts', rows: facts }, writeTable(table, writer)]
}

export function staticBlocks(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  const { statics } = evaluation
  if (statics === null) {
    return [{ kind: 'paragraph', text: 'The static equilibrium is not known.' }]
  }
  const tilt = (value: number) => writer.quantity(value, 'angle', 3)
  const centre = statics.elasticCentre
  return [
    {
      kind: 'facts',
      rows: [
        { label: 'Weight', value: writer.quantity(statics.weight, 'force') },
        { label: 'Sum of the mount loads', value: writer.quantity(statics.loadSum, 'force') },
        {
          label: 'Difference, as a share of the weight',
          value: writer.number(statics.loadSumError, 'ratio', 2),
        },
        {
          label: 'Sinking of the centre of gravity',
          value: writer.quantity(-statics.bodyDisplacement[2], 'deflection'),
        },
        { label: 'Tilt about x, about y', value: `${tilt(statics.tilt[0])}, ${tilt(statics.tilt[1])}` },
        {
          label: 'Elastic centre of the mounts',
          value: centre === null ? NOT_KNOWN_WORDS : writer.vector(centre, 'length'),
        },
      ],
    },
    {
      kind: 'paragraph',
      text: `Loads and deflections of the ${project.mounting.placed.length} mounts stand in the mount schedule.`,
    },
  ]
}
