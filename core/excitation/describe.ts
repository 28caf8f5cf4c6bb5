import { norm } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import type { Machine } from '../project/machine.ts'
import type { Source } from '../project/sources.ts'
import type { UnitSystem } from '../units/dimensions.ts'
import { formatPlain, formatQuantity } from '../units/format.ts'
import { sourceLoad } from './order-loads.ts'

export interface SourceSummary {
  readonly id: string
  /** such as `1× at 1480 rpm: 214 N rotating` */
  readonly text: string
  /** peak force [N] or moment [N m] at the running speed; null where it is not known */
  readonly amplitude: number | null
}

/** Each source in plain words at the running speed. */
export function describeSource(source: Source, machine: Machine, units: UnitSystem): SourceSummary {
  const order = source.kind === 'unbalance' ? 1 : source.order
  const speed = machine.duty.runningSpeed
  const amplitude = amplitudeAt(source, machine, speed)
  const parts = [
    `${formatPlain(order)}×`,
    ...(speed === null ? [] : [`at ${formatQuantity(speed, 'shaftSpeed', units)}`]),
  ]
  const size =
    amplitude === null
      ? notKnown(source, machine)
      : `${formatQuantity(amplitude, dimensionOf(source), units, 3)} ${sense(source)}`
  return {
    id: source.id,
    text: `${parts.join(' ')}: ${size}${source.enabled ? '' : ' (switched off)'}`,
    amplitude,
  }
}

function dimensionOf(source: Source): 'force' | 'moment' {
  return source.kind === 'harmonic' && source.load.kind === 'moment' ? 'moment' : 'force'
}

function amplitudeAt(source: Source, machine: Machine, speed: number | null): number | null {
  const { load } = sourceLoad(source, machine, [0, 0, 0], '')
  if (load === null) return null
  if (load.law === 'squared' && speed === null) return null
  const factor = load.law === 'squared' ? (load.order * (speed ?? 0)) ** 2 : 1
  const { re, im } = dimensionOf(source) === 'moment' ? load.moment : load.force
  // a rotating vector has the same length at every instant; a straight one has all in one direction
  return factor * (source.kind === 'unbalance' ? norm(re) : Math.hypot(...re, ...im))
}

function notKnown(source: Source, machine: Machine): string {
  const { problems } = sourceLoad(source, machine, [0, 0, 0], '')
  return problems.length > 0 ? 'size not given yet' : 'size depends on the running speed'
}

function sense(source: Source): string {
  if (source.kind === 'unbalance') return 'rotating'
  const word = source.load.kind === 'force' ? 'along' : 'about'
  return `${word} ${directionWords(source.load.direction)}`
}

/** `x`, `-z`, or the components of the unit vector. */
export function directionWords(direction: Readonly<Vec3>): string {
  const size = norm(direction)
  const axes = ['x', 'y', 'z'] as const
  for (const [index, axis] of axes.entries()) {
    const share = (direction[index] ?? 0) / size
    if (Math.abs(Math.abs(share) - 1) < 1e-9) return share > 0 ? axis : `-${axis}`
  }
  return `(${direction.map((value) => formatPlain(value / size, 2)).join(', ')})`
}
