import { designAbsorber, type AbsorberContext } from './absorber/design.ts'
import { isBounded, responseAtSpeeds } from './excitation/at-speeds.ts'
import { describeSource } from './excitation/describe.ts'
import { groupByOrder, type SourceLoad } from './excitation/order-loads.ts'
import { knownLoads, ordersOf } from './excitation/project-loads.ts'
import type { Observed } from './excitation/observed.ts'
import { crestSpeeds, mergedSweeps } from './excitation/crests.ts'
import { sweepResponse } from './excitation/sweep.ts'
import { install, type Installation } from './mounts/installation.ts'
import { MACHINE } from './mounts/machine-network.ts'
import { designedComponents } from './mounts/mount-type.ts'
import { placedAbsorbers } from './mounts/placed-absorbers.ts'
import { chartRange, sweepSpeeds } from './mounts/speeds.ts'
import { pointReceptance } from './network/receptance.ts'
import { summariseMass } from './project/mass.ts'
import type { Project } from './project/project.ts'
import type { SpeedSpan } from './project/requirements.ts'
import { judgedOf } from './runup/judged.ts'
import { runUpOf } from './runup/run-up.ts'
import type {
  AbsorberResult,
  Evaluation,
  MassSummary,
  Problem,
  ResponseResult,
  RunUpResult,
  SpeedResponse,
  Sweep,
} from './results.ts'
import { judge } from './verdict/judge.ts'
import type { Computed } from './verdict/verdict.ts'
import { adviseLevers } from './verdict/levers.ts'
import { speedsWithin, troubledSpan } from './verdict/trial-span.ts'

export interface EvaluateOptions {
  /** about how many speeds the curves have; left out: 2 000 */
  readonly sweepPoints?: number
}

const SWEEP_POINTS = 2000

/** How much of a project is computed. */
interface Scope {
  readonly sweepPoints: number
  /** false: the judged values only, without comparison and further speeds */
  readonly whole: boolean
  /** speeds of the curves; null: no response at all */
  readonly span: SpeedSpan | null
}
/** Trials of levers need what is judged, and that stands at resonances and given speeds. */
const TRIAL = { sweepPoints: 400, whole: false }

/**
 * Everything that can be known about a project: the one door for interface, batch and tests.
 * Never throws for a project that the schema accepts; what cannot be computed is null, and
 * `problems` says why, at the field.
 */
export function evaluate(project: Project, options: EvaluateOptions = {}): Evaluation {
  const sweepPoints = options.sweepPoints ?? SWEEP_POINTS
  const computed = compute(project, { sweepPoints, whole: true, span: 'chart' })
  const judged = judge(project, computed)
  const trial: Scope = { ...TRIAL, span: troubledSpan(project, judged) }
  const verdicts = adviseLevers(project, judged, computed.modes, (changed) =>
    judge(changed, compute(changed, trial)),
  )
  return { ...computed, verdicts }
}

function compute(project: Project, scope: Scope): Computed {
  const { summary, problems: massProblems } = summariseMass(project.machine.massProperties)
  const problems: Problem[] = [...massProblems, ...dutyProblems(project)]
  const orders = ordersOf(project)
  const bare = summary === null ? null : install(project, summary, [], orders)
  problems.push(...(bare?.problems ?? []))
  const absorbers = designAbsorbers(project, summary, bare, problems)
  const placed = placedAbsorbers(project, absorbers)
  const full =
    summary === null || placed.length === 0 || bare === null || bare.modes === null
      ? null
      : install(project, summary, placed, orders)
  problems.push(...unsaid(full?.problems ?? [], problems))
  const loads = knownLoads(project, summary?.centreOfGravity ?? [0, 0, 0], problems)
  const response = respondTo(project, loads, bare, full, scope, problems)
  const runUp = runUpIn(project, loads, (full ?? bare)?.observed ?? null, scope, problems)
  return {
    problems,
    massSummary: summary,
    sourceSummaries: project.sources.map((source) => describeSource(source, project.machine, project.units)),
    statics: full?.statics ?? bare?.statics ?? null,
    components: designedComponents(project),
    modes: bare?.modes ?? null,
    modesWithAbsorbers: full?.modes ?? null,
    response,
    runUp,
    absorbers,
  }
}

/** What the absorbers' weight and springs bring that the machine alone does not have. */
function unsaid(found: readonly Problem[], known: readonly Problem[]): readonly Problem[] {
  return found.filter(
    ({ field, message }) => !known.some((problem) => problem.field === field && problem.message === message),
  )
}

function dutyProblems(project: Project): readonly Problem[] {
  const { runningSpeed, lowestSpeed, highestSpeed } = project.machine.duty
  const problems: Problem[] = []
  if (runningSpeed === null) {
    problems.push({
      field: 'machine.duty.runningSpeed',
      message: 'Give the speed at which the machine runs.',
      kind: 'missing',
    })
  }
  if (lowestSpeed !== null && highestSpeed !== null && lowestSpeed > highestSpeed) {
    problems.push({
      field: 'machine.duty.lowestSpeed',
      message: 'The lowest operating speed is above the highest.',
      kind: 'caution',
    })
  } else if (
    runningSpeed !== null &&
    (runningSpeed < (lowestSpeed ?? 0) || runningSpeed > (highestSpeed ?? Infinity))
  ) {
    problems.push({
      field: 'machine.duty.runningSpeed',
      message: 'The running speed lies outside the operating speeds.',
      kind: 'caution',
    })
  }
  return problems
}

/** Every absorber that can be designed, switched on or not; what keeps the others from it goes to `problems`. */
function designAbsorbers(
  project: Project,
  summary: MassSummary | null,
  bare: Installation | null,
  problems: Problem[],
): readonly AbsorberResult[] {
  const observed = bare?.observed ?? null
  const context: AbsorberContext = {
    modes: bare?.modes ?? null,
    centreOfGravity: summary === null ? null : [...summary.centreOfGravity],
    receptance:
      observed === null
        ? null
        : (position, direction, frequencies) =>
            pointReceptance(
              observed.system,
              observed.solver,
              { node: MACHINE, position },
              direction,
              frequencies,
            ),
    runningSpeed: project.machine.duty.runningSpeed,
    gravity: project.analysis.gravity,
    machineMass: summary?.mass ?? null,
  }
  return project.absorbers.flatMap((absorber, index) => {
    const design = designAbsorber(absorber, index, context)
    problems.push(...design.problems)
    return design.result === null ? [] : [design.result]
  })
}

function respondTo(
  project: Project,
  loads: readonly SourceLoad[] | null,
  bare: Installation | null,
  full: Installation | null,
  scope: Scope,
  problems: Problem[],
): ResponseResult | null {
  const observed = (full ?? bare)?.observed ?? null
  if (loads === null || observed === null || scope.span === null) return null
  const modes = [...(bare?.modes ?? []), ...(full?.modes ?? [])]
  const range = chartRange(project, modes)
  if (range === null) return null
  const orders = groupByOrder(loads)
  const speeds = speedsWithin(project, scope.span, sweepSpeeds(range, modes, scope.sweepPoints))
  const sweep = sweepWithCrests(observed, orders, speeds)
  const { runningSpeed } = project.machine.duty
  const without = full === null || !scope.whole ? null : (bare?.observed ?? null)
  const runningWithout =
    without === null || runningSpeed === null ? null : responseAtSpeeds(without, orders, [runningSpeed])[0]
  return {
    atSpeeds: reportedSpeeds(project, observed, orders, scope, problems),
    sweep,
    sweepWithoutAbsorbers: without === null ? null : sweepResponse(without, orders, sweep.speed),
    runningWithoutAbsorbers: runningWithout && isBounded(runningWithout) ? runningWithout : null,
  }
}

/** Rounds of moving onto the crests of the curves: after these a sharp crest is exact to 1e-4. */
const CREST_ROUNDS = 2

/** The curves, with the speeds at which they have their crests, so that a judged peak is the peak. */
function sweepWithCrests(
  observed: Observed,
  orders: ReturnType<typeof groupByOrder>,
  speeds: Float64Array,
): Sweep {
  let sweep = sweepResponse(observed, orders, speeds)
  for (let round = 0; round < CREST_ROUNDS; round++) {
    const crests = crestSpeeds(sweep)
    if (crests.length === 0) break
    sweep = mergedSweeps(sweep, sweepResponse(observed, orders, crests))
  }
  return sweep
}

/** Run-up and coast-down where they are switched on; in a trial only as far as requirements judge them. */
function runUpIn(
  project: Project,
  loads: readonly SourceLoad[] | null,
  observed: Observed | null,
  scope: Scope,
  problems: Problem[],
): RunUpResult | null {
  if (!project.runUp.enabled || loads === null || observed === null) return null
  const wanted = scope.whole ? {} : judgedOf(project)
  if (wanted === null) return null
  const { result, problems: found } = runUpOf(project, observed, loads, wanted)
  problems.push(...found)
  return result
}

/**
 * Full response at the running speed and the further speeds. Where a mode without damping is met
 * exactly there is none: that speed is left out and said; without the running speed, all are.
 */
function reportedSpeeds(
  project: Project,
  observed: Observed,
  orders: ReturnType<typeof groupByOrder>,
  scope: Scope,
  problems: Problem[],
): readonly SpeedResponse[] {
  const { runningSpeed } = project.machine.duty
  const furtherSpeeds = scope.whole ? project.machine.duty.furtherSpeeds : []
  const running = runningSpeed === null ? [] : [runningSpeed]
  const all = responseAtSpeeds(observed, orders, [...running, ...furtherSpeeds])
  const bounded = all.map(isBounded)
  bounded.forEach((fine, index) => {
    if (fine) return
    const further = index - running.length
    problems.push({
      field: further < 0 ? 'machine.duty.runningSpeed' : `machine.duty.furtherSpeeds[${further}]`,
      message:
        'At this speed the excitation meets a natural frequency without damping exactly: the response has no bound. Give the mounts damping.',
      kind: 'caution',
    })
  })
  if (running.length > 0 && bounded[0] === false) return []
  return all.filter((_, index) => bounded[index])
}
