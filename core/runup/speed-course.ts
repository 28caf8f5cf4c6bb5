import { assertNever } from '../errors.ts'
import type { Machine } from '../project/machine.ts'
import type { FallLaw, RiseLaw } from '../project/run-up.ts'
import type { Problem } from '../results.ts'

/**
 * A stretch of time over which the speed is one smooth function, described by its acceleration:
 * speed' = constant + square · speed² [rad/s²]. A ramp has square 0, a hold has both 0.
 */
export interface SpeedPiece {
  /** [s] */
  readonly duration: number
  /** speed at its begin and end [rad/s] */
  readonly from: number
  readonly to: number
  /** [rad/s²] */
  readonly constant: number
  /** [1/rad] */
  readonly square: number
}

/** Speed against time, piece by piece. */
export interface SpeedCourse {
  readonly pieces: readonly SpeedPiece[]
  /** [s] */
  readonly duration: number
}

export type CourseFinding =
  | { readonly course: SpeedCourse; readonly problems: readonly [] }
  | { readonly course: null; readonly problems: readonly Problem[] }

/**
 * The course of speed that a law and the hold after it describe.
 * @param hold time at the last speed [s]
 * @param field path of the law in the project, such as `runUp.up.law`
 */
export function speedCourse(
  law: RiseLaw | FallLaw,
  direction: 'up' | 'down',
  hold: number,
  duty: Machine['duty'],
  field: string,
): CourseFinding {
  const need = new Needs(field)
  const pieces = piecesOf(law, direction, duty, need)
  if (need.problems.length > 0 || pieces === null) return { course: null, problems: need.problems }
  const last = pieces.at(-1)?.to ?? 0
  const all = hold > 0 ? [...pieces, straight(hold, last, last)] : pieces
  return { course: courseOf(all), problems: [] }
}

export function courseOf(pieces: readonly SpeedPiece[]): SpeedCourse {
  return { pieces, duration: pieces.reduce((sum, { duration }) => sum + duration, 0) }
}

/** Constant acceleration, or none. */
export function straight(duration: number, from: number, to: number): SpeedPiece {
  return { duration, from, to, constant: (to - from) / duration, square: 0 }
}

class Needs {
  readonly problems: Problem[] = []
  readonly field: string
  constructor(field: string) {
    this.field = field
  }
  value(value: number | null, key: string, message: string): number {
    if (value === null) this.say(key, message, 'missing')
    return value ?? 0
  }
  say(key: string, message: string, kind: Problem['kind']): null {
    this.problems.push({ field: key === '' ? this.field : `${this.field}.${key}`, message, kind })
    return null
  }
}

function piecesOf(
  law: RiseLaw | FallLaw,
  direction: 'up' | 'down',
  duty: Machine['duty'],
  need: Needs,
): readonly SpeedPiece[] | null {
  if (law.by === 'table') return tablePieces(law.entries, need)
  const running = 'Give this speed, or the running speed of the machine.'
  const from = need.value(law.from ?? duty.runningSpeed, 'from', running)
  const to = need.value(law.to ?? duty.runningSpeed, 'to', running)
  if (need.problems.length === 0 && !(direction === 'up' ? to > from : from > to)) {
    return need.say(
      direction === 'up' ? 'to' : 'from',
      direction === 'up' ? 'A run-up ends at a higher speed.' : 'A coast-down starts at a higher speed.',
      'invalid',
    )
  }
  switch (law.by) {
    case 'ramp': {
      const time = need.value(
        law.time,
        'time',
        direction === 'up' ? 'Give the time of the run-up.' : 'Give the time of the coast-down.',
      )
      return need.problems.length > 0 ? null : [straight(time, from, to)]
    }
    case 'torque':
      return torquePieces(law, direction, from, to, duty.runningSpeed, need)
    default:
      return assertNever(law, 'law')
  }
}

/**
 * Inertia · speed' = ± torque - loadTorque (speed / loadSpeed)²: the rotor's equation of motion with a
 * constant torque that drives or brakes and a load as of a fan or pump. Its solutions are tanh, tan
 * and 1 / (1 + t), from which the time needed follows.
 */
function torquePieces(
  law: Extract<RiseLaw | FallLaw, { by: 'torque' }>,
  direction: 'up' | 'down',
  from: number,
  to: number,
  runningSpeed: number | null,
  need: Needs,
): readonly SpeedPiece[] | null {
  const inertia = need.value(law.inertia, 'inertia', 'Give the inertia of the rotor about the shaft.')
  const torque = need.value(law.torque, 'torque', 'Give the driving torque.')
  const loadSpeed =
    law.loadTorque === 0
      ? 1
      : need.value(
          law.loadSpeed ?? runningSpeed,
          'loadSpeed',
          'Give the speed at which the load torque holds, or the running speed of the machine.',
        )
  if (need.problems.length > 0) return null
  const constant = (direction === 'up' ? torque : -torque) / inertia
  const square = -law.loadTorque / (loadSpeed * loadSpeed) / inertia
  if (direction === 'up' && constant + square * to * to <= 0) {
    return need.say(
      'torque',
      'The driving torque is used up by the load below this speed: it is never reached.',
      'invalid',
    )
  }
  if (direction === 'down' && constant === 0 && (square === 0 || to === 0)) {
    return need.say(
      'torque',
      'Without friction or brake the shaft never comes to rest: give a torque or a speed at which it ends.',
      'missing',
    )
  }
  return [{ duration: timeBetween(constant, square, from, to), from, to, constant, square }]
}

/** Time that speed' = p + q speed² takes from one speed to another [s]. */
function timeBetween(p: number, q: number, from: number, to: number): number {
  if (q === 0) return (to - from) / p
  if (p === 0) return (1 / from - 1 / to) / q
  const scale = Math.sqrt(Math.abs(p / q))
  const rate = Math.sqrt(Math.abs(p * q))
  if (p * q < 0) return (Math.atanh(to / scale) - Math.atanh(from / scale)) / rate
  return (Math.sign(p) * (Math.atan(to / scale) - Math.atan(from / scale))) / rate
}

/** Speed of a piece at a time since its begin [rad/s]. */
export function speedOf({ from, constant: p, square: q }: SpeedPiece, time: number): number {
  if (q === 0) return from + p * time
  if (p === 0) return from / (1 - q * from * time)
  const scale = Math.sqrt(Math.abs(p / q))
  const rate = Math.sqrt(Math.abs(p * q)) * time
  if (p * q < 0) return scale * Math.tanh(rate + Math.atanh(from / scale))
  return scale * Math.tan(Math.sign(p) * rate + Math.atan(from / scale))
}

/** Speed at rising times since the start [rad/s]. */
export function speedsAt(course: SpeedCourse, times: ArrayLike<number>): Float64Array {
  let piece = 0
  let begun = 0
  return Float64Array.from(times, (time) => {
    while (piece < course.pieces.length - 1 && time > begun + (course.pieces[piece]?.duration ?? 0)) {
      begun += course.pieces[piece]?.duration ?? 0
      piece++
    }
    const part = course.pieces[piece]
    return part ? speedOf(part, Math.min(part.duration, Math.max(0, time - begun))) : 0
  })
}

function tablePieces(
  entries: readonly { readonly time: number; readonly speed: number }[],
  need: Needs,
): readonly SpeedPiece[] | null {
  if (entries.length < 2) return need.say('entries', 'Give at least two times with their speeds.', 'missing')
  const pieces: SpeedPiece[] = []
  for (const [index, entry] of entries.entries()) {
    const before = entries[index - 1]
    if (!before) continue
    if (!(entry.time > before.time)) {
      return need.say(`entries[${index}].time`, 'Times must rise from one entry to the next.', 'invalid')
    }
    pieces.push(straight(entry.time - before.time, before.speed, entry.speed))
  }
  return pieces
}
