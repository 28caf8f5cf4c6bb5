import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { blankProject } from '../../../core/project/create.ts'
import type { ObservedPoint } from '../../../core/project/machine.ts'
import {
  copyBlock,
  parseBlock,
  writeBlock,
  writeCell,
  type Column,
} from '../../../renderer/components/table-columns.ts'
import { extendBlock, groupColumns, neighbour } from '../../../renderer/components/table-moves.ts'

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

describe('a pasted block', () => {
  const add = (project: ReturnType<typeof draft>) =>
    project.machine.points.push({ id: `p${project.machine.points.length}`, name: '', position: [0, 0, 0] })
  const cells = [
    ['One', '10'],
    ['Two', 'wide'],
    ['Three', '30', 'beyond', 'the table'],
  ]

  it('goes on into new rows, and says which cells it could not fill', () => {
    const project = draft()
    const refused = writeBlock(project, POINTS, COLUMNS, cells, { row: 0, column: 0 }, 'SI', add)
    expect(project.machine.points.map((point) => [point.name, point.position[0]])).toEqual([
      ['One', 0.01],
      ['Two', 0.25],
      ['Three', 0.03],
    ])
    expect(refused).toEqual(['“wide” in x: enter a number, for example 25 mm'])
  })

  it('is cut where the table cannot grow', () => {
    const project = draft()
    writeBlock(project, POINTS, COLUMNS, cells, { row: 1, column: 0 }, 'SI')
    expect(project.machine.points.map((point) => point.name)).toEqual(['Drive end', 'One'])
  })
})

describe('moving in a table', () => {
  it('skips computed cells sideways and stays at the edge', () => {
    expect(neighbour({ row: 0, column: 0 }, [1, 0], 2, COLUMNS)).toEqual({ row: 1, column: 0 })
    expect(neighbour({ row: 1, column: 0 }, [1, 0], 2, COLUMNS)).toEqual({ row: 1, column: 0 })
    expect(neighbour({ row: 0, column: 1 }, [0, 1], 2, COLUMNS)).toEqual({ row: 0, column: 1 })
  })

  it('extends a block from its fixed corner, back through it to the other side', () => {
    const anchor = { row: 1, column: 1 }
    const down = extendBlock(null, anchor, [1, 0], 4, 3)
    expect(down).toEqual({ top: 1, bottom: 2, left: 1, right: 1 })
    const back = extendBlock(extendBlock(down, anchor, [-1, 0], 4, 3), anchor, [-1, 0], 4, 3)
    expect(back).toEqual({ top: 0, bottom: 1, left: 1, right: 1 })
    expect(extendBlock(back, anchor, [-1, 0], 4, 3)).toEqual(back)
  })

  it('puts one heading over neighbours of a group', () => {
    const grouped = COLUMNS.map((column, index) => (index === 0 ? column : { ...column, group: 'At rest' }))
    expect(groupColumns(grouped)).toEqual([
      { title: '', span: 1 },
      { title: 'At rest', span: 2 },
    ])
  })
})
