import type { Vec3 } from '../../../core/project/fields.ts'

/** One order's force at the centre of gravity, complex: re and im of the six. */
export type Force = (speed: number, acceleration: number) => { re: readonly number[]; im: readonly number[] }

export interface StepsInput {
  /** 6 x 6, rows */
  readonly mass: readonly (readonly number[])[]
  readonly centre: Vec3
  readonly mounts: readonly { readonly position: Vec3; readonly stiffness: Vec3; readonly viscous: Vec3 }[]
  readonly orders: readonly { readonly order: number; readonly force: Force }[]
  /** rad/s² at a time and speed */
  readonly acceleration: (time: number, speed: number) => number
  readonly duration: number
  readonly step: number
  readonly points: readonly Vec3[]
}

/** Largest amplitudes, orders added up: x, y, z of each point's displacement and of each mount's force. */
export interface StepsOutput {
  readonly points: readonly (readonly number[])[]
  readonly forces: readonly (readonly number[])[]
}

/**
 * A run-up from rest by Runge and Kutta's fourth-order method on the six equations of motion as they
 * stand: no modes, no poles, nothing shared with what it checks.
 */
export function runUpInSmallSteps(input: StepsInput): StepsOutput {
  const { mounts, centre, orders, points, step } = input
  const rows = mounts.map(({ position }) => motionRows(position, centre))
  const inverse = inverted(input.mass)
  const at = points.map((point) => motionRows(point, centre))
  // state: per order re and im of q and of its rate; then angle and speed
  const size = orders.length * 24 + 2
  let state = new Float64Array(size)
  const rate = (time: number, s: Float64Array) => {
    const out = new Float64Array(size)
    const [angle, speed] = [s[size - 2] ?? 0, s[size - 1] ?? 0]
    const acceleration = input.acceleration(time, speed)
    out[size - 2] = speed
    out[size - 1] = acceleration
    orders.forEach(({ order, force }, o) => {
      const base = o * 24
      const given = force(speed, acceleration)
      const [cos, sin] = [Math.cos(order * angle), Math.sin(order * angle)]
      const load = [
        given.re.map((value, i) => value * cos - (given.im[i] ?? 0) * sin),
        given.re.map((value, i) => value * sin + (given.im[i] ?? 0) * cos),
      ]
      for (const part of [0, 1]) {
        const q = Array.from({ length: 6 }, (_, i) => s[base + part * 6 + i] ?? 0)
        const v = Array.from({ length: 6 }, (_, i) => s[base + 12 + part * 6 + i] ?? 0)
        const net = [...(load[part] ?? [])]
        mounts.forEach(({ stiffness, viscous }, m) => {
          rows[m]?.forEach((row, axis) => {
            const pull = (stiffness[axis] ?? 0) * dot(row, q) + (viscous[axis] ?? 0) * dot(row, v)
            row.forEach((value, i) => (net[i] = (net[i] ?? 0) - pull * value))
          })
        })
        for (let i = 0; i < 6; i++) {
          out[base + part * 6 + i] = v[i] ?? 0
          out[base + 12 + part * 6 + i] = dot(inverse[i] ?? [], net)
        }
      }
    })
    return out
  }
  const result = {
    points: points.map(() => [0, 0, 0]),
    forces: mounts.map(() => [0, 0, 0]),
  }
  const note = () => {
    const part = (o: number, first: number) =>
      Array.from({ length: 6 }, (_, i) => state[o * 24 + first + i] ?? 0)
    const sums = (of: (o: number) => readonly [number, number]) =>
      orders.reduce((sum, _, o) => sum + Math.hypot(...of(o)), 0)
    at.forEach((axes, p) => {
      axes.forEach((row, axis) => {
        const value = sums((o) => [dot(row, part(o, 0)), dot(row, part(o, 6))])
        const list = result.points[p]
        if (list) list[axis] = Math.max(list[axis] ?? 0, value)
      })
    })
    mounts.forEach(({ stiffness, viscous }, m) => {
      rows[m]?.forEach((row, axis) => {
        const pull = (o: number, q: number, v: number) =>
          (stiffness[axis] ?? 0) * dot(row, part(o, q)) + (viscous[axis] ?? 0) * dot(row, part(o, v))
        const value = sums((o) => [pull(o, 0, 12), pull(o, 6, 18)])
        const list = result.forces[m]
        if (list) list[axis] = Math.max(list[axis] ?? 0, value)
      })
    })
  }
  const steps = Math.round(input.duration / step)
  for (let n = 0; n < steps; n++) {
    const t = n * step
    const a = rate(t, state)
    const b = rate(t + step / 2, moved(state, a, step / 2))
    const c = rate(t + step / 2, moved(state, b, step / 2))
    const d = rate(t + step, moved(state, c, step))
    state = state.map(
      (value, i) => value + (step / 6) * ((a[i] ?? 0) + 2 * (b[i] ?? 0) + 2 * (c[i] ?? 0) + (d[i] ?? 0)),
    )
    note()
  }
  return result
}

function moved(state: Float64Array, rate: Float64Array, step: number): Float64Array {
  return state.map((value, i) => value + step * (rate[i] ?? 0))
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, value, i) => sum + value * (b[i] ?? 0), 0)
}

/** u + theta x r along x, y and z as rows over the six freedoms. */
function motionRows(position: Vec3, centre: Vec3): readonly (readonly number[])[] {
  const [x, y, z] = [position[0] - centre[0], position[1] - centre[1], position[2] - centre[2]]
  return [
    [1, 0, 0, 0, z, -y],
    [0, 1, 0, -z, 0, x],
    [0, 0, 1, y, -x, 0],
  ]
}

/** Gauss and Jordan's elimination with pivots. */
function inverted(matrix: readonly (readonly number[])[]): readonly (readonly number[])[] {
  const n = matrix.length
  const rows = matrix.map((row, i) => [...row, ...Array.from({ length: n }, (_, j) => (i === j ? 1 : 0))])
  for (let i = 0; i < n; i++) {
    const pivot = rows
      .slice(i)
      .reduce((best, row) => (Math.abs(row[i] ?? 0) > Math.abs(best[i] ?? 0) ? row : best))
    const from = rows.indexOf(pivot)
    const other = rows[i]
    if (!other) continue
    rows[i] = pivot.map((value) => value / (pivot[i] ?? 1))
    if (from !== i) rows[from] = other
    const own = rows[i] ?? []
    rows.forEach((row, k) => {
      const factor = row[i] ?? 0
      if (k !== i) rows[k] = row.map((value, j) => value - factor * (own[j] ?? 0))
    })
  }
  return rows.map((row) => row.slice(n))
}
