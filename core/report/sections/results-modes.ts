import type { Evaluation, Mode } from '../../results.ts'
import { column, textColumn, writeTable, type Cell, type RawTable } from '../raw-table.ts'
import type { Block } from '../report.ts'
import type { Writer } from '../writer.ts'

/** Natural modes without and with absorbers, and the speeds at which the orders meet them. */
export function modeBlocks(evaluation: Evaluation, writer: Writer): readonly Block[] {
  const { modes, modesWithAbsorbers } = evaluation
  if (modes === null) return [{ kind: 'paragraph', text: 'The natural modes are not known.' }]
  const blocks: Block[] = [
    writeTable(modeTable('Natural modes of the machine on its mounts', modes), writer),
    ...crossingTables('Speeds at which the orders meet the modes', modes, writer),
  ]
  if (modesWithAbsorbers !== null) {
    blocks.push(
      writeTable(modeTable('Natural modes with the absorbers in place', modesWithAbsorbers), writer),
      ...crossingTables(
        'Speeds at which the orders meet the modes, absorbers in place',
        modesWithAbsorbers,
        writer,
      ),
    )
  }
  return blocks
}

export function modeTable(caption: string, modes: readonly Mode[]): RawTable {
  const withAbsorber = modes.some((mode) => Object.keys(mode.absorberShape).length > 0)
  return {
    caption: `${caption} (shares are of the kinetic energy)`,
    columns: [
      column('No.', 'ratio'),
      textColumn('Motion'),
      column('Natural frequency', 'frequency'),
      column('Damped', 'frequency'),
      column('Damping ratio', 'ratio', 3),
      ...['x', 'y', 'z', 'about x', 'about y', 'about z'].map((label) => column(label, 'share', 3)),
      ...(withAbsorber ? [column('absorbers', 'share', 3)] : []),
    ],
    rows: modes.map((mode): readonly Cell[] => [
      mode.number,
      mode.name,
      mode.frequency,
      mode.dampedFrequency,
      mode.dampingRatio,
      ...mode.energyShare.map(asRounded),
      ...(withAbsorber ? [asRounded(1 - mode.energyShare.reduce((sum, share) => sum + share, 0))] : []),
    ]),
  }
}

/** A share that is only rounding reads as zero. */
function asRounded(share: number): number {
  return Math.abs(share) < 1e-9 ? 0 : share
}

/** More orders than this have a table of their own. */
const ORDERS_ABREAST = 8

function crossingTables(caption: string, modes: readonly Mode[], writer: Writer): readonly Block[] {
  const orders = [...new Set(modes.flatMap((mode) => mode.crossings.map((crossing) => crossing.order)))].sort(
    (a, b) => a - b,
  )
  if (orders.length === 0) {
    return [{ kind: 'paragraph', text: 'Nothing excites the machine: no order meets a mode.' }]
  }
  const groups = Array.from({ length: Math.ceil(orders.length / ORDERS_ABREAST) }, (_, index) =>
    orders.slice(index * ORDERS_ABREAST, (index + 1) * ORDERS_ABREAST),
  )
  return groups.map((group) =>
    writeTable(
      {
        caption,
        columns: [
          column('No.', 'ratio'),
          textColumn('Motion'),
          ...group.map((order) => column(`Order ${writer.number(order, 'ratio')}`, 'shaftSpeed')),
        ],
        rows: modes.map((mode): readonly Cell[] => [
          mode.number,
          mode.name,
          ...group.map((order) => mode.crossings.find((crossing) => crossing.order === order)?.speed ?? null),
        ]),
      },
      writer,
    ),
  )
}
