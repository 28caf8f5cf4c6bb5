import type { Vec3 } from '../project/fields.ts'

/** Three rows of three. */
export type Matrix3 = readonly [Vec3, Vec3, Vec3]

export function add(a: Readonly<Vec3>, b: Readonly<Vec3>): Vec3 {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]]
}

export function subtract(a: Readonly<Vec3>, b: Readonly<Vec3>): Vec3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
}

export function scale(a: Readonly<Vec3>, factor: number): Vec3 {
  return [a[0] * factor, a[1] * factor, a[2] * factor]
}

export function dot(a: Readonly<Vec3>, b: Readonly<Vec3>): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

export function cross(a: Readonly<Vec3>, b: Readonly<Vec3>): Vec3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]
}

export function norm(a: Readonly<Vec3>): number {
  return Math.hypot(a[0], a[1], a[2])
}

/** The direction as a unit vector; the schema has refused a vector without length. */
export function unit(a: Readonly<Vec3>): Vec3 {
  const size = norm(a)
  return size === 0 ? [0, 0, 0] : scale(a, 1 / size)
}

/**
 * Where the unit vectors of axes turned by `angle` [rad] about `axis` point (right-hand rule):
 * row i is the turned local axis i in the fixed axes. Rodrigues' rotation formula.
 */
export function turnedAxes(axis: Readonly<Vec3>, angle: number): Matrix3 {
  const k = unit(axis)
  const cos = Math.cos(angle)
  const sin = Math.sin(angle)
  const turn = (v: Vec3): Vec3 =>
    add(add(scale(v, cos), scale(cross(k, v), sin)), scale(k, dot(k, v) * (1 - cos)))
  return [turn([1, 0, 0]), turn([0, 1, 0]), turn([0, 0, 1])]
}

export const MACHINE_AXES: Matrix3 = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
]
