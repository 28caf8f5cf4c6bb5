import type { System } from '../network/assemble.ts'
import { undampedModes } from '../network/modes.ts'
import { add, cross, dot, norm, scale, subtract, unit } from '../numerics/vector3.ts'
import { symmetricEigen, symmetricEigenWork } from '../numerics/symmetric-eigen.ts'
import type { Vec3 } from '../project/fields.ts'
import type { MassSummary, Problem } from '../results.ts'
import type { UnitSystem } from '../units/dimensions.ts'
import { formatNumber, formatPlain, unitLabel } from '../units/format.ts'
import { mountName, type FittedMount } from './machine-network.ts'

/** A mode slower than this share of the fastest (in omega²) meets no stiffness but rounding. */
const FREE = 1e-12
/** Two mounts closer than this stand at one point [m]. */
const SAME_POINT = 1e-6

interface Motion {
  readonly shift: Vec3
  readonly turn: Vec3
}

/**
 * Names in words every way in which the mounts leave the machine free to move.
 * @param system the machine alone on its mounts' static stiffness
 * @returns null when it is held in all six freedoms
 */
export function freeMotion(
  system: System,
  mounts: readonly FittedMount[],
  summary: MassSummary,
  units: UnitSystem,
): Problem | null {
  const modes = undampedModes(system)
  if (modes === null) return null
  const fastest = modes.omegaSquared[5] ?? 0
  const free: Motion[] = []
  for (let r = 0; r < 6; r++) {
    if ((modes.omegaSquared[r] ?? 0) > FREE * fastest) continue
    const at = (i: number) => modes.shapes[r * 6 + i] ?? 0
    free.push({ shift: [at(0), at(1), at(2)], turn: [at(3), at(4), at(5)] })
  }
  if (free.length === 0) return null
  const words = free.length === 6 ? ['move in every way'] : nameMotions(free, mounts, summary, units)
  return {
    field: 'mounting.placed',
    message: `The mounts leave the machine free to ${listWords(words)}: add mounts, spread them, or use mounts that are stiff in that direction.`,
    kind: 'invalid',
  }
}

function nameMotions(
  free: readonly Motion[],
  mounts: readonly FittedMount[],
  summary: MassSummary,
  units: UnitSystem,
): string[] {
  const size = reach(mounts, summary)
  const { slides, turns } = separate(free, size)
  return [
    ...alignToAxes(slides, (motion) => motion.shift).map(
      (motion) => `slide along ${axisWords(motion.shift)}`,
    ),
    ...alignToAxes(turns, (motion) => motion.turn).map((motion) =>
      turnWords(motion, slides.length > 0, mounts, summary, size, units),
    ),
  ]
}

/** Distance by which rotations are compared with shifts: how far the mounts reach from the centre. */
function reach(mounts: readonly FittedMount[], summary: MassSummary): number {
  const distances = mounts.map(({ placed }) => norm(subtract(placed.position, summary.centreOfGravity)))
  return Math.max(1e-3, ...distances)
}

/** Splits the free motions into pure slides and the rest, which turn. */
function separate(
  free: readonly Motion[],
  size: number,
): { readonly slides: readonly Motion[]; readonly turns: readonly Motion[] } {
  const n = free.length
  const normed = free.map((motion) => {
    const length = Math.hypot(norm(motion.shift), size * norm(motion.turn))
    return { shift: scale(motion.shift, 1 / length), turn: scale(motion.turn, 1 / length) }
  })
  const gram = Float64Array.from({ length: n * n }, (_, at) => {
    const [a, b] = [normed[Math.floor(at / n)], normed[at % n]]
    return a && b ? size * size * dot(a.turn, b.turn) : 0
  })
  const work = symmetricEigenWork(n)
  symmetricEigen(gram, work)
  const slides: Motion[] = []
  const turns: Motion[] = []
  for (let r = 0; r < n; r++) {
    const motion = combine(normed, (i) => work.vectors[i * n + r] ?? 0)
    if ((work.diagonal[r] ?? 0) < 1e-9) slides.push({ ...motion, turn: [0, 0, 0] })
    else turns.push(motion)
  }
  return { slides, turns }
}

function combine(motions: readonly Motion[], weight: (index: number) => number): Motion {
  return motions.reduce<Motion>(
    (sum, motion, index) => ({
      shift: add(sum.shift, scale(motion.shift, weight(index))),
      turn: add(sum.turn, scale(motion.turn, weight(index))),
    }),
    { shift: [0, 0, 0], turn: [0, 0, 0] },
  )
}

/**
 * Replaces motions by combinations of them along the machine axes where such exist: a plane in
 * which the machine can slide reads better as x and y than as two slanting directions.
 */
function alignToAxes(motions: readonly Motion[], part: (motion: Motion) => Vec3): readonly Motion[] {
  const aligned: Motion[] = []
  for (const axis of [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ] satisfies Vec3[]) {
    const motion = fit(motions, part, axis)
    if (motion) aligned.push(motion)
  }
  return aligned.length === motions.length ? aligned : motions
}

/** Combination whose `part` is the given axis, or null where there is none. */
function fit(motions: readonly Motion[], part: (motion: Motion) => Vec3, axis: Vec3): Motion | null {
  const n = motions.length
  if (n === 0) return null
  // the directions are independent, so Gram-Schmidt gives an orthogonal set with the same span
  const basis: Motion[] = []
  for (const motion of motions) {
    const rest = basis.reduce((left, done) => {
      const share = dot(part(left), part(done)) / dot(part(done), part(done))
      return combine([left, done], (index) => (index === 0 ? 1 : -share))
    }, motion)
    basis.push(rest)
  }
  const weights = basis.map((motion) => dot(axis, part(motion)) / dot(part(motion), part(motion)))
  const result = combine(basis, (index) => weights[index] ?? 0)
  return norm(subtract(part(result), axis)) < 1e-6 ? result : null
}

function turnWords(
  motion: Motion,
  slidesToo: boolean,
  mounts: readonly FittedMount[],
  summary: MassSummary,
  size: number,
  units: UnitSystem,
): string {
  const axis = unit(motion.turn)
  const verb = Math.abs(axis[2]) > 0.9 ? 'turn' : 'rock'
  const along = axisWords(motion.turn)
  if (slidesToo) return `${verb} about ${along}`
  const square = dot(motion.turn, motion.turn)
  const point = add(summary.centreOfGravity, scale(cross(motion.turn, motion.shift), 1 / square))
  const pitch = dot(motion.turn, motion.shift) / square
  const screw = Math.abs(pitch) > 1e-6 * size ? ' while it slides along that line' : ''
  const onLine = mounts.filter(
    ({ placed }) => norm(cross(subtract(placed.position, point), axis)) < 1e-6 * size,
  )
  const names = onLine.map(({ placed }) => mountName(placed))
  if (names.length >= 2) {
    return `${verb} about the line through mounts ${listWords(names.slice(0, 3))}${screw}`
  }
  if (names.length === 1) return `${verb} about ${along} at mount ${names[0] ?? ''}${screw}`
  const place = point.map((value) => formatNumber(value + 0, 'length', units, 3)).join(', ')
  return `${verb} about a line along ${along} through (${place}) ${unitLabel('length', units)}${screw}`
}

/** `x`, or the components of a slanting direction. */
function axisWords(direction: Readonly<Vec3>): string {
  const axis = unit(direction)
  for (const [index, name] of (['x', 'y', 'z'] as const).entries()) {
    if (Math.abs(Math.abs(axis[index] ?? 0) - 1) < 1e-9) return name
  }
  return `(${axis.map((value) => formatPlain(Math.abs(value) < 1e-9 ? 0 : value, 2)).join(', ')})`
}

/** `a`, `a and b`, `a, b and c`. */
function listWords(words: readonly string[]): string {
  if (words.length < 2) return words[0] ?? ''
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`
}

/** A caution for every mount that stands where another one stands already. */
export function coincidentMounts(mounts: readonly FittedMount[]): readonly Problem[] {
  return mounts.flatMap(({ placed }, index) => {
    const twin = mounts
      .slice(0, index)
      .find((other) => norm(subtract(other.placed.position, placed.position)) < SAME_POINT)
    if (!twin) return []
    return [
      {
        field: `mounting.placed[${index}].position`,
        message: `${mountName(placed)} stands at the same point as ${mountName(twin.placed)}: both are counted; check the positions.`,
        kind: 'caution' as const,
      },
    ]
  })
}
