import { assertNever } from '../errors.ts'
import type { MassSummary, Problem } from '../results.ts'
import type { Vec3 } from './fields.ts'
import type { Inertia, MachinePart, MassProperties } from './machine.ts'

type Tensor = [Vec3, Vec3, Vec3]

const FIELD = 'machine.massProperties'
/** Room for rounding in inertias typed from a data sheet. */
const ROUNDING = 1e-6

/**
 * Mass, centre of gravity and inertia tensor of the machine: as typed, or the sum of its parts
 * (uniform solids, parallel-axis theorem). What is missing or cannot belong to any solid body is
 * said at its field.
 */
export function summariseMass(properties: MassProperties): {
  readonly summary: MassSummary | null
  readonly problems: readonly Problem[]
} {
  if (properties.from === 'parts') {
    if (properties.parts.length === 0) {
      return { summary: null, problems: [missing('parts', 'Add at least one part of the machine.')] }
    }
    return { summary: sumParts(properties.parts), problems: [] }
  }
  const { mass, centreOfGravity, inertia } = properties
  const problems: Problem[] = []
  if (mass === null) problems.push(missing('mass', 'Give the mass of the machine.'))
  for (const axis of ['xx', 'yy', 'zz'] as const) {
    if (inertia[axis] === null) {
      problems.push(
        missing(
          `inertia.${axis}`,
          `Give the moment of inertia about ${axis[0] ?? ''} through the centre of gravity.`,
        ),
      )
    }
  }
  const tensor = tensorOf(inertia)
  if (mass === null || tensor === null) return { summary: null, problems }
  const impossible = impossibleInertia(inertia, tensor)
  if (impossible) return { summary: null, problems: [...problems, impossible] }
  return { summary: { mass, centreOfGravity, inertia: tensor }, problems }
}

function missing(field: string, message: string): Problem {
  return { field: `${FIELD}.${field}`, message, kind: 'missing' }
}

function invalid(field: string, message: string): Problem {
  return { field: `${FIELD}.${field}`, message, kind: 'invalid' }
}

function tensorOf({ xx, yy, zz, xy, xz, yz }: Inertia): Tensor | null {
  if (xx === null || yy === null || zz === null) return null
  return [
    [xx, minus(xy), minus(xz)],
    [minus(xy), yy, minus(yz)],
    [minus(xz), minus(yz), zz],
  ]
}

/** Plain zero stays plain. */
function minus(value: number): number {
  return 0 - value
}

/**
 * Mass cannot be negative, so with Q = (trace I) / 2 - I (the second moments of mass) the tensor Q
 * must be positive semidefinite. For the principal axes that is the triangle inequality
 * I1 + I2 >= I3; for any axes it also bounds every product of inertia.
 */
function impossibleInertia(inertia: Inertia, tensor: Tensor): Problem | null {
  const [[xx], [, yy], [, , zz]] = tensor
  const half = (xx + yy + zz) / 2
  const largest = Math.max(xx, yy, zz)
  const moments = { xx: half - xx, yy: half - yy, zz: half - zz }
  for (const axis of ['xx', 'yy', 'zz'] as const) {
    if (moments[axis] < -ROUNDING * largest) {
      return invalid(
        `inertia.${axis}`,
        `No solid body has these moments of inertia: the one about ${axis[0] ?? ''} exceeds the sum of the other two.`,
      )
    }
  }
  const products = [
    ['xy', moments.xx * moments.yy],
    ['xz', moments.xx * moments.zz],
    ['yz', moments.yy * moments.zz],
  ] as const
  for (const [field, bound] of products) {
    if (inertia[field] ** 2 > bound + (ROUNDING * largest) ** 2) {
      return invalid(
        `inertia.${field}`,
        `No solid body has these inertias: this product of inertia must not be beyond ${Number(Math.sqrt(Math.max(bound, 0)).toPrecision(4))} kg m² here.`,
      )
    }
  }
  const { xy, xz, yz } = inertia
  const determinant =
    moments.xx * (moments.yy * moments.zz - yz * yz) -
    xy * (xy * moments.zz - yz * xz) +
    xz * (xy * yz - moments.yy * xz)
  if (determinant < -ROUNDING * largest ** 3) {
    return invalid('inertia', 'No solid body has these inertias: the products are too large together.')
  }
  return isPositiveDefinite(tensor)
    ? null
    : invalid(
        'inertia',
        'The inertia must be positive about every axis through the centre of gravity; the products are too large.',
      )
}

/** Sylvester's criterion, with room for a body that is all but a line. */
function isPositiveDefinite([[a, b, c], [, d, e], [, , f]]: Tensor): boolean {
  const minor = a * d - b * b
  const determinant = a * (d * f - e * e) - b * (b * f - e * c) + c * (b * e - d * c)
  return a > 0 && minor > 1e-12 * a * d && determinant > 1e-12 * a * d * f
}

function sumParts(parts: readonly MachinePart[]): MassSummary {
  const mass = parts.reduce((sum, part) => sum + part.mass, 0)
  const centre: Vec3 = [0, 0, 0]
  for (const part of parts) {
    for (const axis of [0, 1, 2] as const) centre[axis] += (part.mass * part.centre[axis]) / mass
  }
  const inertia: Tensor = [
    [0, 0, 0],
    [0, 0, 0],
    [0, 0, 0],
  ]
  for (const part of parts) addPart(inertia, part, centre)
  return { mass, centreOfGravity: centre, inertia }
}

function addPart(inertia: Tensor, part: MachinePart, centre: Vec3): void {
  const own = ownInertia(part)
  const arm: Vec3 = [part.centre[0] - centre[0], part.centre[1] - centre[1], part.centre[2] - centre[2]]
  const square = arm[0] ** 2 + arm[1] ** 2 + arm[2] ** 2
  for (const i of [0, 1, 2] as const) {
    for (const j of [0, 1, 2] as const) {
      inertia[i][j] += (i === j ? own[i] + part.mass * square : 0) - part.mass * arm[i] * arm[j]
    }
  }
}

/** Principal moments of a uniform solid about its own centre, along the machine axes [kg m²]. */
function ownInertia(part: MachinePart): Vec3 {
  switch (part.shape) {
    case 'box': {
      const [a, b, c] = part.size
      const factor = part.mass / 12
      return [factor * (b * b + c * c), factor * (a * a + c * c), factor * (a * a + b * b)]
    }
    case 'cylinder': {
      const radius = part.diameter / 2
      const along = (part.mass * radius ** 2) / 2
      const across = (part.mass * (3 * radius ** 2 + part.length ** 2)) / 12
      return [
        part.axis === 'x' ? along : across,
        part.axis === 'y' ? along : across,
        part.axis === 'z' ? along : across,
      ]
    }
    default:
      return assertNever(part, 'part')
  }
}
