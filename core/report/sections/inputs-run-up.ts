import { assertNever } from '../../errors.ts'
import type { Project } from '../../project/project.ts'
import type { RunUp } from '../../project/run-up.ts'
import { column, textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'

export const PASS_NAMES = { up: 'Run-up', down: 'Coast-down' } as const
const SIDES = ['up', 'down'] as const
/** A report lists this many lines of a recorded speed; the project holds all of them. */
const MOST_ENTRIES = 40

type Law = RunUp['up']['law'] | RunUp['down']['law']

/** How the shaft comes up to speed and down again, as it was put in; nothing where that is left out. */
export function runUpInputs(project: Project, writer: Writer): readonly Block[] {
  const { runUp } = project
  if (!runUp.enabled) return []
  const table = {
    caption: 'Run-up and coast-down as given',
    columns: [
      textColumn('Passage'),
      textColumn('Law of speed'),
      column('Watched after it for', 'time'),
      textColumn('State'),
    ],
    rows: SIDES.map((side): readonly Cell[] => [
      PASS_NAMES[side],
      lawWords(runUp[side].law, side, writer),
      runUp[side].hold,
      runUp[side].enabled ? 'on' : 'switched off',
    ]),
    marks: SIDES.map((side) => (runUp[side].enabled ? 'plain' : 'off')),
  } as const
  return [
    { kind: 'heading', text: 'Run-up and coast-down' },
    writeTable(table, writer),
    ...SIDES.flatMap((side) => entryBlocks(runUp[side], PASS_NAMES[side], writer)),
  ]
}

function lawWords(law: Law, side: 'up' | 'down', writer: Writer): string {
  if (law.by === 'table') return `table of ${law.entries.length} speeds, straight lines between them`
  const speed = (value: number | null) =>
    value === null ? 'the running speed' : writer.quantity(value, 'shaftSpeed')
  const ends = `from ${speed(law.from)} to ${speed(law.to)}`
  switch (law.by) {
    case 'ramp':
      return `steady ramp ${ends} within ${writer.quantity(law.time, 'time')}`
    case 'torque': {
      const torque = `${side === 'up' ? 'driving torque' : 'friction and brake'} ${writer.quantity(law.torque, 'moment')}`
      const load =
        law.loadTorque === 0
          ? ''
          : `, load torque ${writer.quantity(law.loadTorque, 'moment')} at ${speed(law.loadSpeed)}, growing with the square of speed`
      const inertia = law.inertia === null ? NOT_KNOWN_WORDS : writer.quantity(law.inertia, 'inertia')
      return `${torque} on an inertia of ${inertia} about the shaft${load}; ${ends}`
    }
    default:
      return assertNever(law, 'law')
  }
}

function entryBlocks(
  { enabled, law }: { readonly enabled: boolean; readonly law: Law },
  name: string,
  writer: Writer,
): readonly Block[] {
  if (!enabled || law.by !== 'table' || law.entries.length === 0) return []
  const left = law.entries.length - MOST_ENTRIES
  const table = {
    caption: `${name}: speed against time`,
    columns: [column('Time', 'time'), column('Shaft speed', 'shaftSpeed')],
    rows: law.entries.slice(0, MOST_ENTRIES).map(({ time, speed }): readonly Cell[] => [time, speed]),
  }
  return [
    writeTable(table, writer),
    ...(left > 0
      ? [
          {
            kind: 'paragraph' as const,
            text: `${left} further lines are left out here; the project holds them all.`,
          },
        ]
      : []),
  ]
}
