import { InputError } from '../errors.ts'
import { springDesignSchema, type SpringDesign } from '../project/component-designs.ts'
import { analyseSpring, type SpringFigures } from './spring-analysis.ts'
import { wahlFactor } from './helical-spring.ts'

/** What a spring shall do, and of what it shall be made. */
export interface SpringAim {
  /** [N/m] */
  readonly rate: number
  /** static load [N] */
  readonly load: number
  /** load at which the coils would touch, over the static load; common practice, no source */
  readonly reserve?: number
  /** class of wire with its strength; the rest of a spring's inputs as wished */
  readonly like: SpringDesign
  /** wires that can be had [m], rising; left out: any diameter */
  readonly wireDiameters?: readonly number[]
}

export interface SpringCandidate {
  readonly design: SpringDesign
  readonly figures: SpringFigures
}

export interface SpringSearch {
  /** springs that meet the aim without any remark, lightest first */
  readonly candidates: readonly SpringCandidate[]
  /** why there is none; empty when there is one */
  readonly reason: string
}

/** Proportions that are tried, D/d. */
const INDICES = Array.from({ length: 25 }, (_, step) => 4 + step / 2)
const RESERVE = 1.5

/**
 * Springs of a wanted rate for a load. For each proportion D/d the thinnest wire is taken that keeps
 * the Wahl stress at the reserve load within what is permissible; rate and load then fix the number
 * of coils and the free length. A spring that buckles, has too few coils or breaks another rule of
 * `analyseSpring` is left out.
 * @throws InputError when the aim is not positive or the strength of the wire is not given
 */
export function searchSpring(aim: SpringAim): SpringSearch {
  const { rate, load, like, reserve = RESERVE } = aim
  if (!(rate > 0)) throw new InputError('rate', rate, 'must be greater than 0')
  if (!(load > 0)) throw new InputError('load', load, 'must be greater than 0')
  if (!(reserve > 1)) throw new InputError('reserve', reserve, 'must be greater than 1')
  if (like.material.strength === null) {
    throw new InputError('material.strength', null, 'give the tensile strength of the wire')
  }
  const permissible = like.material.permissibleShare * like.material.strength
  const found: SpringCandidate[] = []
  const refusals = new Map<string, number>()
  for (const index of INDICES) {
    const design = springOf(aim, index, permissible, reserve)
    const { figures, problems } = design === null ? NO_WIRE : analyseSpring(design)
    if (design !== null && figures !== null && problems.length === 0) found.push({ design, figures })
    for (const { message } of problems) refusals.set(message, (refusals.get(message) ?? 0) + 1)
  }
  const commonest = [...refusals].toSorted(([, a], [, b]) => b - a)[0]?.[0] ?? ''
  return {
    candidates: found.toSorted((a, b) => a.figures.mass - b.figures.mass),
    reason: found.length > 0 ? '' : `No proportion of coil to wire serves. Mostly: ${commonest}`,
  }
}

const NO_WIRE = {
  figures: null,
  problems: [{ field: 'wireDiameter', message: 'No wire that can be had is thick enough.', kind: 'invalid' }],
} as const

function springOf(
  { rate, load, like, wireDiameters }: SpringAim,
  index: number,
  permissible: number,
  reserve: number,
): SpringDesign | null {
  // a rounding share above the limit would be a remark on every spring that sits exactly on it
  const least =
    Math.sqrt((8 * reserve * load * index * wahlFactor(index)) / (Math.PI * permissible)) * (1 + 1e-9)
  const wire = wireDiameters === undefined ? least : wireDiameters.find((diameter) => diameter >= least)
  if (wire === undefined) return null
  const modulus = like.material.shearModulus * like.correction
  const coils = (modulus * wire) / (8 * index ** 3 * rate)
  const turns = coils + like.endCoils
  const solid = wire * (like.ends === 'closedGround' ? turns : turns + 1.5)
  return springDesignSchema.parse({
    ...like,
    wireDiameter: wire,
    coilDiameter: index * wire,
    activeCoils: coils,
    freeLength: solid + (reserve * load) / rate,
    load,
  })
}
