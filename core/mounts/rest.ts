import { assemble, type System } from '../network/assemble.ts'
import type { Settled } from '../network/settle.ts'
import type { Project } from '../project/project.ts'
import type { MassSummary, Problem } from '../results.ts'
import { mountForces, restOnPacking } from './curved-statics.ts'
import { lateralStatics } from './lateral.ts'
import { levelled } from './levelling.ts'
import {
  atWorkingPoint,
  machineNetwork,
  mountName,
  type FittedMount,
  type PlacedAbsorber,
} from './machine-network.ts'
import {
  compressionOf,
  describeStatics,
  machineStatics,
  movedBy,
  weightsOf,
  withLateral,
  type MachineStatics,
  type RestPosition,
} from './statics.ts'

/** The machine at rest, with every mount at the stiffness that it has there. */
export interface Rest {
  readonly state: MachineStatics
  readonly mounts: readonly FittedMount[]
  /** the machine alone on the static stiffness of those */
  readonly standing: System
  readonly problems: readonly Problem[]
}

/**
 * How the machine comes to rest: at once on linear mounts as built, by iteration where a mount is
 * curved, stands on packing or is to be levelled.
 * @param standing the machine alone on the mounts as they are without load
 * @returns the problem that keeps it from standing; null where the mounts leave it free to move
 */
export function restOf(
  project: Project,
  standing: System,
  mounts: readonly FittedMount[],
  summary: MassSummary,
  absorbers: readonly PlacedAbsorber[],
): Rest | Problem | null {
  const { gravity } = project.analysis
  const { setting } = project.mounting
  const plain =
    setting.kind === 'asBuilt' && mounts.every(({ law, placed }) => law.linear && placed.shim === 0)
  if (plain) {
    const state = machineStatics(standing, mounts, summary, gravity, absorbers)
    return state === null
      ? null
      : finish(project, { state, mounts, standing, problems: [] }, summary, absorbers)
  }
  const weights = weightsOf(summary, gravity, absorbers)
  const found = position(project, standing, mounts, summary, absorbers)
  if ('kind' in found) return found
  const { displacement, shims, settled } = found
  if (!settled.converged) return notSettled(settled)
  const working = mounts.map((mount, index) => {
    const moved = movedBy(displacement, mount.placed.position, summary.centreOfGravity)
    return atWorkingPoint(mount, compressionOf(mount, moved, shims[index] ?? 0))
  })
  const system = assemble(machineNetwork(working, summary, 'static'))
  const rest: RestPosition = {
    displacement,
    forces: mountForces(mounts, settled.forces),
    shims,
    wished: found.wished,
    setting: setting.kind,
    iterations: settled.iterations,
  }
  const state = describeStatics(system, working, summary, gravity, weights, rest)
  return finish(
    project,
    { state, mounts: working, standing: system, problems: beyondCurves(working, state) },
    summary,
    absorbers,
  )
}

function position(
  project: Project,
  standing: System,
  mounts: readonly FittedMount[],
  summary: MassSummary,
  absorbers: readonly PlacedAbsorber[],
) {
  const weights = weightsOf(summary, project.analysis.gravity, absorbers)
  const { setting } = project.mounting
  if (setting.kind === 'levelled') return levelled(mounts, setting.by, weights, summary)
  const shims = mounts.map(({ placed }) => placed.shim)
  const loads = [weights.own, ...weights.hung]
  const { settled, displacement } = restOnPacking(standing, mounts, shims, loads, weights.total, summary)
  return { settled, displacement, shims, wished: null }
}

/** Adds what a lateral load does, where one is asked for. */
function finish(
  project: Project,
  rest: Rest,
  summary: MassSummary,
  absorbers: readonly PlacedAbsorber[],
): Rest {
  const weights = weightsOf(summary, project.analysis.gravity, absorbers)
  const result = lateralStatics(project, {
    system: rest.standing,
    mounts: rest.mounts,
    summary,
    weights,
    state: rest.state,
  })
  if (result === null) return rest
  return {
    ...rest,
    state: withLateral(rest.state, result.lateral),
    problems: [...rest.problems, ...result.problems],
  }
}

function notSettled({ reason, iterations, residual }: Settled): Problem {
  return {
    field: 'mounting.types',
    message:
      reason === 'slack'
        ? 'The machine finds no rest: somewhere on their curves the mounts give no more resistance.'
        : `The machine finds no rest on the curves of its mounts: after ${iterations} steps ${residual.toExponential(1)} of its weight is still unbalanced.`,
    kind: 'invalid',
  }
}

/** A caution for every mount that stands beyond the points of its curve. */
function beyondCurves(mounts: readonly FittedMount[], { statics }: MachineStatics): readonly Problem[] {
  return mounts.flatMap(({ placed, type }, index) => {
    if (!statics.mounts[index]?.beyondLaw) return []
    const what = type.design === null ? 'its curve' : 'the travel for which it is computed'
    return [
      {
        field: `mounting.placed[${index}].type`,
        message: `${mountName(placed)} stands beyond ${what}: it is continued as a straight line there.`,
        kind: 'caution' as const,
      },
    ]
  })
}
