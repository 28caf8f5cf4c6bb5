import type { Project } from '../../project/project.ts'
import type { Evaluation, RunUpPass } from '../../results.ts'
import { column, textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block } from '../report.ts'
import type { Writer } from '../writer.ts'
import { PASS_NAMES } from './inputs-run-up.ts'
import { peakGroups, type PeakGroup } from './run-up-peaks.ts'
import { courseWords, runUpSummary } from './run-up-words.ts'

const SIDES = ['up', 'down'] as const
type Side = (typeof SIDES)[number]

/** Peaks of run-up and coast-down side by side; nothing where they are left out. */
export function runUpBlocks(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  if (!project.runUp.enabled) return []
  const { runUp } = evaluation
  const sides = SIDES.filter((side) => runUp?.[side])
  const heading: Block = { kind: 'heading', text: 'Run-up and coast-down' }
  if (!runUp || sides.length === 0)
    return [heading, { kind: 'paragraph', text: 'Run-up and coast-down are not known.' }]
  return [
    heading,
    {
      kind: 'facts',
      rows: sides.flatMap((side) => {
        const pass = runUp[side]
        return pass ? [{ label: PASS_NAMES[side], value: passWords(pass, writer) }] : []
      }),
    },
    ...runUpSummary(project, runUp, writer.system).map((text): Block => ({ kind: 'paragraph', text })),
    {
      kind: 'paragraph',
      text: 'Peaks are zero to peak of the resultant, the highest that any angle of the shaft at the start gives. "Of steady" is the share of the largest steady value over the same speeds; where a resonance has no damping there is none.',
    },
    ...peakGroups(project, runUp).flatMap((group) => groupBlocks(group, sides, writer)),
  ]
}

function passWords(pass: RunUpPass, writer: Writer): string {
  const found = pass.converged
    ? `peaks found to ${writer.quantity(pass.errorEstimate, 'share', 2)}`
    : 'not every peak could be searched to the last: one may be a little higher'
  return `${courseWords(pass, writer.system)}; ${found}`
}

function groupBlocks(group: PeakGroup, sides: readonly Side[], writer: Writer): readonly Block[] {
  const table = {
    caption: `${group.title} in passing the resonances`,
    columns: [
      textColumn('Place'),
      ...sides.flatMap((side) => [
        column(`${PASS_NAMES[side]}: peak`, group.dimension),
        column('at', 'shaftSpeed'),
        column('after', 'time'),
        column('of steady', 'share', 3),
      ]),
    ],
    rows: group.rows.map((row): readonly Cell[] => [
      row.place,
      ...sides.flatMap((side): readonly Cell[] => {
        const peak = row[side]
        return peak ? [peak.value, peak.speed, peak.time, peak.ratio] : [null, null, null, null]
      }),
    ]),
  }
  return [writeTable(table, writer)]
}
