import { InputError } from '../errors.ts'
import { MACHINE } from '../mounts/machine-network.ts'
import { placeRow } from '../network/kinematics.ts'
import type { Vec3 } from '../project/fields.ts'
import type { Project } from '../project/project.ts'
import type { AbsorberResult, Problem } from '../results.ts'
import { marchThrough } from './march.ts'
import { planPanels } from './panel-plan.ts'
import { firstOrder, prepare } from './prepared.ts'
import { speedCourse, speedsAt } from './speed-course.ts'
import { traceOf, type Trace } from './trace.ts'
import { watchRows } from './watch.ts'

export interface RunUpTrace extends Trace {
  readonly time: Float64Array
  /** [rad/s] */
  readonly speed: Float64Array
}

/**
 * Motion of a point of the machine at given times of its run-up or coast-down: the real parts of x, y
 * and z are what a pick-up there would read [m] with the shaft at angle 0 at the start; with the
 * imaginary parts they show any other start.
 * @param position on the machine, from the datum [m]
 * @param times since the start [s], rising, between 0 and the end of the course
 * @param absorbers as designed, from `evaluate`
 * @throws InputError when a time lies outside the course or falls
 */
export function runUpTrace(
  project: Project,
  direction: 'up' | 'down',
  position: Readonly<Vec3>,
  times: Float64Array,
  absorbers: readonly AbsorberResult[],
): { readonly trace: RunUpTrace | null; readonly problems: readonly Problem[] } {
  const found = prepare(project, absorbers)
  if ('problems' in found) return { trace: null, problems: found.problems }
  const { observed, loads } = found.prepared
  const { law, hold } = project.runUp[direction]
  const { course, problems } = speedCourse(
    law,
    direction,
    hold,
    project.machine.duty,
    `runUp.${direction}.law`,
  )
  if (course === null) return { trace: null, problems }
  times.forEach((time, i) => {
    if (!(time >= 0 && time <= course.duration * (1 + 1e-12) && time >= (times[i - 1] ?? 0))) {
      throw new InputError('times', time, `must rise from 0 to ${course.duration} s`)
    }
  })
  const form = firstOrder(observed, loads)
  const march =
    form === null
      ? null
      : marchThrough(
          planPanels(course, Math.max(...form.orders.map(({ order }) => order))),
          form.poles,
          form.orders,
        )
  if (form === null || march === null) {
    return {
      trace: null,
      problems: [
        { field: `runUp.${direction}`, message: 'The motion at the start has no bound.', kind: 'invalid' },
      ],
    }
  }
  const rows = ([0, 1, 2] as const).map((axis) =>
    placeRow(observed.system.freedoms, { node: MACHINE, position }, [
      axis === 0 ? 1 : 0,
      axis === 1 ? 1 : 0,
      axis === 2 ? 1 : 0,
    ]),
  )
  const watch = watchRows(form.modal, rows)
  return {
    trace: { ...traceOf(march, watch, times), time: times, speed: speedsAt(course, times) },
    problems: [],
  }
}
