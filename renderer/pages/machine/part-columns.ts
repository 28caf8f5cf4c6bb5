import type { MachinePart } from '../../../core/project/machine.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Column } from '../../components/table-columns.ts'

const AXES = ['x', 'y', 'z'] as const

function partOf(draft: Project, index: number): MachinePart | undefined {
  const properties = draft.machine.massProperties
  return properties.from === 'parts' ? properties.parts[index] : undefined
}

/** Columns of the table of parts. Boxes have three sizes, cylinders a diameter, a length and an axis. */
export function partColumns(): Column<MachinePart>[] {
  return [
    {
      kind: 'text',
      key: 'name',
      title: 'Part',
      width: '7rem',
      path: 'name',
      get: (part) => part.name,
      set: (draft, index, value) => {
        const part = partOf(draft, index)
        if (part) part.name = value
      },
    },
    {
      kind: 'value',
      key: 'shape',
      title: 'Solid',
      text: (part) => (part.shape === 'box' ? 'box' : 'cylinder'),
    },
    {
      kind: 'quantity',
      key: 'mass',
      title: 'Mass',
      dimension: 'mass',
      width: '3.5rem',
      path: 'mass',
      get: (part) => part.mass,
      set: (draft, index, value) => {
        const part = partOf(draft, index)
        if (part && value !== null) part.mass = value
      },
    },
    ...AXES.map((axis, position): Column<MachinePart> => ({
      kind: 'quantity',
      key: `centre-${axis}`,
      title: axis,
      hint: `Centre ${axis}`,
      group: 'Centre',
      dimension: 'length',
      width: '3.25rem',
      path: `centre[${position}]`,
      get: (part) => part.centre[position] ?? 0,
      set: (draft, index, value) => {
        const part = partOf(draft, index)
        if (part && value !== null) part.centre[position] = value
      },
    })),
    ...AXES.map((axis, position): Column<MachinePart> => ({
      kind: 'quantity',
      key: `size-${axis}`,
      title: axis,
      hint: `Size along ${axis}`,
      group: 'Size of a box',
      dimension: 'length',
      width: '3.25rem',
      path: `size[${position}]`,
      get: (part) => (part.shape === 'box' ? part.size[position] : undefined),
      set: (draft, index, value) => {
        const part = partOf(draft, index)
        if (part?.shape === 'box' && value !== null) part.size[position] = value
      },
    })),
    {
      kind: 'choice',
      key: 'axis',
      title: 'Axis',
      hint: 'Axis of the cylinder',
      width: '3rem',
      group: 'Cylinder',
      path: 'axis',
      options: AXES.map((axis) => ({ value: axis, label: axis })),
      get: (part) => (part.shape === 'cylinder' ? part.axis : undefined),
      set: (draft, index, value) => {
        const part = partOf(draft, index)
        const axis = AXES.find((candidate) => candidate === value)
        if (part?.shape === 'cylinder' && axis) part.axis = axis
      },
    },
    ...(['diameter', 'length'] as const).map((key): Column<MachinePart> => ({
      kind: 'quantity',
      key,
      title: key === 'diameter' ? '⌀' : 'Length',
      hint: key === 'diameter' ? 'Diameter' : 'Length along the axis',
      group: 'Cylinder',
      dimension: 'length',
      width: '3.25rem',
      path: key,
      get: (part) => (part.shape === 'cylinder' ? part[key] : undefined),
      set: (draft, index, value) => {
        const part = partOf(draft, index)
        if (part?.shape === 'cylinder' && value !== null) part[key] = value
      },
    })),
  ]
}
