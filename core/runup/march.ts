/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Poles } from '../network/poles.ts'
import { fillPanel, forcedModes, panelEnd, panelWork, type PanelWork } from './panel.ts'
import { boundPanel, panelBounds, type PanelBounds } from './panel-bound.ts'
import type { PanelPlan } from './panel-plan.ts'
import type { StateLoad } from './state-load.ts'

/** The states at the begin of every panel, for every order, and bounds of their size over it. */
export interface March {
  readonly plan: PanelPlan
  readonly poles: Poles
  readonly loads: readonly StateLoad[]
  /** y exp(-i order phase): order o, panel p, state j at ((o (panels + 1)) + p) count + j */
  readonly stateRe: Float64Array
  readonly stateIm: Float64Array
  readonly bounds: PanelBounds
  /** share of a steady motion that the cut of the series may have cost, summed over the panels */
  readonly cut: number
}

export const stateAt = ({ plan, poles }: March, order: number, panel: number): number =>
  (order * (plan.count + 1) + panel) * poles.count

/**
 * Takes the states through the whole course, panel by panel.
 * @returns null when the motion it starts from has no bound: a resonance without damping at the first speed
 */
export function marchThrough(plan: PanelPlan, poles: Poles, loads: readonly StateLoad[]): March | null {
  const { count } = poles
  const states = loads.length * (plan.count + 1) * count
  const work = panelWork(poles, plan.degree)
  const march = {
    plan,
    poles,
    loads,
    stateRe: new Float64Array(states),
    stateIm: new Float64Array(states),
    bounds: panelBounds(poles, loads.length, plan.count),
    cut: 0,
  }
  const first = plan.course.pieces[0]?.from ?? 0
  for (let o = 0; o < loads.length; o++) {
    const begin = stateAt(march, o, 0)
    if (first > 0) steadyStates(poles, loads[o]!, first, march.stateRe, march.stateIm, begin)
    for (let j = 0; j < count; j++) {
      if (!Number.isFinite(march.stateRe[begin + j]!) || !Number.isFinite(march.stateIm[begin + j]!))
        return null
    }
    for (let p = 0; p < plan.count; p++) {
      fillPanel(work, plan, p, poles, loads[o]!, march.stateRe, march.stateIm, stateAt(march, o, p))
      panelEnd(work.panel, march.stateRe, march.stateIm, stateAt(march, o, p + 1))
      boundPanel(march.bounds, work, poles, plan.half[p]!, o, p)
      march.cut += work.panel.cut[0]!
    }
  }
  return march
}

/** Fills a panel's motion for an order once more. */
export function refill(march: March, order: number, panel: number, work: PanelWork): void {
  const { plan, poles, loads, stateRe, stateIm } = march
  fillPanel(work, plan, panel, poles, loads[order]!, stateRe, stateIm, stateAt(march, order, panel))
  forcedModes(work, poles)
}

/** The states at a speed that has been the same for ever: force / (i w - lambda), w = order · speed. */
export function steadyStates(
  poles: Poles,
  load: StateLoad,
  speed: number,
  targetRe: Float64Array,
  targetIm: Float64Array,
  at: number,
): void {
  const w = load.order * speed
  const square = w * w
  for (let j = 0; j < poles.count; j++) {
    const re = load.constantRe[j]! + square * (load.squaredRe[j]! + load.inertialRe[j]!)
    const im = load.constantIm[j]! + square * (load.squaredIm[j]! + load.inertialIm[j]!)
    const a = -poles.re[j]!
    const b = w - poles.im[j]!
    const size = a * a + b * b
    // a state that nothing drives stays at rest, even on a resonance without damping
    const none = re === 0 && im === 0
    targetRe[at + j] = none ? 0 : (re * a + im * b) / size
    targetIm[at + j] = none ? 0 : (im * a - re * b) / size
  }
}
