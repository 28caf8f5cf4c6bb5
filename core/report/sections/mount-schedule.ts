import type { Project } from '../../project/project.ts'
import type { Evaluation } from '../../results.ts'
import { nameOf, typeOf } from '../names.ts'
import { column, textColumn, writeCsv, writeTable, type Cell, type RawTable } from '../raw-table.ts'
import type { ReportSection } from '../report.ts'
import { writerFor, type Writer } from '../writer.ts'

/** Every mount with its mark, type, place, static load and deflection, and its force at the running speed. */
export function mountSchedule(project: Project, evaluation: Evaluation): RawTable {
  const statics = new Map(evaluation.statics?.mounts.map((mount) => [mount.id, mount]))
  const running = evaluation.response?.atSpeeds[0]
  return {
    caption: 'Mount schedule',
    columns: [
      textColumn('Mark'),
      textColumn('Type'),
      column('x', 'length'),
      column('y', 'length'),
      column('z', 'length'),
      column('Static load', 'force'),
      column('Deflection', 'deflection'),
      column('Share of rated load', 'share', 3),
      column('Share of deflection limit', 'share', 3),
      column('Dynamic force at running speed', 'force'),
    ],
    rows: project.mounting.placed.map((mount, index): readonly Cell[] => {
      const type = typeOf(project, mount)
      const at = statics.get(mount.id)
      return [
        nameOf(mount),
        type ? nameOf(type) : mount.type,
        ...mount.position,
        at?.load ?? null,
        at?.deflection ?? null,
        at?.ratedShare ?? null,
        at?.limitShare ?? null,
        running?.mountForces[index] ?? null,
      ]
    }),
  }
}

export function mountScheduleSection(
  project: Project,
  evaluation: Evaluation,
  writer: Writer,
): ReportSection {
  const { types, placed } = project.mounting
  if (placed.length === 0) {
    return {
      id: 'mount-schedule',
      heading: 'Mount schedule',
      blocks: [{ kind: 'paragraph', text: 'No mount is placed.' }],
    }
  }
  const order: RawTable = {
    caption: 'To be ordered',
    columns: [
      textColumn('Type'),
      textColumn('Kind'),
      column('Pieces', 'ratio'),
      column('Price of one', 'ratio'),
    ],
    rows: types
      .map((type): readonly Cell[] => [
        nameOf(type),
        type.kind,
        placed.filter((mount) => mount.type === type.id).length,
        type.price,
      ])
      .filter((row) => row[2] !== 0),
  }
  return {
    id: 'mount-schedule',
    heading: 'Mount schedule',
    blocks: [
      writeTable(mountSchedule(project, evaluation), writer),
      writeTable(order, writer),
      {
        kind: 'paragraph',
        text: 'Places are those of the top of each mount, from the datum of the machine. Loads are those at rest, under the weight of the machine and of the absorbers in place. The dynamic force is the peak over all orders.',
      },
    ],
  }
}

/** The mount schedule as comma-separated values in the project's units (RFC 4180). */
export function mountScheduleCsv(project: Project, evaluation: Evaluation): string {
  return writeCsv(mountSchedule(project, evaluation), writerFor(project.units))
}
