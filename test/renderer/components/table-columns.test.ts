import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { blankProject } from '../../../core/project/create.ts'
import type { ObservedPoint } from '../../../core/project/machine.ts'
import { copyBlock, parseBlock, writeCell, type Column } from '../../../renderer/components/table-columns.ts'

const POINTS: ObservedPoint[] = [
  { id: 'a', name: 'Drive end', position: [0.1, 0, 0] },
  { id: 'b', name: 'Free\tend', position: [0.25, 0, 0] },
]
const COLUMNS: Column<ObservedPoint>[] = [
  {
    kind: 'text',
    key: 'name',
    title: 'Name',
    get: (point) => point.name,
    set: (draft, index, value) => {
      const point = draft.machine.points[index]
      if (point) point.name = value
    },
  },
  {
    kind: 'quantity',
    key: 'x',
    title: 'x',
    dimension: 'length',
    get: (point) => point.position[0],
    set: (draft, index, value) => {
      const point = draft.machine.points[index]
      if (point && value !== null) point.position[0] = value
    },
  },
  { kind: 'value', key: 'load', title: 'Load', text: () => '12' },
]

function draft() {
  const project = blankProject()
  project.machine.points = structuredClone(POINTS)
  return project
}

describe('blocks of cells', () => {
  it('are copied as spreadsheets read them, in the units on the screen', () => {
    const block = { top: 0, bottom: 1, left: 0, right: 2 }
    expect(copyBlock(POINTS, COLUMNS, block, 'SI')).toBe('Drive end\t100\t12\nFree end\t250\t12')
  })

  it('are recognised in what is pasted; a single value is none', () => {
    expect(parseBlock('1\t2\r\n3\t4\r\n')).toEqual([
      ['1', '2'],
      ['3', '4'],
    ])
    expect(parseBlock('12.5\n')).toBeNull()
  })

  it('write quantities with units, leave computed cells alone and refuse wrong text', () => {
    const project = draft()
    const [, x, load] = COLUMNS
    if (!x || !load) throw new Error('the columns above')
    expect(writeCell(project, 0, POINTS[0], x, '0.5 m', 'SI')).toBe(true)
    expect(project.machine.points[0]?.position[0]).toBe(0.5)
    expect(writeCell(project, 0, POINTS[0], load, '7', 'SI')).toBe(false)
    expect(writeCell(project, 0, POINTS[0], x, '', 'SI')).toBe(false)
    expect(() => writeCell(project, 1, POINTS[1], x, 'wide', 'SI')).toThrow(InputError)
    expect(project.machine.points[1]?.position[0]).toBe(0.25)
  })
})
