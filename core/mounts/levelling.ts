import { settle, type RestoringSpring, type Settled } from '../network/settle.ts'
import { bracketedRoot } from '../numerics/bracketed-root.ts'
import { solvePositiveDefinite } from '../numerics/cholesky.ts'
import { dot, norm, subtract } from '../numerics/vector3.ts'
import type { Vec3, Vec6 } from '../project/fields.ts'
import type { Mounting } from '../project/mounts.ts'
import type { MassSummary, Problem } from '../results.ts'
import { mountForces, resistances } from './curved-statics.ts'
import type { FittedMount } from './machine-network.ts'
import type { Weights } from './statics.ts'

type Aim = Extract<Mounting['setting'], { kind: 'levelled' }>['by']

/** A machine set level on packing. */
export interface Levelled {
  /** the machine's shift and yaw; its tilts are zero */
  readonly displacement: Vec6
  /** packing under each mount, the least of them zero [m] */
  readonly shims: readonly number[]
  /** loads that were aimed at [N] */
  readonly wished: readonly number[]
  readonly settled: Settled
}

/** Sideways forces of inclined mounts at unlike heights shift the balance: Newton's steps towards it. */
const MOST_ROUNDS = 30
const SAME = 1e-12
const DEEPEST = 10
/** Step of the moment for its effect on itself, over the weight at the mounts' reach. */
const TRIAL = 1e-4

/** Moment about x and y through the centre of weight [N m]. */
type Moment = readonly [aboutX: number, aboutY: number]

/**
 * Packing on which the machine stands level and every mount carries the wished load, or the loads
 * nearest to the wished ones (in proportion, least squares) with which the weight is in balance.
 */
export function levelled(
  mounts: readonly FittedMount[],
  by: Aim,
  weights: Weights,
  summary: MassSummary,
): Levelled | Problem {
  const wished = wishedLoads(mounts, by, weights.total)
  if ('kind' in wished) return wished
  const centre = weightCentre(weights)
  const size = weights.total * spread(mounts, centre)
  const under = (moment: Moment) => {
    const loads = balanced(mounts, wished, weights.total, centre, moment)
    if (loads === null) return null
    const level = settleLevel(mounts, loads, weights.total, summary)
    const sideways = sidewaysMoment(mounts, mountForces(mounts, level.settled.forces), centre)
    return { level, rest: [sideways[0] - moment[0], sideways[1] - moment[1]] as Moment }
  }
  let moment: Moment = [0, 0]
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const here = under(moment)
    if (here === null) return IN_ONE_LINE
    const { level, rest } = here
    if (!level.settled.converged || Math.hypot(...rest) <= SAME * size) return { ...level, wished }
    const step = TRIAL * size
    const aboutX = under([moment[0] + step, moment[1]])?.rest ?? rest
    const aboutY = under([moment[0], moment[1] + step])?.rest ?? rest
    const a = (aboutX[0] - rest[0]) / step
    const b = (aboutY[0] - rest[0]) / step
    const c = (aboutX[1] - rest[1]) / step
    const d = (aboutY[1] - rest[1]) / step
    const determinant = a * d - b * c
    if (Math.abs(determinant) < 1e-9) return NO_BALANCE
    moment = [
      moment[0] - (d * rest[0] - b * rest[1]) / determinant,
      moment[1] - (a * rest[1] - c * rest[0]) / determinant,
    ]
  }
  return NO_BALANCE
}

const IN_ONE_LINE: Problem = {
  field: 'mounting.setting',
  message: 'Mounts in one line cannot be set level by packing: spread them, or keep them as built.',
  kind: 'invalid',
}
const NO_BALANCE: Problem = {
  field: 'mounting.setting',
  message:
    'No packing was found that sets the machine level: its inclined mounts push it sideways as they are packed.',
  kind: 'invalid',
}

function wishedLoads(mounts: readonly FittedMount[], by: Aim, weight: number): readonly number[] | Problem {
  const each = weight / mounts.length
  switch (by) {
    case 'equalLoads':
      return mounts.map(() => each)
    case 'ratedLoads': {
      const rated = mounts.map(({ type }) => type.ratedLoad)
      const sum = rated.reduce<number>((total, load) => total + (load ?? 0), 0)
      const known = rated.flatMap((load) => (load === null ? [] : [load]))
      if (known.length < rated.length) {
        return {
          field: 'mounting.setting.by',
          message: 'To level by rated loads, give every mount type its rated load.',
          kind: 'missing',
        }
      }
      return known.map((load) => (weight * load) / sum)
    }
    case 'equalDeflections': {
      const press = (depth: number) => mounts.map((mount) => verticalForce(mount, depth))
      const total = (depth: number) => press(depth).reduce((sum, force) => sum + force, 0)
      const depth = bracketedRoot((candidate) => total(candidate) - weight, -DEEPEST, DEEPEST)
      return depth === null ? NO_BALANCE : press(depth)
    }
    case 'givenShares': {
      const given = mounts.reduce((sum, { placed }) => sum + (placed.share ?? 0), 0)
      const open = mounts.filter(({ placed }) => placed.share === null).length
      if (open > 0 && given >= 1) {
        return {
          field: 'mounting.setting.by',
          message: 'The given shares leave nothing for the mounts without one.',
          kind: 'invalid',
        }
      }
      const rest = (1 - given) / open
      const sum = open > 0 ? 1 : given
      return mounts.map(({ placed }) => (weight * (placed.share ?? rest)) / sum)
    }
  }
}

/** Upward force of a mount whose top goes straight down by `depth` [N]. */
function verticalForce(mount: FittedMount, depth: number): number {
  return resistances(mount).reduce((sum, { axis, law }) => sum - axis[2] * law(-axis[2] * depth).force, 0)
}

function weightCentre({ own, hung, total }: Weights): Vec3 {
  const sum: Vec3 = [0, 0, 0]
  for (const { at, force } of [own, ...hung]) {
    for (const axis of [0, 1, 2] as const) sum[axis] -= (force[2] * at.position[axis]) / total
  }
  return sum
}

/**
 * Loads nearest to the wished ones that bear the weight and its moments: w = s (1 + a + b x + c y),
 * which is least squares in proportion to the wished loads s.
 * @param moment of the mounts' sideways forces about x and y through the centre of weight [N m]
 */
function balanced(
  mounts: readonly FittedMount[],
  wished: readonly number[],
  weight: number,
  centre: Vec3,
  moment: Moment,
): readonly number[] | null {
  const size = spread(mounts, centre)
  const places = mounts.map(({ placed }) => {
    const [x, y] = subtract(placed.position, centre)
    return [1, x / size, y / size] as const
  })
  // an upward load at (x, y) turns the machine by y about x and by -x about y
  const right = [weight, moment[1] / size, -moment[0] / size]
  const matrix = new Float64Array(9)
  const left = Float64Array.from(right)
  places.forEach((place, index) => {
    const load = wished[index] ?? 0
    for (const i of [0, 1, 2] as const) {
      left[i] = (left[i] ?? 0) - load * place[i]
      for (const j of [0, 1, 2] as const) {
        matrix[3 * i + j] = (matrix[3 * i + j] ?? 0) + Math.abs(load) * place[i] * place[j]
      }
    }
  })
  const factors = solvePositiveDefinite(matrix, left)
  if (factors === null) return null
  return places.map((place, index) => {
    const load = wished[index] ?? 0
    const change = place.reduce((sum, part, i) => sum + part * (factors[i] ?? 0), 0)
    return load + Math.abs(load) * change
  })
}

function spread(mounts: readonly FittedMount[], centre: Vec3): number {
  return Math.max(1e-3, ...mounts.map(({ placed }) => norm(subtract(placed.position, centre))))
}

/** Moment of the mounts' horizontal forces about x and y through the centre of weight [N m]. */
function sidewaysMoment(mounts: readonly FittedMount[], forces: readonly Vec3[], centre: Vec3): Moment {
  return mounts.reduce<Moment>(
    ([aboutX, aboutY], { placed }, index) => {
      const height = placed.position[2] - centre[2]
      const force = forces[index] ?? [0, 0, 0]
      return [aboutX - height * force[1], aboutY + height * force[0]]
    },
    [0, 0],
  )
}

/**
 * The level machine under given vertical loads on its mounts. Unknown are its shift along x and y, its
 * yaw, and how far each mount's top stands below its free height.
 */
function settleLevel(
  mounts: readonly FittedMount[],
  loads: readonly number[],
  weight: number,
  summary: MassSummary,
): Omit<Levelled, 'wished'> {
  const n = mounts.length + 3
  const size = spread(mounts, [...summary.centreOfGravity])
  const springs = mounts.flatMap((mount, index): RestoringSpring[] => {
    const [x, y] = subtract(mount.placed.position, summary.centreOfGravity)
    return resistances(mount).map(({ axis, law, usual }) => {
      const values = [axis[0], axis[1], dot(axis, [-y, x, 0]), axis[2]]
      return {
        row: { indices: Int32Array.of(0, 1, 2, 3 + index), values: Float64Array.from(values) },
        offset: 0,
        law,
        usual,
      }
    })
  })
  const load = new Float64Array(n)
  loads.forEach((force, index) => (load[3 + index] = -force))
  const scale = new Float64Array(n).fill(weight / mounts.length)
  scale[2] = (weight / mounts.length) * size
  const settled = settle({ springs, load, scale })
  const tops = Array.from(settled.displacement.subarray(3))
  const level = Math.max(...tops)
  const at = (index: number) => settled.displacement[index] ?? 0
  return {
    settled,
    displacement: [at(0), at(1), level, 0, 0, at(2)],
    shims: tops.map((top) => level - top),
  }
}
