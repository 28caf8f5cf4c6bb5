import type { Project } from '../../../core/project/project.ts'
import type { Evaluation, RunUpEnvelope } from '../../../core/results.ts'
import { crossingName, crossingsUpTo, standingModes } from '../../charts/speed-marks.ts'
import type { ChartLimit, ChartMark } from '../../charts/chart-types.ts'
import { formatQuantity } from '../../../core/units/format.ts'
import type { Direction } from './law-edits.ts'

/** The cursor's speed may be off by this from the speed at the chosen time [rad/s]: 1 rpm. */
const SAME_SPEED = (2 * Math.PI) / 60
/** More names than this cannot be read above one chart. */
const MOST_MARKS = 16

type Course = Pick<RunUpEnvelope, 'time' | 'speed'>

/** Times at which the shaft passes a speed [s]; a speed that it keeps counts once, where it is reached. */
export function timesOfSpeed({ time, speed }: Course, wanted: number): readonly number[] {
  const found: number[] = []
  for (let i = 1; i < time.length; i++) {
    const from = (speed[i - 1] ?? 0) - wanted
    const to = (speed[i] ?? 0) - wanted
    if ((from < 0 && to >= 0) || (from > 0 && to <= 0)) {
      const [start, end] = [time[i - 1] ?? 0, time[i] ?? 0]
      found.push(start + ((end - start) * from) / (from - to))
    }
  }
  return found
}

/** Shaft speed at a time, by straight lines between the samples [rad/s]. */
export function speedAtTime({ time, speed }: Course, at: number): number {
  let low = 0
  let high = time.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((time[middle] ?? 0) <= at) low = middle
    else high = middle
  }
  const [start, end] = [time[low] ?? 0, time[high] ?? 0]
  const share = end > start ? Math.min(1, Math.max(0, (at - start) / (end - start))) : 0
  return (speed[low] ?? 0) + share * ((speed[high] ?? 0) - (speed[low] ?? 0))
}

/**
 * Where the cursor stands: at the chosen time as long as the common cursor keeps the speed of that
 * time, otherwise where that speed is passed first, or comes nearest.
 */
export function standingTime(course: Course, speed: number, chosen: number | null): number {
  if (chosen !== null && Math.abs(speedAtTime(course, chosen) - speed) <= SAME_SPEED) return chosen
  const [passed] = timesOfSpeed(course, speed)
  if (passed !== undefined) return passed
  let nearest = 0
  course.speed.forEach((value, i) => {
    if (Math.abs(value - speed) < Math.abs((course.speed[nearest] ?? 0) - speed)) nearest = i
  })
  return course.time[nearest] ?? 0
}

/** Where an order meets a natural frequency on the way. */
export function passageMarks(evaluation: Evaluation, course: Course): readonly ChartMark[] {
  const top = Math.max(...course.speed)
  return crossingsUpTo(standingModes(evaluation), top)
    .flatMap((crossing) =>
      timesOfSpeed(course, crossing.speed).map((x, turn): ChartMark => ({
        id: `passage-${crossing.mode.number}-${crossing.order}-${turn}`,
        x,
        label: crossingName(crossing),
        role: 'crossing',
      })),
    )
    .slice(0, MOST_MARKS)
}

/** Clearances that hold for the drawn place during this passage. */
export function clearanceLimits(
  project: Project,
  envelope: RunUpEnvelope,
  direction: Direction,
): readonly ChartLimit[] {
  return project.requirements.flatMap((requirement) => {
    if (!requirement.enabled || requirement.kind !== 'runUpMotion') return []
    const { id, limit, place, point, during } = requirement
    const drawn = envelope.of === 'mount' ? place === 'mounts' : place === 'point' && point === envelope.place
    if (limit === null || !drawn || requirement.direction !== 'resultant') return []
    if (during !== 'both' && during !== direction) return []
    const label = `limit ${formatQuantity(limit, 'deflection', project.units)}`
    return [{ id, y: limit, label, forbidden: 'above' as const }]
  })
}
