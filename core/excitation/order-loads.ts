import { assertNever } from '../errors.ts'
import { cross, scale, subtract, unit } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import type { Machine } from '../project/machine.ts'
import type { HarmonicSource, Source, UnbalanceSource } from '../project/sources.ts'
import type { Problem } from '../results.ts'

/** Complex vector, parts apart. */
export interface ComplexVector {
  readonly re: Vec3
  readonly im: Vec3
}

/**
 * One source as a force and a moment about the centre of gravity per unit of its frequency law:
 * `law` constant: as it stands; squared: times omega², omega = order times shaft speed [rad/s].
 */
export interface SourceLoad {
  readonly order: number
  readonly law: 'constant' | 'squared'
  /** the force of a mass carried by the shaft: while the speed changes it has a tangential part besides */
  readonly inertial?: boolean
  readonly force: ComplexVector
  readonly moment: ComplexVector
}

/** What a source amounts to, or what is missing to know it. */
export type SourceAmount =
  | { readonly load: SourceLoad; readonly problems: readonly [] }
  | { readonly load: null; readonly problems: readonly Problem[] }

/** Two directions across the shaft with e1 x e2 along the axis. */
const ACROSS: Readonly<Record<'x' | 'y' | 'z', readonly [Vec3, Vec3]>> = {
  x: [
    [0, 1, 0],
    [0, 0, 1],
  ],
  y: [
    [0, 0, 1],
    [1, 0, 0],
  ],
  z: [
    [1, 0, 0],
    [0, 1, 0],
  ],
}

/**
 * Load of a source at the centre of gravity.
 * @param centre centre of gravity from the datum [m]
 * @param field path of the source in the project, such as `sources[0]`
 */
export function sourceLoad(
  source: Source,
  machine: Machine,
  centre: Readonly<Vec3>,
  field: string,
): SourceAmount {
  switch (source.kind) {
    case 'unbalance':
      return unbalanceLoad(source, machine, centre, field)
    case 'harmonic':
      return harmonicLoad(source, machine, centre, field)
    default:
      return assertNever(source, 'source')
  }
}

/**
 * Residual unbalance U [kg m]: typed, rotor mass times eccentricity, or from a balance quality grade,
 * U = m G / omega with G = e omega (ISO 21940-11: G 6.3 is e omega = 6.3 mm/s at service speed).
 */
export function residualUnbalance(
  { amount }: UnbalanceSource,
  runningSpeed: number | null,
  field: string,
): { readonly unbalance: number | null; readonly problems: readonly Problem[] } {
  const problems: Problem[] = []
  const need = (value: number | null, name: string, message: string): number => {
    if (value === null) problems.push({ field: name, message, kind: 'missing' })
    return value ?? 0
  }
  const path = `${field}.amount`
  const unbalance = (() => {
    switch (amount.by) {
      case 'unbalance':
        return need(amount.unbalance, `${path}.unbalance`, 'Give the residual unbalance.')
      case 'eccentricity':
        return (
          need(amount.rotorMass, `${path}.rotorMass`, 'Give the mass of the rotor.') *
          need(amount.eccentricity, `${path}.eccentricity`, 'Give the eccentricity of the rotor.')
        )
      case 'grade': {
        const mass = need(amount.rotorMass, `${path}.rotorMass`, 'Give the mass of the rotor.')
        const grade = need(amount.grade, `${path}.grade`, 'Give the balance quality grade.')
        const speed = need(
          amount.serviceSpeed ?? runningSpeed,
          `${path}.serviceSpeed`,
          'Give the service speed of the rotor, or the running speed of the machine.',
        )
        return speed > 0 ? (mass * grade) / speed : 0
      }
      default:
        return assertNever(amount, 'amount')
    }
  })()
  return { unbalance: problems.length > 0 ? null : unbalance, problems }
}

/** Rotating force U omega² (e1 - i e2) exp(i phase), e1 x e2 along the rotation vector. */
function unbalanceLoad(
  source: UnbalanceSource,
  machine: Machine,
  centre: Readonly<Vec3>,
  field: string,
): SourceAmount {
  const { unbalance, problems } = residualUnbalance(source, machine.duty.runningSpeed, field)
  if (unbalance === null) return { load: null, problems }
  const { shaft } = machine
  const [e1, e2] = ACROSS[shaft.axis]
  const turn = shaft.sense === 'positive' ? -1 : 1
  const cos = unbalance * Math.cos(source.phase)
  const sin = unbalance * Math.sin(source.phase)
  // (e1 + i turn e2) (cos + i sin)
  const force: ComplexVector = {
    re: combine(e1, cos, e2, -turn * sin),
    im: combine(e1, sin, e2, turn * cos),
  }
  const load: SourceLoad = {
    order: 1,
    law: 'squared',
    inertial: true,
    force,
    moment: momentOf(force, source.position ?? shaft.position, centre),
  }
  return { load, problems: [] }
}

function harmonicLoad(
  source: HarmonicSource,
  machine: Machine,
  centre: Readonly<Vec3>,
  field: string,
): SourceAmount {
  const { load, dependence, order } = source
  const problems: Problem[] = []
  if (load.amplitude === null) {
    problems.push({
      field: `${field}.load.amplitude`,
      message:
        load.kind === 'force' ? 'Give the amplitude of the force.' : 'Give the amplitude of the moment.',
      kind: 'missing',
    })
  }
  const reference =
    dependence.on === 'speedSquared' ? (dependence.referenceSpeed ?? machine.duty.runningSpeed) : null
  if (dependence.on === 'speedSquared' && reference === null) {
    problems.push({
      field: `${field}.dependence.referenceSpeed`,
      message: 'Give the speed at which the amplitude holds, or the running speed of the machine.',
      kind: 'missing',
    })
  }
  if (load.amplitude === null || problems.length > 0) return { load: null, problems }
  const size = reference === null ? load.amplitude : load.amplitude / (order * reference) ** 2
  const direction = unit(load.direction)
  const vector: ComplexVector = {
    re: scale(direction, size * Math.cos(source.phase)),
    im: scale(direction, size * Math.sin(source.phase)),
  }
  const none: ComplexVector = { re: [0, 0, 0], im: [0, 0, 0] }
  const isForce = load.kind === 'force'
  return {
    load: {
      order,
      law: reference === null ? 'constant' : 'squared',
      force: isForce ? vector : none,
      moment: isForce ? momentOf(vector, source.position ?? machine.shaft.position, centre) : vector,
    },
    problems: [],
  }
}

function combine(a: Readonly<Vec3>, p: number, b: Readonly<Vec3>, q: number): Vec3 {
  return [a[0] * p + b[0] * q, a[1] * p + b[1] * q, a[2] * p + b[2] * q]
}

function momentOf(force: ComplexVector, position: Readonly<Vec3>, centre: Readonly<Vec3>): ComplexVector {
  const arm = subtract(position, centre)
  return { re: cross(arm, force.re), im: cross(arm, force.im) }
}

/** The orders that act, each with its sources, lowest first. */
export function groupByOrder(
  loads: readonly SourceLoad[],
): readonly { readonly order: number; readonly loads: readonly SourceLoad[] }[] {
  const orders = [...new Set(loads.map((load) => load.order))].toSorted((a, b) => a - b)
  return orders.map((order) => ({ order, loads: loads.filter((load) => load.order === order) }))
}

/**
 * Force and moment of one order's sources together at `omega` [rad/s]: [Fx Fy Fz Mx My Mz].
 */
export function orderVector(
  loads: readonly SourceLoad[],
  omega: number,
): { readonly re: Float64Array; readonly im: Float64Array } {
  const re = new Float64Array(6)
  const im = new Float64Array(6)
  for (const { law, force, moment } of loads) {
    const factor = law === 'squared' ? omega * omega : 1
    for (const axis of [0, 1, 2] as const) {
      re[axis] = (re[axis] ?? 0) + factor * force.re[axis]
      im[axis] = (im[axis] ?? 0) + factor * force.im[axis]
      re[3 + axis] = (re[3 + axis] ?? 0) + factor * moment.re[axis]
      im[3 + axis] = (im[3 + axis] ?? 0) + factor * moment.im[axis]
    }
  }
  return { re, im }
}
