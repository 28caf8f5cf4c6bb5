import type { Absorber } from '../../project/absorber.ts'
import type { Project } from '../../project/project.ts'
import type { AbsorberResult, Evaluation } from '../../results.ts'
import type { Dimension } from '../../units/dimensions.ts'
import { editableNumber, unitLabel } from '../../units/format.ts'
import { nameOf, tuningWords } from '../names.ts'
import { column, textColumn, writeCsv, writeTable, type Cell, type RawTable } from '../raw-table.ts'
import type { Block, Fact, ReportSection } from '../report.ts'
import { writerFor, type Writer } from '../writer.ts'
import { trimSteps } from './trim.ts'

/** One figure of the sheet. @remarks `value` is SI */
interface Entry {
  readonly label: string
  readonly value: number | null
  readonly dimension: Dimension
}

/** Everything that has to be made, bought or measured for one absorber. */
export function absorberEntries(
  absorber: Absorber,
  result: AbsorberResult,
  evaluation: Evaluation,
): readonly Entry[] {
  const strokes = strokesOf(absorber, evaluation)
  const entry = (label: string, value: number | null, dimension: Dimension): Entry => ({
    label,
    value,
    dimension,
  })
  return [
    entry('Moving mass', result.mass, 'mass'),
    entry('Spring stiffness along the line', result.stiffness, 'stiffness'),
    entry('Damping coefficient along the line', result.damping, 'damping'),
    entry('Own frequency on a fixed base', result.frequency, 'frequency'),
    entry('Damping ratio over its own frequency', result.dampingRatio, 'ratio'),
    entry("Damping ratio over the host's frequency", result.dampingRatioOverHost, 'ratio'),
    entry('Mass ratio', result.massRatio, 'share'),
    entry('Frequency ratio to the host', result.frequencyRatio, 'ratio'),
    entry('Static sag where it hangs upright', result.staticSag, 'deflection'),
    entry('Modal mass of the host at the attachment', result.host.mass, 'mass'),
    entry('Frequency of the host', result.host.frequency, 'frequency'),
    entry('Damping ratio of the host', result.host.dampingRatio, 'ratio'),
    entry('Lower frequency of the pair, both undamped', result.splitFrequencies[0], 'frequency'),
    entry('Upper frequency of the pair, both undamped', result.splitFrequencies[1], 'frequency'),
    entry('Travel at the running speed, zero to peak', strokes.running, 'deflection'),
    entry('Travel at its highest on the chart, zero to peak', strokes.highest, 'deflection'),
    entry('Travel limit, zero to peak', absorber.strokeLimit, 'deflection'),
    entry(
      'Spring force at the highest travel',
      strokes.highest === null ? null : strokes.highest * result.stiffness,
      'force',
    ),
  ]
}

function strokesOf(absorber: Absorber, evaluation: Evaluation) {
  const ids = evaluation.response?.atSpeeds[0]?.orders[0]?.absorbers.map((taking) => taking.id) ?? []
  const index = ids.indexOf(absorber.id)
  const curve = index < 0 ? undefined : evaluation.response?.sweep.strokes[index]
  return {
    running: evaluation.response?.atSpeeds[0]?.strokes[index] ?? null,
    highest: curve && curve.length > 0 ? curve.reduce((a, b) => Math.max(a, b)) : null,
  }
}

const TRIM_SHARES = [-0.05, -0.02, -0.01, 0.01, 0.02, 0.05]

/** The sheet of every absorber that could be computed, or null where the project has none. */
export function absorberSection(
  project: Project,
  evaluation: Evaluation,
  writer: Writer,
): ReportSection | null {
  if (project.absorbers.length === 0) return null
  const blocks = project.absorbers.flatMap((absorber): readonly Block[] => {
    const result = evaluation.absorbers.find((candidate) => candidate.id === absorber.id)
    const state = absorber.enabled ? '' : ' (not in place: not part of the response)'
    const heading: Block = { kind: 'heading', text: `${nameOf(absorber)}${state}` }
    return result
      ? [heading, ...sheetBlocks(absorber, result, evaluation, writer)]
      : [heading, { kind: 'paragraph', text: 'Not known: the absorber could not be computed.' }]
  })
  return { id: 'absorber-sheet', heading: 'Absorber sheet', blocks }
}

function sheetBlocks(
  absorber: Absorber,
  result: AbsorberResult,
  evaluation: Evaluation,
  writer: Writer,
): readonly Block[] {
  const facts: Fact[] = [
    { label: 'Tuning', value: tuningWords(absorber) },
    ...absorberEntries(absorber, result, evaluation).map(({ label, value, dimension }) => ({
      label,
      value: writer.quantity(value, dimension),
    })),
  ]
  return [
    { kind: 'facts', rows: facts },
    ...detuningBlocks(result, writer),
    writeTable(trimTable(result), writer),
    { kind: 'paragraph', text: toleranceAdvice(result, writer) },
    { kind: 'paragraph', text: trimAdvice(absorber) },
  ]
}

function detuningBlocks(result: AbsorberResult, writer: Writer): readonly Block[] {
  if (result.detuning.length === 0) return []
  const table: RawTable = {
    caption: 'Worst peak when the own frequency is off (single-freedom host)',
    columns: [column('Own frequency off by', 'share'), column('Worst peak', 'ratio')],
    rows: [...result.detuning].sort((a, b) => a.share - b.share).map(({ share, peak }) => [share, peak]),
  }
  return [writeTable(table, writer)]
}

function trimTable(result: AbsorberResult): RawTable {
  return {
    caption: 'Trim: what moves the own frequency',
    columns: [
      column('Own frequency by', 'share'),
      column('Add moving mass (negative: take off)', 'mass'),
      column('or a spring of', 'stiffness'),
    ],
    rows: trimSteps(result, TRIM_SHARES).map((step) => [step.share, step.addedMass, step.stiffness]),
  }
}

function toleranceAdvice(result: AbsorberResult, writer: Writer): string {
  const [lighter, heavier] = trimSteps(result, [0.01, -0.01])
  const span =
    lighter && heavier
      ? `${writer.number(lighter.stiffness - result.stiffness, 'stiffness', 3)} ${writer.unit('stiffness')} of spring or ${writer.number(heavier.addedMass, 'mass', 3)} ${writer.unit('mass')} of moving mass`
      : ''
  return `Tolerance: the own frequency follows the root of stiffness over mass, so that one percent of frequency is about two percent of either (here ${span}). Order the spring no looser than the trim can take up, and provide for trim mass both ways.`
}

/** Which way to trim follows from how the own frequency stands to the host's; see the tests. */
function trimAdvice(absorber: Absorber): string {
  if (absorber.tuning.by === 'speed') {
    return 'Trim: measure the own frequency with the base held fast, and set it to the exciting frequency. On the running machine trim for the least motion at the attachment; a drift of the speed costs more the lighter the absorber is.'
  }
  return "Trim: measure the own frequency with the base held fast, and set it before fitting. On the machine compare the two peaks left: where the lower one is the higher, the absorber's own frequency is too high, so add moving mass; where the upper one is the higher, take mass off."
}

/** The sheets as comma-separated values in the project's units (RFC 4180), one figure a line. */
export function absorberSheetCsv(project: Project, evaluation: Evaluation): string {
  const writer = writerFor(project.units)
  const rows = project.absorbers.flatMap((absorber) => {
    const result = evaluation.absorbers.find((candidate) => candidate.id === absorber.id)
    if (!result) return []
    return absorberEntries(absorber, result, evaluation).map(
      ({ label, value, dimension }): readonly Cell[] => [
        nameOf(absorber),
        absorber.enabled ? 'in place' : 'not in place',
        label,
        value === null ? '' : editableNumber(value, dimension, writer.system),
        unitLabel(dimension, writer.system),
      ],
    )
  })
  const columns = ['Absorber', 'State', 'Quantity', 'Value', 'Unit'].map(textColumn)
  return writeCsv({ caption: '', columns, rows }, writer)
}
