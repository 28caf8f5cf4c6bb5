import type { Project } from '../../project/project.ts'
import type { Evaluation, Verdict } from '../../results.ts'
import { STATUS_MARKS, STATUS_WORDS } from '../names.ts'
import { figuresColumn, textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block, ReportSection } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'

/** Every requirement with its value, limit, margin and what governs; what is not known says why. */
export function verdictSection(project: Project, evaluation: Evaluation, writer: Writer): ReportSection {
  const { verdicts } = evaluation
  const put = project.requirements.filter((requirement) => !requirement.enabled).length
  const blocks: Block[] = [{ kind: 'paragraph', text: summary(verdicts, put) }]
  if (verdicts.length > 0) {
    blocks.push({
      ...writeTable(
        {
          caption: 'Requirements',
          columns: [
            textColumn('Requirement'),
            figuresColumn('Value'),
            figuresColumn('Limit'),
            figuresColumn('Margin'),
            textColumn('Governed by'),
            textColumn('Verdict'),
          ],
          rows: verdicts.map((verdict) => verdictRow(verdict, writer)),
          marks: verdicts.map((verdict) => STATUS_MARKS[verdict.status]),
        },
        writer,
      ),
    })
    const notes = verdicts.filter((verdict) => verdict.source !== '' || verdict.advice !== '')
    const advised = notes.some((verdict) => verdict.advice !== '')
    if (notes.length > 0) {
      blocks.push(
        writeTable(
          {
            caption: 'Where the limits come from, and what to look at',
            columns: [
              textColumn('Requirement'),
              textColumn('Source of the limit'),
              ...(advised ? [textColumn('Remark')] : []),
            ],
            rows: notes.map((verdict) => [
              verdict.title,
              verdict.source || NOT_KNOWN_WORDS,
              ...(advised ? [verdict.advice] : []),
            ]),
          },
          writer,
        ),
      )
    }
  }
  return { id: 'verdicts', heading: 'Verdicts', blocks }
}

function verdictRow(verdict: Verdict, writer: Writer): readonly Cell[] {
  const { dimension, keep } = verdict
  const limit = verdict.limit === null ? NOT_KNOWN_WORDS : writer.quantity(verdict.limit, dimension)
  const governing = [
    verdict.governingPlace,
    verdict.governingSpeed === null ? '' : `at ${writer.quantity(verdict.governingSpeed, 'shaftSpeed')}`,
  ].filter((part) => part !== '')
  return [
    verdict.title,
    writer.quantity(verdict.value, dimension),
    verdict.limit === null ? limit : `${keep === 'below' ? 'at most' : 'at least'} ${limit}`,
    // a limit that is kept is no comfort where another one fails: the remark names that
    verdict.status === 'fail' && (verdict.margin ?? 0) >= 0
      ? 'see remark'
      : writer.quantity(verdict.margin, 'share', 3),
    governing.join(', '),
    STATUS_WORDS[verdict.status],
  ]
}

/** Such as '4 met, 1 failed, 1 not known'. */
export function verdictCount(verdicts: readonly Verdict[]): string {
  const count = (status: Verdict['status']) => verdicts.filter((verdict) => verdict.status === status).length
  const near = count('near') === 0 ? '' : ` (${count('near')} of them near the limit)`
  return `${count('pass') + count('near')} met${near}, ${count('fail')} failed, ${count('unknown')} not known`
}

function summary(verdicts: readonly Verdict[], switchedOff: number): string {
  const off =
    switchedOff === 0
      ? ''
      : ` ${switchedOff} ${switchedOff === 1 ? 'requirement is' : 'requirements are'} switched off and not judged.`
  if (verdicts.length === 0) return `No requirement is judged: nothing has been asked of this machine.${off}`
  const total = `${verdicts.length} ${verdicts.length === 1 ? 'requirement' : 'requirements'} judged`
  return `${total}: ${verdictCount(verdicts)}. What could not be computed counts as not known, never as met.${off}`
}
