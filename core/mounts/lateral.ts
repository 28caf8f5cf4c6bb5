import type { System } from '../network/assemble.ts'
import { settle } from '../network/settle.ts'
import { withGeometricStiffness, type StaticLoad } from '../network/statics.ts'
import { scale, subtract, unit } from '../numerics/vector3.ts'
import type { Vec3, Vec6 } from '../project/fields.ts'
import type { Project } from '../project/project.ts'
import type { MassSummary, Problem } from '../results.ts'
import type { LateralCase, LateralStatics } from '../statics-results.ts'
import { forceScale, loadVector, mountForces, mountSprings } from './curved-statics.ts'
import { mountName, type FittedMount } from './machine-network.ts'
import { movedBy, sixOf, type MachineStatics, type Weights } from './statics.ts'

export const RESTRAINT_CAUTION =
  'This is an equivalent static load on springs without friction or stops. Restraint against earthquake, transport and impact is a matter for the local code and a licensed engineer.'

/** Everything that the machine at rest is known by. */
export interface AtRest {
  /** the machine alone on the static stiffness of its mounts where they stand */
  readonly system: System
  readonly mounts: readonly FittedMount[]
  readonly summary: MassSummary
  readonly weights: Weights
  readonly state: MachineStatics
}

/**
 * The machine under a static load of a factor times its weight, through its centre of gravity (and
 * that of each absorber at its attachment), along a direction and against it. Mounts that are lifted
 * pull as their law says; how far the machine then leans counts with the overturning of its weight
 * where the analysis counts with that.
 * @returns null where the project asks for no lateral load
 */
export function lateralStatics(
  project: Project,
  rest: AtRest,
): { readonly lateral: LateralStatics; readonly problems: readonly Problem[] } | null {
  const wanted = project.analysis.lateralLoad
  if (wanted === null) return null
  const direction = unit(wanted.direction)
  const overturning = project.analysis.gravityStiffness ? overturningOf(rest) : null
  const along = lateralCase(rest, wanted.factor, direction, overturning)
  const against = lateralCase(rest, wanted.factor, scale(direction, -1), overturning)
  const lateral = {
    factor: wanted.factor,
    load: wanted.factor * rest.weights.total,
    cases: [along, against],
    caution: RESTRAINT_CAUTION,
  } as const
  return { lateral, problems: [...remarks(rest, lateral.cases), CAUTION] }
}

const FIELD = 'analysis.lateralLoad'
const CAUTION: Problem = { field: FIELD, message: RESTRAINT_CAUTION, kind: 'caution' }

/** Stiffness that the forces at rest bring about the rest position, row-major. */
function overturningOf({ system, state }: AtRest): Float64Array {
  const { stiffness } = withGeometricStiffness(system, state.loads)
  return stiffness.map((value, index) => value - (system.stiffness[index] ?? 0))
}

function lateralCase(
  { system, mounts, summary, weights, state }: AtRest,
  factor: number,
  direction: Vec3,
  overturning: Float64Array | null,
): LateralCase | null {
  const shims = state.statics.mounts.map(({ shim }) => shim)
  const start = Float64Array.from(state.statics.bodyDisplacement)
  const loads = [weights.own, ...weights.hung].flatMap((load): StaticLoad[] => [
    load,
    { at: load.at, force: scale(direction, -factor * load.force[2]) },
  ])
  const settled = settle({
    springs: mountSprings(system, mounts, shims),
    load: loadVector(system, loads),
    scale: forceScale(weights.total, mounts, summary),
    start,
    ...(overturning === null ? {} : { further: { matrix: overturning, about: start } }),
  })
  if (!settled.converged) return null
  const displacement = sixOf(settled.displacement)
  const forces = mountForces(mounts, settled.forces)
  const results = mounts.map((mount, index) => {
    const force = forces[index] ?? [0, 0, 0]
    const now = movedBy(displacement, mount.placed.position, summary.centreOfGravity)
    const way = subtract(now, state.statics.mounts[index]?.displacement ?? [0, 0, 0])
    const sway = Math.hypot(way[0], way[1])
    const { snubberGap, ratedLoad } = mount.type
    return {
      id: mount.placed.id,
      load: force[2],
      force,
      uplift: Math.max(0, -force[2]),
      sway,
      gapShare: snubberGap === null ? null : sway / snubberGap,
      ratedShare: ratedLoad === null ? null : force[2] / ratedLoad,
    }
  })
  const gapShares = results.flatMap(({ gapShare }) => (gapShare === null ? [] : [gapShare]))
  return {
    direction,
    bodyDisplacement: difference(displacement, state.statics.bodyDisplacement),
    mounts: results,
    largestLoad: Math.max(...results.map(({ load }) => load)),
    largestUplift: Math.max(...results.map(({ uplift }) => uplift)),
    largestSway: Math.max(...results.map(({ sway }) => sway)),
    largestGapShare: gapShares.length === 0 ? null : Math.max(...gapShares),
  }
}

function difference(a: Vec6, b: Vec6): Vec6 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2], a[3] - b[3], a[4] - b[4], a[5] - b[5]]
}

function remarks({ mounts }: AtRest, cases: readonly (LateralCase | null)[]): readonly Problem[] {
  const caution = (message: string): Problem => ({ field: FIELD, message, kind: 'caution' })
  const problems: Problem[] = []
  if (cases.includes(null)) {
    problems.push({
      field: FIELD,
      message: 'Under the lateral load the machine would tip over: no rest position was found.',
      kind: 'invalid',
    })
  }
  const struck = worst(cases, mounts, ({ gapShare }) => (gapShare ?? 0) - 1)
  if (struck !== null) {
    problems.push(
      caution(
        `The lateral load closes the gap to the snubber of ${struck}: the snubber then carries, which these figures leave out.`,
      ),
    )
  }
  const lifted = worst(cases, mounts, ({ uplift }) => uplift)
  if (lifted !== null) {
    problems.push(
      caution(`The lateral load lifts ${lifted}: mount or restraint must hold the machine down there.`),
    )
  }
  const crushed = worst(cases, mounts, ({ ratedShare }) => (ratedShare ?? 0) - 1)
  if (crushed !== null) {
    problems.push(caution(`The lateral load presses ${crushed} beyond its rated load.`))
  }
  return problems
}

/** Name of the mount for which `measure` is largest in either case, if it is above zero anywhere. */
function worst(
  cases: readonly (LateralCase | null)[],
  mounts: readonly FittedMount[],
  measure: (mount: LateralCase['mounts'][number]) => number,
): string | null {
  let found: { readonly name: string; readonly size: number } | null = null
  for (const each of cases) {
    each?.mounts.forEach((result, index) => {
      const size = measure(result)
      const mount = mounts[index]
      if (mount && size > (found?.size ?? 0)) found = { name: mountName(mount.placed), size }
    })
  }
  return (found as { readonly name: string } | null)?.name ?? null // assigned inside a callback
}
