import type { Vec3 } from '../../../core/project/fields.ts'
import type { MachinePart, MassProperties } from '../../../core/project/machine.ts'
import { summariseMass } from '../../../core/project/mass.ts'
import { newId } from '../../state/ids.ts'

type TypedMass = Extract<MassProperties, { from: 'typed' }>

/** The machine as typed numbers: the sum of its parts, as far as there are any. */
export function toTyped(properties: MassProperties): MassProperties {
  if (properties.from === 'typed') return properties
  const { summary } = summariseMass(properties)
  const blank: TypedMass = {
    from: 'typed',
    mass: null,
    centreOfGravity: [0, 0, 0],
    inertia: { xx: null, yy: null, zz: null, xy: 0, xz: 0, yz: 0 },
  }
  if (!summary) return blank
  const [[xx, xy, xz], [, yy, yz], [, , zz]] = summary.inertia
  return {
    ...blank,
    mass: summary.mass,
    centreOfGravity: [...summary.centreOfGravity],
    // the tensor carries the products with a minus sign; adding 0 turns a -0 into a plain zero
    inertia: { xx, yy, zz, xy: 0 - xy, xz: 0 - xz, yz: 0 - yz },
  }
}

/** The machine as a list of parts: to begin with, the one uniform box that the typed numbers describe. */
export function toParts(properties: MassProperties): MassProperties {
  if (properties.from === 'parts') return properties
  const { mass, centreOfGravity, inertia } = properties
  if (mass === null) return { from: 'parts', parts: [] }
  const size = boxOf(mass, inertia) ?? [1, 0.5, 0.5]
  return {
    from: 'parts',
    parts: [{ shape: 'box', id: 'part1', name: 'Machine', mass, centre: [...centreOfGravity], size }],
  }
}

function boxOf(mass: number, { xx, yy, zz }: TypedMass['inertia']): Vec3 | null {
  if (xx === null || yy === null || zz === null) return null
  const squares = [yy + zz - xx, xx + zz - yy, xx + yy - zz].map((sum) => (6 * sum) / mass)
  if (squares.some((square) => !(square > 0))) return null
  const [a = 0, b = 0, c = 0] = squares.map(Math.sqrt)
  return [a, b, c]
}

/** Principal moments of a uniform box of this mass and overall size [kg m²]. */
export function boxInertia(mass: number, [a, b, c]: Readonly<Vec3>): Vec3 {
  return [(mass * (b * b + c * c)) / 12, (mass * (a * a + c * c)) / 12, (mass * (a * a + b * b)) / 12]
}

/** A further part to begin with, beside nothing in particular: its numbers are there to be typed over. */
export function newPart(shape: MachinePart['shape'], parts: readonly MachinePart[]): MachinePart {
  const common = { id: newId('part', parts), name: shape === 'box' ? 'Box' : 'Cylinder', mass: 100 }
  return shape === 'box'
    ? { ...common, shape, centre: [0, 0, 0.25], size: [1, 0.5, 0.5] }
    : { ...common, shape, centre: [0, 0, 0.25], axis: 'x', diameter: 0.4, length: 0.6 }
}
