import { groupByOrder, type SourceLoad } from '../excitation/order-loads.ts'
import type { Observed } from '../excitation/observed.ts'
import { knownLoads, ordersOf } from '../excitation/project-loads.ts'
import { install, type Installation } from '../mounts/installation.ts'
import { placedAbsorbers } from '../mounts/placed-absorbers.ts'
import { polesOf, type Poles } from '../network/poles.ts'
import { summariseMass } from '../project/mass.ts'
import type { Project } from '../project/project.ts'
import type { AbsorberResult, MassSummary, Problem } from '../results.ts'
import { stateLoad, type StateLoad } from './state-load.ts'
import type { Modal } from './watch.ts'

/** A project's network with all that stands on it and all that excites it. */
export interface Prepared {
  readonly summary: MassSummary
  readonly installation: Installation
  readonly observed: Observed
  readonly loads: readonly SourceLoad[]
}

/**
 * @param absorbers as designed; those that are switched on and stand on the machine take part
 * @returns the first problems instead where the project cannot be computed yet
 */
export function prepare(
  project: Project,
  absorbers: readonly AbsorberResult[],
): { readonly prepared: Prepared } | { readonly problems: readonly Problem[] } {
  const { summary, problems } = summariseMass(project.machine.massProperties)
  if (summary === null) return { problems }
  const installation = install(project, summary, placedAbsorbers(project, absorbers), ordersOf(project))
  const found: Problem[] = []
  const loads = knownLoads(project, summary.centreOfGravity, found)
  const { observed } = installation
  if (observed === null) return { problems: installation.problems }
  if (loads === null) return { problems: found }
  return { prepared: { summary, installation, observed, loads } }
}

/** The same in the first-order form; null when a mode is not stable. */
export function firstOrder(
  observed: Observed,
  loads: readonly SourceLoad[],
): { readonly poles: Poles; readonly modal: Modal; readonly orders: readonly StateLoad[] } | null {
  const { solver, system } = observed
  const poles = polesOf(system, {
    count: solver.freedoms,
    omegaSquared: solver.omegaSquared,
    shapes: solver.shapes,
  })
  if (poles === null) return null
  return {
    poles,
    modal: { poles, omegaSquared: solver.omegaSquared, shapes: solver.shapes },
    orders: groupByOrder(loads).map(({ order, loads: own }) => stateLoad(observed, poles, order, own)),
  }
}
