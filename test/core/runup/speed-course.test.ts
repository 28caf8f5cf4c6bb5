import { describe, expect, it } from 'vitest'
import { machineSchema } from '../../../core/project/machine.ts'
import { runUpSchema, type FallLaw, type RiseLaw } from '../../../core/project/run-up.ts'
import { speedCourse, speedOf, speedsAt, type SpeedPiece } from '../../../core/runup/speed-course.ts'

const duty = machineSchema.parse({ duty: { runningSpeed: 150 } }).duty
const rise = (law: object) => runUpSchema.parse({ up: { law } }).up.law
const fall = (law: object) => runUpSchema.parse({ down: { law } }).down.law
const course = (law: RiseLaw | FallLaw, direction: 'up' | 'down', hold = 0) =>
  speedCourse(law, direction, hold, duty, `runUp.${direction}.law`)

/** Speed by the rotor's own equation in small steps: Runge and Kutta's fourth-order method. */
function integrated({ from, constant, square, duration }: SpeedPiece): number {
  const steps = 4000
  const h = duration / steps
  const rate = (speed: number) => constant + square * speed * speed
  let speed = from
  for (let i = 0; i < steps; i++) {
    const a = rate(speed)
    const b = rate(speed + (h / 2) * a)
    const c = rate(speed + (h / 2) * b)
    const d = rate(speed + h * c)
    speed += (h / 6) * (a + 2 * b + 2 * c + d)
  }
  return speed
}

describe('the course of speed', () => {
  it('is a ramp from rest to the running speed, and then a hold', () => {
    const found = course(rise({ by: 'ramp', time: 20 }), 'up', 5).course
    expect(found?.duration).toBe(25)
    const times = [0, 10, 20, 24]
    expect(found && [...speedsAt(found, times)]).toEqual([0, 75, 150, 150])
  })

  it.each([
    ['driving torque alone', rise({ by: 'torque', inertia: 3, torque: 40 }), 'up'],
    ['a load as of a fan', rise({ by: 'torque', inertia: 3, torque: 40, loadTorque: 35 }), 'up'],
    ['friction alone', fall({ by: 'torque', inertia: 3, torque: 4 }), 'down'],
    ['a load alone', fall({ by: 'torque', inertia: 3, to: 10, loadTorque: 35 }), 'down'],
    ['friction and a load', fall({ by: 'torque', inertia: 3, torque: 2, loadTorque: 35 }), 'down'],
  ] as const)('follows the equation of the rotor: %s', (_, law, direction) => {
    const found = course(law, direction).course
    const piece = found?.pieces[0]
    if (!piece) throw new Error('no course')
    // 1e-9 of the running speed: error of the small steps
    expect(Math.abs(integrated(piece) - piece.to)).toBeLessThan(1e-9 * 150)
    expect(Math.abs(speedOf(piece, piece.duration) - piece.to)).toBeLessThan(1e-9 * 150)
    const middle = { ...piece, duration: piece.duration / 3 }
    expect(Math.abs(integrated(middle) - speedOf(piece, piece.duration / 3))).toBeLessThan(1e-9 * 150)
  })

  it('follows a table in straight lines', () => {
    const law = rise({
      by: 'table',
      entries: [
        { time: 0, speed: 0 },
        { time: 4, speed: 40 },
        { time: 6, speed: 150 },
      ],
    })
    const found = course(law, 'up').course
    expect(found && [...speedsAt(found, [2, 5, 6])]).toEqual([20, 95, 150])
  })

  it.each([
    ['no time', rise({ by: 'ramp' }), 'up', 'runUp.up.law.time', 'missing'],
    ['a run-up that falls', rise({ by: 'ramp', from: 200, time: 5 }), 'up', 'runUp.up.law.to', 'invalid'],
    [
      'a torque that is used up',
      rise({ by: 'torque', inertia: 3, torque: 40, loadTorque: 41 }),
      'up',
      'runUp.up.law.torque',
      'invalid',
    ],
    ['no inertia', rise({ by: 'torque', torque: 40 }), 'up', 'runUp.up.law.inertia', 'missing'],
    ['nothing that brakes', fall({ by: 'torque', inertia: 3 }), 'down', 'runUp.down.law.torque', 'missing'],
    [
      'one entry',
      rise({ by: 'table', entries: [{ time: 0, speed: 0 }] }),
      'up',
      'runUp.up.law.entries',
      'missing',
    ],
    [
      'times that stand still',
      rise({
        by: 'table',
        entries: [
          { time: 1, speed: 0 },
          { time: 1, speed: 9 },
        ],
      }),
      'up',
      'runUp.up.law.entries[1].time',
      'invalid',
    ],
  ] as const)('says at the field what is wrong: %s', (_, law, direction, field, kind) => {
    const { problems } = course(law, direction)
    expect(problems.map((problem) => [problem.field, problem.kind])).toEqual([[field, kind]])
  })
})
