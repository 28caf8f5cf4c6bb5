import type { Project } from '../../core/project/project.ts'
import type { RequirementKind } from '../../core/project/requirements.ts'
import type { Evaluation, Problem, Verdict } from '../../core/results.ts'
import type { Step } from './route.svelte.ts'

export interface StepState {
  readonly state: 'empty' | 'incomplete' | 'done'
  /** what is missing or wrong, in words; empty when done */
  readonly missing: string
}

const DONE: StepState = { state: 'done', missing: '' }

/** State of each step of the path, as far as it can be told from the project and its results. */
export function stepStates(
  project: Project,
  evaluation: Evaluation | null,
): Readonly<Record<Step, StepState>> {
  const problems = (evaluation?.problems ?? []).filter((problem) => problem.kind !== 'caution')
  const machine = machineState(project, problems)
  const mounts = mountsState(project, problems)
  const response = responseState(evaluation, machine, mounts)
  const runUp = runUpState(project, evaluation, problems)
  return {
    machine,
    mounts,
    response,
    'run-up': runUp,
    absorber: absorberState(project, evaluation, problems),
    report: reportState(project, evaluation, [response, runUp]),
  }
}

function machineState(project: Project, problems: readonly Problem[]): StepState {
  const { massProperties, duty } = project.machine
  const bare =
    (massProperties.from === 'typed' ? massProperties.mass === null : massProperties.parts.length === 0) &&
    duty.runningSpeed === null &&
    project.sources.length === 0
  if (bare) return { state: 'empty', missing: 'not started' }
  return fromProblems(problems, ['machine', 'sources'])
}

function mountsState(project: Project, problems: readonly Problem[]): StepState {
  if (project.mounting.placed.length === 0) return { state: 'empty', missing: 'not started' }
  return fromProblems(problems, ['mounting', 'footing'])
}

function responseState(evaluation: Evaluation | null, machine: StepState, mounts: StepState): StepState {
  if (evaluation?.response) {
    return unknownState(evaluation, (verdict) => !isOfRunUp(verdict))
  }
  const open = [machine.state !== 'done' && 'the machine', mounts.state !== 'done' && 'the mounts']
  const names = open.filter((name) => name !== false)
  if (names.length > 0) return { state: 'empty', missing: `waits for ${names.join(' and ')}` }
  return incomplete('nothing excites the machine')
}

function runUpState(
  project: Project,
  evaluation: Evaluation | null,
  problems: readonly Problem[],
): StepState {
  const { enabled, up, down } = project.runUp
  const asked = project.requirements.some((requirement) => requirement.enabled && isOfRunUp(requirement))
  if (!enabled)
    return asked ? incomplete('asked for, not yet looked at') : { state: 'empty', missing: 'not looked at' }
  const found = fromProblems(problems, ['runUp'])
  if (found.state !== 'done') return found
  if (!up.enabled && !down.enabled) return incomplete('neither run-up nor coast-down is taken in')
  return evaluation?.runUp
    ? unknownState(evaluation, isOfRunUp)
    : incomplete('waits for the machine, its mounts and what excites it')
}

function isOfRunUp({ kind }: { readonly kind: RequirementKind }): boolean {
  return kind === 'runUpMotion' || kind === 'runUpForce'
}

function unknownState({ verdicts }: Evaluation, counted: (verdict: Verdict) => boolean): StepState {
  const unknown = verdicts.filter((verdict) => verdict.status === 'unknown' && counted(verdict)).length
  return unknown === 0 ? DONE : incomplete(count(unknown, 'requirement') + ' not yet known')
}

function absorberState(
  project: Project,
  evaluation: Evaluation | null,
  problems: readonly Problem[],
): StepState {
  if (project.absorbers.length === 0) return { state: 'empty', missing: 'none, if none is needed' }
  const found = fromProblems(problems, ['absorbers'])
  if (found.state !== 'done') return found
  const enabled = project.absorbers.filter((absorber) => absorber.enabled).length
  const computed = evaluation?.absorbers.length ?? 0
  return computed >= enabled ? DONE : incomplete('waits for its host')
}

function reportState(
  project: Project,
  evaluation: Evaluation | null,
  results: readonly StepState[],
): StepState {
  if (!evaluation?.response) return { state: 'empty', missing: 'waits for results' }
  if (project.job.name.trim() === '') return incomplete('the project has no name')
  if (project.requirements.length === 0) return incomplete('no requirement to judge by')
  // a run-up that nobody asked for is no gap
  return results.find(({ state }) => state === 'incomplete') ?? DONE
}

function fromProblems(problems: readonly Problem[], roots: readonly string[]): StepState {
  const mine = problems.filter((problem) => roots.some((root) => problem.field.startsWith(root)))
  const first = mine[0]
  if (!first) return DONE
  return incomplete(
    mine.length === 1 ? first.message : `${first.message.replace(/\.$/, '')} (and ${mine.length - 1} more)`,
  )
}

function incomplete(missing: string): StepState {
  return { state: 'incomplete', missing }
}

function count(number: number, noun: string): string {
  return `${number} ${noun}${number === 1 ? '' : 's'}`
}
