import { followedTravel } from '../components/air-spring.ts'
import type { ComponentMount } from '../components/analyse.ts'
import { gasState } from '../components/gas-column.ts'
import { curveAt, monotoneCurve } from '../numerics/monotone-curve.ts'

/** What a mount does along its own axis at one compression. */
export interface AxialState {
  /** [N], positive pressing */
  readonly force: number
  /** static stiffness dF/dx there [N/m] */
  readonly tangent: number
  /** stiffness of vibration there [N/m], at the reference temperature */
  readonly dynamic: number
  /** whether the compression lies outside what the law was given for */
  readonly outside: boolean
}

/** Static law of a mount along its own axis, x the compression [m]. */
export interface AxialLaw {
  /** linear through the origin: statics need no iteration */
  readonly linear: boolean
  readonly at: (compression: number) => AxialState
}

export function linearLaw(stiffness: number, dynamicRatio: number): AxialLaw {
  const dynamic = stiffness * dynamicRatio
  return {
    linear: true,
    at: (compression) => ({ force: stiffness * compression, tangent: stiffness, dynamic, outside: false }),
  }
}

/**
 * Law through measured points, monotone cubic between them. The origin is added where the points begin
 * beyond it. Vibration sees the tangent times the dynamic ratio.
 * @param points [compression, load], both rising
 */
export function curveLaw(points: readonly (readonly [number, number])[], dynamicRatio: number): AxialLaw {
  const first = points[0] ?? [0, 0]
  const curve = monotoneCurve(first[0] > 0 && first[1] > 0 ? [[0, 0], ...points] : points)
  return {
    linear: false,
    at: (compression) => {
      const { value, slope, outside } = curveAt(curve, compression)
      return { force: value, tangent: slope, dynamic: slope * dynamicRatio, outside }
    },
  }
}

/**
 * Law of a closed air spring about its design height, slow for the rest position and fast for
 * vibration; straight beyond the travel for which it is followed.
 */
export function gasLaw({
  column,
  exponent,
  slowExponent,
  correction,
}: NonNullable<ComponentMount['gas']>): AxialLaw {
  const [up, down] = followedTravel(column)
  const rest = gasState(column, 0, slowExponent).force
  const within = (compression: number) => {
    const slow = gasState(column, compression, slowExponent)
    const fast = gasState(column, compression, slowExponent, exponent)
    return {
      // a measured correction is one of stiffness; the load at the design height stays
      force: rest + correction * (slow.force - rest),
      tangent: correction * slow.stiffness,
      dynamic: correction * fast.stiffness,
    }
  }
  return {
    linear: false,
    at: (compression) => {
      const held = Math.min(Math.max(compression, up), down)
      const state = within(held)
      const beyond = compression - held
      return { ...state, force: state.force + state.tangent * beyond, outside: beyond !== 0 }
    },
  }
}
