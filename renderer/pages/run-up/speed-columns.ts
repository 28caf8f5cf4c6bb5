import type { Project } from '../../../core/project/project.ts'
import type { QuantityColumn } from '../../components/table-columns.ts'
import type { Direction } from './law-edits.ts'

export interface SpeedRow {
  readonly id: string
  readonly time: number
  readonly speed: number
}

/** Columns of the table of speeds against time. */
export function speedColumns(direction: Direction): QuantityColumn<SpeedRow>[] {
  const entry = (draft: Project, index: number) => {
    const { law } = draft.runUp[direction]
    return law.by === 'table' ? law.entries[index] : undefined
  }
  return (['time', 'speed'] as const).map((key) => ({
    kind: 'quantity',
    key,
    title: key === 'time' ? 'Time' : 'Shaft speed',
    dimension: key === 'time' ? 'time' : 'shaftSpeed',
    width: '5rem',
    path: key,
    get: (row) => row[key],
    set: (draft, index, value) => {
      const target = entry(draft, index)
      if (target && value !== null) target[key] = value
    },
  }))
}
