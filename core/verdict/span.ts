import type { Project } from '../project/project.ts'
import type { SpeedSpan } from '../project/requirements.ts'

/** The operating speeds of a project [rad/s]; without a range both ends are the running speed. */
export function operatingRange(project: Project): readonly [lowest: number, highest: number] | null {
  const { runningSpeed, lowestSpeed, highestSpeed } = project.machine.duty
  const lowest = lowestSpeed ?? runningSpeed ?? highestSpeed
  const highest = highestSpeed ?? runningSpeed ?? lowestSpeed
  if (lowest === null || highest === null) return null
  return [Math.min(lowest, highest), Math.max(lowest, highest)]
}

/** Speeds over which a requirement is judged [rad/s], or null where the project does not say. */
export function spanSpeeds(
  project: Project,
  span: SpeedSpan,
  sweep: Float64Array,
): readonly [number, number] | null {
  if (span === 'running') {
    const running = project.machine.duty.runningSpeed
    return running === null ? null : [running, running]
  }
  if (span === 'operating') return operatingRange(project)
  const first = sweep[0]
  const last = sweep.at(-1)
  return first === undefined || last === undefined ? null : [first, last]
}

export const SPAN_WORDS: Readonly<Record<SpeedSpan, string>> = {
  running: 'at running speed',
  operating: 'over the operating speeds',
  chart: 'at every speed of the chart',
}

export interface Extreme {
  readonly value: number
  /** [rad/s] */
  readonly speed: number
}

/**
 * Largest value of a curve within a span of speeds. The sweep carries the ends of every span, so
 * no interpolation is needed. @param sweep rising speeds [rad/s] @returns null when none lies inside
 */
export function highestWithin(
  sweep: Float64Array,
  curve: Float64Array,
  [lowest, highest]: readonly [number, number],
): Extreme | null {
  // a stored speed and its twin in the sweep may differ in the last bit
  const slack = 1e-9 * highest
  let best: Extreme | null = null
  for (let i = 0; i < sweep.length; i++) {
    const speed = sweep[i]
    const value = curve[i]
    if (speed === undefined || value === undefined || speed < lowest - slack || speed > highest + slack)
      continue
    if (best === null || value > best.value) best = { value, speed }
  }
  return best
}
