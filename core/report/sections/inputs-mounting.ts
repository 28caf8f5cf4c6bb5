import { directionWords } from '../../excitation/describe.ts'
import { effectiveMountType } from '../../mounts/mount-type.ts'
import type { Project } from '../../project/project.ts'
import { nameOf, tuningWords, typeOf } from '../names.ts'
import { column, textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block } from '../report.ts'
import { NOT_KNOWN_WORDS, type Writer } from '../writer.ts'
import { lawInputs, lawWords, settingFacts } from './inputs-mount-laws.ts'

/** Mount types and places, support, absorbers and analysis settings, as they were put in. */
export function mountingInputs(project: Project, writer: Writer): readonly Block[] {
  const { analysis } = project
  return [
    { kind: 'heading', text: 'Mounting' },
    ...typeBlocks(project, writer),
    ...lawInputs(project, writer),
    ...placeBlocks(project, writer),
    {
      kind: 'facts',
      rows: [
        { label: 'Support', value: 'rigid' },
        ...settingFacts(project, writer),
        {
          label: 'Overturning effect of the weight',
          value: analysis.gravityStiffness ? 'included' : 'left out',
        },
        { label: 'Acceleration of gravity', value: writer.quantity(analysis.gravity, 'acceleration', 6) },
      ],
    },
    ...absorberBlocks(project, writer),
  ]
}

function typeBlocks(project: Project, writer: Writer): readonly Block[] {
  const types = project.mounting.types.map((type) => effectiveMountType(type, project.analysis).type)
  if (types.length === 0) return [{ kind: 'paragraph', text: 'No type of mount is given.' }]
  const stiffness = {
    caption: 'Types of mount: stiffness and damping (local axes, z along the mount)',
    columns: [
      textColumn('Type'),
      textColumn('Kind'),
      column('Static stiffness x', 'stiffness'),
      column('y', 'stiffness'),
      column('z', 'stiffness'),
      column('Dynamic / static', 'ratio'),
      column('Loss factor', 'ratio'),
      column('Viscous x', 'damping'),
      column('y', 'damping'),
      column('z', 'damping'),
    ],
    rows: types.map((type): readonly Cell[] => [
      nameOf(type),
      type.kind,
      ...type.stiffness,
      type.dynamicRatio,
      type.lossFactor,
      ...type.viscous,
    ]),
  }
  const limits = {
    caption: `Types of mount: limits and notes${project.mounting.types.some(({ design }) => design !== null) ? ' (limits as typed, narrowed by what dimensions give)' : ''}`,
    columns: [
      textColumn('Type'),
      textColumn('Described by'),
      column('Rated load', 'force'),
      column('Least load', 'force'),
      column('Deflection limit', 'deflection'),
      column('Snubber gap', 'deflection'),
      column('Height', 'length'),
      column('Price', 'ratio'),
      textColumn('Note'),
    ],
    rows: types.map((type): readonly Cell[] => [
      nameOf(type),
      lawWords(type),
      type.ratedLoad,
      type.leastLoad,
      type.deflectionLimit,
      type.snubberGap,
      type.height,
      type.price,
      type.note,
    ]),
  }
  return [writeTable(stiffness, writer), writeTable(limits, writer)]
}

function placeBlocks(project: Project, writer: Writer): readonly Block[] {
  const { placed } = project.mounting
  if (placed.length === 0) return [{ kind: 'paragraph', text: 'No mount is placed.' }]
  const table = {
    caption: 'Places of the mounts (from the datum)',
    columns: [
      textColumn('Mark'),
      textColumn('Type'),
      column('x', 'length'),
      column('y', 'length'),
      column('z', 'length'),
      textColumn('Turned'),
    ],
    rows: placed.map((mount): readonly Cell[] => {
      const type = typeOf(project, mount)
      const turned =
        mount.tilt === null
          ? 'no'
          : `${writer.quantity(mount.tilt.angle, 'angle')} about ${directionWords(mount.tilt.axis)}`
      return [nameOf(mount), type ? nameOf(type) : mount.type, ...mount.position, turned]
    }),
  }
  return [writeTable(table, writer)]
}

function absorberBlocks(project: Project, writer: Writer): readonly Block[] {
  const { absorbers } = project
  if (absorbers.length === 0) return []
  const table = {
    caption: 'Absorbers as given',
    columns: [
      textColumn('Absorber'),
      textColumn('Host'),
      textColumn('Mass'),
      textColumn('Tuning'),
      column('Travel limit', 'deflection'),
      textColumn('State'),
    ],
    rows: absorbers.map((absorber): readonly Cell[] => {
      const { host, size } = absorber
      return [
        nameOf(absorber),
        host.kind === 'mode'
          ? `mode ${host.mode} at ${writer.vector(host.position, 'length')}, along ${directionWords(host.direction)}`
          : `single freedom: ${writer.quantity(host.mass, 'mass')} at ${writer.quantity(host.frequency, 'frequency')}, damping ratio ${writer.quantity(host.dampingRatio, 'ratio')}`,
        sizeWords(size, writer),
        `${tuningWords(absorber)}${tuningFigures(absorber.tuning, writer)}`,
        absorber.strokeLimit,
        absorber.enabled ? 'in place' : 'not in place',
      ]
    }),
    marks: absorbers.map((absorber) => (absorber.enabled ? 'plain' : 'off')),
  } as const
  return [{ kind: 'heading', text: 'Absorbers' }, writeTable(table, writer)]
}

function sizeWords(size: Project['absorbers'][number]['size'], writer: Writer): string {
  if (size.by === 'mass') return writer.quantity(size.mass, 'mass')
  return size.by === 'ratio' ? ratioWords(size.ratio, writer) : 'the least that keeps the travel limit'
}

function ratioWords(ratio: number | null, writer: Writer): string {
  return ratio === null ? NOT_KNOWN_WORDS : `${writer.quantity(ratio, 'share')} of the host's modal mass`
}

function tuningFigures(tuning: Project['absorbers'][number]['tuning'], writer: Writer): string {
  switch (tuning.by) {
    case 'networkMinimax':
      return tuning.lowest === null && tuning.highest === null
        ? ''
        : `, ${writer.quantity(tuning.lowest, 'frequency')} to ${writer.quantity(tuning.highest, 'frequency')}`
    case 'speed':
      return `: ${tuning.speed === null ? 'the running speed' : writer.quantity(tuning.speed, 'shaftSpeed')}, order ${writer.number(tuning.order, 'ratio')}, damping ratio ${writer.number(tuning.dampingRatio, 'ratio')}`
    case 'given':
      return `: ${writer.quantity(tuning.frequency, 'frequency')}, damping ratio ${writer.number(tuning.dampingRatio, 'ratio')}`
    default:
      return ''
  }
}
