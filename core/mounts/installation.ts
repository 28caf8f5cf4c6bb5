import type { Observed } from '../excitation/observed.ts'
import { assemble, type System } from '../network/assemble.ts'
import { placeRow } from '../network/kinematics.ts'
import { undampedModes } from '../network/modes.ts'
import { responseSolver } from '../network/response.ts'
import { withGeometricStiffness } from '../network/statics.ts'
import { cholesky } from '../numerics/cholesky.ts'
import { unit } from '../numerics/vector3.ts'
import type { Project } from '../project/project.ts'
import type { MassSummary, Mode, Problem } from '../results.ts'
import type { Statics } from '../statics-results.ts'
import { describeModes } from './describe-modes.ts'
import {
  fitMounts,
  MACHINE,
  machineNetwork,
  mountName,
  type FittedMount,
  type PlacedAbsorber,
} from './machine-network.ts'
import { restOf } from './rest.ts'
import type { MachineStatics } from './statics.ts'
import { coincidentMounts, freeMotion } from './support.ts'

/** The machine on its mounts, perhaps with absorbers, as far as it can be computed. */
export interface Installation {
  readonly statics: Statics | null
  readonly modes: readonly Mode[] | null
  /** ready for response; null when the machine does not stand */
  readonly observed: Observed | null
  readonly problems: readonly Problem[]
}

const NOTHING = { statics: null, modes: null, observed: null }

/**
 * Puts the machine on its mounts: statics, overturning stiffness, modes.
 * @param absorbers those in place; their springs, masses and weights take part
 * @param orders orders whose meeting with each mode is wanted
 */
export function install(
  project: Project,
  summary: MassSummary,
  absorbers: readonly PlacedAbsorber[],
  orders: readonly number[],
): Installation {
  const fitted = fitMounts(project)
  if (fitted.mounts.length === 0) {
    return {
      ...NOTHING,
      problems: [
        { field: 'mounting.placed', message: 'Place the mounts under the machine.', kind: 'missing' },
      ],
    }
  }
  const cautions = [...fitted.problems, ...coincidentMounts(fitted.mounts)]
  if (!fitted.usable) return { ...NOTHING, problems: cautions }
  const unloaded = assemble(machineNetwork(fitted.mounts, summary, 'static'))
  const free = freeMotion(unloaded, fitted.mounts, summary, project.units)
  const rest = free === null ? restOf(project, unloaded, fitted.mounts, summary, absorbers) : free
  if (rest === null || 'kind' in rest) {
    return { ...NOTHING, problems: [...(rest === null ? [] : [rest]), ...cautions] }
  }
  const { state, mounts, standing } = rest
  const problems = [...cautions, ...rest.problems, ...liftedMounts(mounts, state.statics)]
  const dynamic = assemble(machineNetwork(mounts, summary, 'dynamic', absorbers))
  const withWeight = project.analysis.gravityStiffness
  const system = withWeight ? withGeometricStiffness(dynamic, state.loads) : dynamic
  const undamped = undampedModes(system)
  const stable = !withWeight || standsUpright(standing, state)
  const modes =
    undamped !== null && stable
      ? describeModes(
          system,
          undamped,
          absorbers.map(({ id }) => id),
          orders,
        )
      : null
  if (undamped === null || modes === null) {
    return { ...NOTHING, statics: state.statics, problems: [...problems, TIPPING] }
  }
  return {
    statics: state.statics,
    modes,
    observed: {
      system,
      solver: responseSolver(system, undamped),
      machineFreedom: 0,
      supports: system.elements.slice(0, mounts.length),
      points: project.machine.points.map(({ position }) => pointRows(system, position)),
      absorbers: absorbers.map((absorber, index) => ({
        id: absorber.id,
        mass: { indices: Int32Array.of(6 + index), values: Float64Array.of(1) },
        stroke: strokeRow(system, mounts.length + index),
      })),
    },
    problems,
  }
}

const TIPPING: Problem = {
  field: 'mounting.placed',
  message:
    'The machine would tip over: its weight stands too high above such soft mounts. Spread the mounts, raise them towards the centre of gravity, or use stiffer ones.',
  kind: 'invalid',
}

/** Whether static stiffness and overturning together still hold the machine. */
function standsUpright(standing: System, { loads }: MachineStatics): boolean {
  const n = standing.freedoms.count
  return cholesky(withGeometricStiffness(standing, loads).stiffness, n, new Float64Array(n * n))
}

function liftedMounts(mounts: readonly FittedMount[], statics: Statics): readonly Problem[] {
  return mounts.flatMap(({ placed }, index) =>
    (statics.mounts[index]?.load ?? 0) < -1e-9 * statics.weight
      ? [
          {
            field: `mounting.placed[${index}].position`,
            message: `${mountName(placed)} is pulled upwards by the weight: it must hold in tension, or stand elsewhere.`,
            kind: 'caution' as const,
          },
        ]
      : [],
  )
}

function pointRows(system: System, position: readonly [number, number, number]) {
  const row = (axis: 0 | 1 | 2) =>
    placeRow(
      system.freedoms,
      { node: MACHINE, position },
      unit([axis === 0 ? 1 : 0, axis === 1 ? 1 : 0, axis === 2 ? 1 : 0]),
    )
  return [row(0), row(1), row(2)] as const
}

function strokeRow(system: System, element: number) {
  const row = system.elements[element]?.branches[0]?.row
  if (!row) throw new Error('an absorber without its spring')
  return row
}
