import { evaluate } from '../../core/evaluate.ts'
import type { Observed } from '../../core/excitation/observed.ts'
import type { SourceLoad } from '../../core/excitation/order-loads.ts'
import { feasibilityMap } from '../../core/feasibility/feasibility-map.ts'
import { startGrid } from '../../core/feasibility/map-refinement.ts'
import { assemble } from '../../core/network/assemble.ts'
import { undampedModes } from '../../core/network/modes.ts'
import { responseSolver } from '../../core/network/response.ts'
import { cross, subtract } from '../../core/numerics/vector3.ts'
import type { Vec3 } from '../../core/project/fields.ts'
import type { Project } from '../../core/project/project.ts'
import { marchThrough } from '../../core/runup/march.ts'
import { planPanels } from '../../core/runup/panel-plan.ts'
import { findPeaks } from '../../core/runup/peak-search.ts'
import { firstOrder } from '../../core/runup/prepared.ts'
import { courseOf, straight } from '../../core/runup/speed-course.ts'
import { travelRows, watchRows } from '../../core/runup/watch.ts'
import { BENCH_BODY, BENCH_NETWORK } from './bench-machine.ts'

/** T4: unbalance about x on the six-freedom body; the same figures go to `peer_run_up.py`. */
export const RUN_UP_CASE = {
  /** [Hz], [s] */
  highest: 30,
  ramp: 60,
  hold: 10,
  /** [kg m] and where it turns [m] */
  unbalance: 0.02,
  position: [0.35, 0.06, 0.8] satisfies Vec3,
} as const

/** Largest displacement at each mount: x, y, z, then the resultant [m]. */
export type RunUpOutput = readonly (readonly number[])[]

/** T4 from the network up: peaks at eight mounts while the machine runs up and holds its speed. */
export function runUpTask(): RunUpOutput {
  const system = assemble(BENCH_NETWORK)
  const modes = undampedModes(system)
  if (modes === null) throw new Error('no modes')
  const observed: Observed = {
    system,
    solver: responseSolver(system, modes),
    machineFreedom: 0,
    supports: system.elements,
    points: [],
    absorbers: [],
  }
  const form = firstOrder(observed, [unbalanceLoad()])
  if (form === null) throw new Error('no poles')
  const { highest, ramp, hold } = RUN_UP_CASE
  const speed = 2 * Math.PI * highest
  const plan = planPanels(courseOf([straight(ramp, 0, speed), straight(hold, speed, speed)]), 1)
  const march = marchThrough(plan, form.poles, form.orders)
  if (march === null) throw new Error('no motion')
  const watches = system.elements.map((element) => watchRows(form.modal, travelRows(system, element)))
  return findPeaks(march, watches).peaks.map(({ value }) => [...value])
}

function unbalanceLoad(): SourceLoad {
  const { unbalance, position } = RUN_UP_CASE
  const arm = subtract(position, BENCH_BODY.centre)
  const re: Vec3 = [0, unbalance, 0]
  const im: Vec3 = [0, 0, -unbalance]
  return {
    order: 1,
    law: 'squared',
    inertial: true,
    force: { re, im },
    moment: { re: cross(arm, re), im: cross(arm, im) },
  }
}

/** A coarse feasibility map about a project that has been evaluated already. */
export function coarseMapTask(project: Project): () => void {
  const evaluation = evaluate(project)
  const vertical = evaluation.modes?.toSorted((a, b) => b.energyShare[2] - a.energyShare[2])[0]
  const grid = startGrid(vertical?.frequency ?? 10, 16, 10)
  return () => {
    feasibilityMap(project, grid, evaluation)
  }
}
