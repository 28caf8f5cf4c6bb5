import type { Vec3 } from '../project/fields.ts'
import type { Matrix3 } from '../numerics/vector3.ts'
import type { Law } from './laws.ts'

/** What does not move. */
export interface GroundNode {
  readonly kind: 'ground'
  readonly id: string
}

/** A rigid body: freedoms [ux uy uz rx ry rz] at its centre of gravity, small rotations. */
export interface BodyNode {
  readonly kind: 'body'
  readonly id: string
  /** [kg] */
  readonly mass: number
  /** centre of gravity from the datum [m] */
  readonly centre: Readonly<Vec3>
  /** tensor about the centre of gravity, products with their minus sign [kg m²] */
  readonly inertia: Matrix3
}

/** A mass that moves along one line only: one freedom, the travel along `direction`. */
export interface LineNode {
  readonly kind: 'line'
  readonly id: string
  /** [kg] */
  readonly mass: number
  /** unit vector */
  readonly direction: Readonly<Vec3>
}

export type NetworkNode = GroundNode | BodyNode | LineNode

/** A place on a node; `position` from the datum [m]. */
export interface Attachment {
  readonly node: string
  readonly position: Readonly<Vec3>
}

/** One direction in which an element resists relative motion of its two ends. */
export interface Branch {
  /** unit vector in the fixed axes */
  readonly axis: Readonly<Vec3>
  /** whether it resists shift along the axis or turning about it */
  readonly motion: 'shift' | 'turn'
  readonly law: Law
}

/** Anything without mass between two places: mounts, absorber springs, pipes. */
export interface NetworkElement {
  readonly id: string
  /** the side that carries: its force on this end is +z(omega) times the relative motion */
  readonly from: Attachment
  /** the side that is carried */
  readonly to: Attachment
  readonly branches: readonly Branch[]
}

export interface Network {
  readonly nodes: readonly NetworkNode[]
  readonly elements: readonly NetworkElement[]
}

export const GROUND: GroundNode = { kind: 'ground', id: 'ground' }
