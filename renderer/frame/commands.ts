import type { Step } from '../state/route.svelte.ts'
import { STEP_NAMES, STEPS } from '../state/route.svelte.ts'

/** Something that can be found from anywhere: a page, a field, or a thing to do. */
export interface Command {
  readonly label: string
  readonly kind: 'page' | 'field' | 'action'
  /** words under which it is found besides its label */
  readonly also: string
  readonly step?: Step
  readonly field?: string
  readonly run?: () => void
}

const FIELDS: readonly (readonly [label: string, step: Step, field: string, also: string])[] = [
  ['Project name', 'machine', 'job.name', 'title rename'],
  ['Job number', 'machine', 'job.reference', 'order reference'],
  ['Site', 'machine', 'job.site', 'place building'],
  ['Prepared by', 'machine', 'job.preparedBy', 'author engineer'],
  ['Tags', 'machine', 'job.tags', 'words label'],
  ['Notes', 'machine', 'job.notes', 'remarks'],
  ['Machine in words', 'machine', 'machine.description', 'nameplate description'],
  ['Mass', 'machine', 'machine.massProperties.mass', 'weight kg lb'],
  ['Centre of gravity', 'machine', 'machine.massProperties.centreOfGravity', 'cg center'],
  ['Moments of inertia', 'machine', 'machine.massProperties.inertia', 'inertia products'],
  ['Parts', 'machine', 'machine.massProperties.parts', 'boxes cylinders'],
  ['Shaft', 'machine', 'machine.shaft', 'axis rotation sense'],
  ['Running speed', 'machine', 'machine.duty.runningSpeed', 'rpm'],
  ['Lowest operating speed', 'machine', 'machine.duty.lowestSpeed', 'range duty rpm'],
  ['Highest operating speed', 'machine', 'machine.duty.highestSpeed', 'range duty rpm'],
  ['Further speeds', 'machine', 'machine.duty.furtherSpeeds', 'more other rpm'],
  ['Points of interest', 'machine', 'machine.points', 'bearing vibration'],
  ['What shakes it', 'machine', 'sources', 'exciting forces sources unbalance moment order'],
  ['Mounts on the plan', 'mounts', 'mounting.placed', 'positions layout'],
  ['Mount types', 'mounts', 'mounting.types', 'stiffness damping rated load'],
  ['Packing and levelling', 'mounts', 'mounting.setting', 'shims level'],
  ['Working temperature', 'mounts', 'analysis.temperature', 'mounts heat'],
  ['Static load sideways', 'mounts', 'analysis.lateralLoad', 'uplift snubber transport earthquake'],
  ['Run-up', 'run-up', 'runUp.up', 'start acceleration ramp torque transient'],
  ['Coast-down', 'run-up', 'runUp.down', 'stop deceleration brake trip transient'],
  ['Requirements', 'response', 'requirements', 'limits verdict'],
  ['Absorbers', 'absorber', 'absorbers', 'tuned mass damper'],
]

/** @param actions things to do that depend on the state of the desk */
export function allCommands(actions: readonly Command[]): readonly Command[] {
  const pages = STEPS.map((step): Command => ({ label: STEP_NAMES[step], kind: 'page', also: 'step', step }))
  const fields = FIELDS.map(([label, step, field, also]): Command => ({
    label,
    kind: 'field',
    also,
    step,
    field,
  }))
  return [...pages, ...actions, ...fields]
}

/** Commands in which every word of the query begins some word; those whose label begins so go first. */
export function findCommands(commands: readonly Command[], query: string): readonly Command[] {
  const words = query.toLowerCase().split(/\s+/).filter(Boolean)
  if (words.length === 0) return commands
  return commands
    .filter((command) => {
      const text = ` ${command.label} ${command.also} ${command.step ? STEP_NAMES[command.step] : ''}`
      return words.every((word) => text.toLowerCase().includes(` ${word}`))
    })
    .toSorted((a, b) => rank(a, words) - rank(b, words))
}

function rank(command: Command, words: readonly string[]): number {
  return command.label.toLowerCase().startsWith(words[0] ?? '') ? 0 : 1
}
