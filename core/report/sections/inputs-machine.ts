import { assertNever } from '../../errors.ts'
import { directionWords } from '../../excitation/describe.ts'
import type { MachinePart, MassProperties } from '../../project/machine.ts'
import type { Project } from '../../project/project.ts'
import type { Source } from '../../project/sources.ts'
import type { Evaluation } from '../../results.ts'
import { nameOf } from '../names.ts'
import { column, textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block, Fact } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'

/** Mass, shaft, duty, observed points and exciting forces, as they were put in. */
export function machineInputs(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  return [
    { kind: 'heading', text: 'Machine' },
    ...massBlocks(project.machine.massProperties, writer),
    { kind: 'facts', rows: shaftFacts(project, writer) },
    ...pointBlocks(project, writer),
    { kind: 'heading', text: 'Exciting forces' },
    ...sourceBlocks(project, evaluation, writer),
  ]
}

function massBlocks(properties: MassProperties, writer: Writer): readonly Block[] {
  if (properties.from === 'parts') {
    if (properties.parts.length === 0)
      return [{ kind: 'paragraph', text: 'No part of the machine is given.' }]
    const table = {
      caption: 'Mass from uniform solids (centres from the datum)',
      columns: [
        textColumn('Part'),
        textColumn('Shape'),
        column('Mass', 'mass'),
        column('Centre x', 'length'),
        column('y', 'length'),
        column('z', 'length'),
        textColumn('Size'),
      ],
      rows: properties.parts.map((part): readonly Cell[] => [
        nameOf(part),
        part.shape === 'box' ? 'box' : `cylinder along ${part.axis}`,
        part.mass,
        ...part.centre,
        sizeWords(part, writer),
      ]),
    }
    return [writeTable(table, writer)]
  }
  const { inertia } = properties
  const q = (value: number | null) => writer.quantity(value, 'inertia')
  return [
    {
      kind: 'facts',
      rows: [
        { label: 'Mass, typed', value: writer.quantity(properties.mass, 'mass') },
        {
          label: 'Centre of gravity from the datum',
          value: writer.vector(properties.centreOfGravity, 'length'),
        },
        {
          label: 'Moments of inertia xx, yy, zz',
          value: [inertia.xx, inertia.yy, inertia.zz].map(q).join('; '),
        },
        {
          label: 'Products of inertia xy, xz, yz',
          value: [inertia.xy, inertia.xz, inertia.yz].map(q).join('; '),
        },
      ],
    },
  ]
}

function sizeWords(part: MachinePart, writer: Writer): string {
  const length = (value: number) => writer.number(value, 'length')
  const unit = writer.unit('length')
  return part.shape === 'box'
    ? `${part.size.map(length).join(' × ')} ${unit}`
    : `diameter ${length(part.diameter)}, length ${length(part.length)} ${unit}`
}

function shaftFacts(project: Project, writer: Writer): readonly Fact[] {
  const { shaft, duty } = project.machine
  const speed = (value: number | null) => writer.quantity(value, 'shaftSpeed')
  const orDefault = (value: number | null, words: string) => (value === null ? words : speed(value))
  return [
    {
      label: 'Shaft',
      value: `along ${shaft.axis} through ${writer.vector(shaft.position, 'length')}, turning ${shaft.sense === 'positive' ? 'right-handed' : 'left-handed'} about it`,
    },
    { label: 'Running speed', value: speed(duty.runningSpeed) },
    { label: 'Lowest operating speed', value: orDefault(duty.lowestSpeed, 'the running speed') },
    { label: 'Highest operating speed', value: orDefault(duty.highestSpeed, 'the running speed') },
    {
      label: 'Highest speed of the charts',
      value: orDefault(duty.chartSpeed, '1.25 times the highest operating speed'),
    },
    ...(duty.furtherSpeeds.length > 0
      ? [{ label: 'Further speeds reported', value: furtherWords(duty.furtherSpeeds, writer) }]
      : []),
  ]
}

const LISTED_SPEEDS = 12

function furtherWords(speeds: readonly number[], writer: Writer): string {
  const listed = speeds.slice(0, LISTED_SPEEDS).map((speed) => writer.number(speed, 'shaftSpeed'))
  const rest = speeds.length - listed.length
  return `${listed.join(', ')} ${writer.unit('shaftSpeed')}${rest > 0 ? ` and ${rest} more` : ''}`
}

function pointBlocks(project: Project, writer: Writer): readonly Block[] {
  const { points } = project.machine
  if (points.length === 0) return []
  const table = {
    caption: 'Points whose motion is reported',
    columns: [textColumn('Point'), column('x', 'length'), column('y', 'length'), column('z', 'length')],
    rows: points.map((point): readonly Cell[] => [nameOf(point), ...point.position]),
  }
  return [writeTable(table, writer)]
}

function sourceBlocks(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  if (project.sources.length === 0) return [{ kind: 'paragraph', text: 'Nothing excites the machine.' }]
  const summaries = new Map(evaluation.sourceSummaries.map((summary) => [summary.id, summary.text]))
  const table = {
    caption: 'Exciting forces',
    columns: [
      textColumn('Source'),
      column('Order', 'ratio'),
      textColumn('As given'),
      textColumn('Place'),
      textColumn('Phase'),
      textColumn('At the running speed'),
    ],
    rows: project.sources.map((source): readonly Cell[] => [
      nameOf(source),
      source.kind === 'unbalance' ? 1 : source.order,
      givenWords(source, writer),
      source.position === null ? 'on the shaft' : writer.vector(source.position, 'length'),
      writer.quantity(source.phase, 'angle'),
      source.enabled ? (summaries.get(source.id) ?? NOT_KNOWN_WORDS) : 'switched off',
    ]),
    marks: project.sources.map((source) => (source.enabled ? 'plain' : 'off')),
  } as const
  return [writeTable(table, writer)]
}

function givenWords(source: Source, writer: Writer): string {
  if (source.kind === 'unbalance') {
    const { amount } = source
    switch (amount.by) {
      case 'unbalance':
        return `unbalance ${writer.quantity(amount.unbalance, 'unbalance')}`
      case 'eccentricity':
        return `rotor ${writer.quantity(amount.rotorMass, 'mass')}, eccentricity ${writer.quantity(amount.eccentricity, 'displacement')}`
      case 'grade': {
        const grade = amount.grade === null ? NOT_KNOWN_WORDS : writer.number(amount.grade, 'balanceGrade')
        const speed =
          amount.serviceSpeed === null
            ? 'the running speed'
            : writer.quantity(amount.serviceSpeed, 'shaftSpeed')
        return `rotor ${writer.quantity(amount.rotorMass, 'mass')}, balance grade G ${grade} at ${speed}`
      }
      default:
        return assertNever(amount, 'unbalance')
    }
  }
  const { load, dependence } = source
  const amplitude = writer.quantity(load.amplitude, load.kind === 'force' ? 'force' : 'moment')
  const along = `${load.kind} ${load.kind === 'force' ? 'along' : 'about'} ${directionWords(load.direction)}`
  if (dependence.on === 'constant') return `${along}, ${amplitude} peak at every speed`
  const reference =
    dependence.referenceSpeed === null
      ? 'the running speed'
      : writer.quantity(dependence.referenceSpeed, 'shaftSpeed')
  return `${along}, ${amplitude} peak at ${reference}, with the square of speed`
}
