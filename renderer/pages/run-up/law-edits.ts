import type { Project } from '../../../core/project/project.ts'
import { runUpSchema, type RunUp } from '../../../core/project/run-up.ts'

export type Direction = 'up' | 'down'
export type LawKind = RunUp['up']['law']['by']
export type LawField = 'from' | 'to' | 'time' | 'torque' | 'inertia' | 'loadTorque' | 'loadSpeed'

/** Changes one quantity of a law; one that the law does not have is refused when the project is read. */
export function setLawField(draft: Project, direction: Direction, key: LawField, value: number | null): void {
  Object.assign(draft.runUp[direction].law, { [key]: value })
}

/**
 * Puts another kind of law in place. Ends that both kinds know stay; a ramp becomes the two ends of
 * its line when it is turned into a table.
 */
export function switchLaw(draft: Project, direction: Direction, by: LawKind): void {
  const { law } = draft.runUp[direction]
  if (law.by === by) return
  const running = draft.machine.duty.runningSpeed
  const kept =
    law.by === 'table'
      ? {}
      : by === 'table'
        ? { entries: lineOf(law, running) }
        : { from: law.from, to: law.to }
  const made = runUpSchema.parse({ [direction]: { law: { by, ...kept } } })
  if (direction === 'up') draft.runUp.up.law = made.up.law
  else draft.runUp.down.law = made.down.law
}

function lineOf(law: RunUp[Direction]['law'], running: number | null) {
  if (law.by !== 'ramp' || law.time === null) return []
  const from = law.from ?? running
  const to = law.to ?? running
  if (from === null || to === null) return []
  return [
    { time: 0, speed: from },
    { time: law.time, speed: to },
  ]
}

/** A further line of the table of speeds: as much later as the last two lie apart, at the last speed. */
export function addEntry(draft: Project, direction: Direction): void {
  const { law } = draft.runUp[direction]
  if (law.by !== 'table') return
  const last = law.entries.at(-1)
  const before = law.entries.at(-2)
  const step = last && before && last.time > before.time ? last.time - before.time : 1
  law.entries.push(last ? { time: last.time + step, speed: last.speed } : { time: 0, speed: 0 })
}
