import type { MountType } from '../../project/mounts.ts'
import type { Project } from '../../project/project.ts'
import type { Evaluation } from '../../results.ts'
import type { LateralCase, LateralStatics, Statics } from '../../statics-results.ts'
import { figureLines } from '../component-figures.ts'
import { nameOf } from '../names.ts'
import { column, textColumn, writeTable, type Cell } from '../raw-table.ts'
import type { Block } from '../report.ts'
import type { Writer } from '../writer.ts'

/** What designed components, working points, levelling and the load sideways come to. */
export function mountResults(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  const { statics } = evaluation
  return [
    ...(statics === null
      ? []
      : [...settingBlocks(project, statics, writer), ...workingBlocks(project, statics, writer)]),
    ...componentBlocks(project, evaluation, writer),
    ...(statics?.lateral ? lateralBlocks(project, statics.lateral, writer) : []),
  ]
}

function nameOfMount(project: Project, id: string): string {
  const mount = project.mounting.placed.find((candidate) => candidate.id === id)
  return mount ? nameOf(mount) : id
}

/** Packing, where there is any. */
function settingBlocks(project: Project, { setting, mounts }: Statics, writer: Writer): readonly Block[] {
  if (setting === 'asBuilt' && mounts.every(({ shim }) => shim === 0)) return []
  const table = {
    caption: setting === 'levelled' ? 'Packing that sets the machine level' : 'Packing as built',
    columns: [
      textColumn('Mark'),
      column('Packing', 'deflection'),
      column('Load aimed at', 'force'),
      column('Load', 'force'),
    ],
    rows: mounts.map(({ id, shim, wishedLoad, load }): readonly Cell[] => [
      nameOfMount(project, id),
      shim,
      wishedLoad,
      load,
    ]),
  }
  return [writeTable(table, writer)]
}

function isPlaced({ mounting }: Project, { id }: MountType): boolean {
  return mounting.placed.some(({ type }) => type === id)
}

/** Whether the stiffness goes with the load. */
function isCurved({ design, law }: MountType): boolean {
  return design === null ? law.kind === 'curve' : design.component === 'airSpring'
}

/** Stiffness where the mounts stand, where that is not the same at every load. */
function workingBlocks(project: Project, { mounts }: Statics, writer: Writer): readonly Block[] {
  if (!project.mounting.types.some((type) => isCurved(type) && isPlaced(project, type))) return []
  const table = {
    caption: 'Mounts at their working points (along their own axes)',
    columns: [
      textColumn('Mark'),
      column('Deflection', 'deflection'),
      column('Static stiffness', 'stiffness'),
      column('Stiffness of vibration', 'stiffness'),
      column('Frequency by deflection', 'frequency'),
      column('Frequency on its stiffness', 'frequency'),
      textColumn('Within its law'),
    ],
    rows: mounts.map((mount): readonly Cell[] => [
      nameOfMount(project, mount.id),
      mount.deflection,
      mount.staticStiffness,
      mount.dynamicStiffness[2],
      mount.frequencyByDeflection,
      mount.frequencyOnLoad,
      mount.beyondLaw ? 'no' : 'yes',
    ]),
    marks: mounts.map(({ beyondLaw }) => (beyondLaw ? 'near' : 'plain')),
  } as const
  return [writeTable(table, writer)]
}

function componentBlocks(project: Project, evaluation: Evaluation, writer: Writer): readonly Block[] {
  return evaluation.components.flatMap(({ type: id, figures, usable }): readonly Block[] => {
    const type = project.mounting.types.find((candidate) => candidate.id === id)
    if (!type?.design) return []
    const heading = { kind: 'heading' as const, text: `Component of ${nameOf(type)}` }
    if (figures === null) {
      return [
        heading,
        { kind: 'paragraph', text: 'Its figures are not known: see the remarks on the inputs.' },
      ]
    }
    return [
      heading,
      {
        kind: 'facts',
        rows: figureLines(type.design, figures, writer.system).map(({ label, text, refused }) => ({
          label,
          value: `${text.replaceAll('–', 'not known')}${refused ? ' (beyond what is allowed)' : ''}`,
        })),
      },
      ...(usable
        ? []
        : [
            {
              kind: 'paragraph' as const,
              text: 'It cannot carry the machine: see the remarks on the inputs.',
            },
          ]),
    ]
  })
}

function lateralBlocks(project: Project, lateral: LateralStatics, writer: Writer): readonly Block[] {
  const [along, against] = lateral.cases
  return [
    { kind: 'heading', text: 'Static load sideways' },
    {
      kind: 'facts',
      rows: [{ label: 'Load through the centre of gravity', value: writer.quantity(lateral.load, 'force') }],
    },
    ...caseBlocks(project, along, 'Mounts under the load along its direction', writer),
    ...caseBlocks(project, against, 'Mounts under the load against its direction', writer),
    { kind: 'paragraph', text: lateral.caution },
  ]
}

function caseBlocks(
  project: Project,
  each: LateralCase | null,
  caption: string,
  writer: Writer,
): readonly Block[] {
  if (each === null) {
    return [
      { kind: 'paragraph', text: `${caption}: no rest position was found, the machine would tip over.` },
    ]
  }
  const table = {
    caption,
    columns: [
      textColumn('Mark'),
      column('Load', 'force'),
      column('Share of rated load', 'share', 3),
      column('Uplift to be held', 'force'),
      column('Sway', 'deflection'),
      column('Share of the snubber gap', 'share', 3),
    ],
    rows: each.mounts.map((mount): readonly Cell[] => [
      nameOfMount(project, mount.id),
      mount.load,
      mount.ratedShare,
      mount.uplift,
      mount.sway,
      mount.gapShare,
    ]),
    marks: each.mounts.map(({ uplift, gapShare, ratedShare }) =>
      uplift > 0 || (gapShare ?? 0) >= 1 || (ratedShare ?? 0) > 1 ? 'near' : 'plain',
    ),
  } as const
  return [writeTable(table, writer)]
}
