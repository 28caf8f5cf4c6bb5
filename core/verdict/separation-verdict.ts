import type { Project } from '../project/project.ts'
import type { Mode, Verdict } from '../results.ts'
import { formatPlain } from '../units/format.ts'
import { absorbersInPlace, type Of } from './names.ts'
import { spanSpeeds, SPAN_WORDS } from './span.ts'
import { reasonFor, unknownVerdict, verdictOf, type Computed } from './verdict.ts'

interface Closest {
  readonly mode: Mode
  readonly order: number
  /** distance as a share of the exciting frequency */
  readonly separation: number
  /** [rad/s] */
  readonly speed: number
}

/**
 * Smallest distance of a natural frequency from an order's frequency over a span of speeds, as a
 * share of the exciting frequency: |f_n - f| / f.
 */
export function judgeModeSeparation(
  requirement: Of<'modeSeparation'>,
  project: Project,
  computed: Computed,
): Verdict {
  const subject = {
    title: `Natural frequencies clear of ${orderWords(requirement.orders)} ${SPAN_WORDS[requirement.speeds]}`,
    dimension: 'share',
    keep: 'above',
    limit: requirement.limit,
  } as const
  const modes = absorbersInPlace(project, computed).length > 0 ? computed.modesWithAbsorbers : computed.modes
  if (modes === null)
    return unknownVerdict(requirement, subject, reasonFor(computed, 'The modes are not known.'))
  const span = spanSpeeds(project, requirement.speeds, computed.response?.sweep.speed ?? new Float64Array())
  if (span === null) return unknownVerdict(requirement, subject, 'Give the speed on the Machine page.')
  const closest = closestApproach(modes, requirement.orders, span)
  if (closest === null) return unknownVerdict(requirement, subject, 'Name at least one order.')
  return verdictOf(requirement, subject, {
    value: closest.separation,
    speed: closest.speed,
    place: `mode ${closest.mode.number} (${closest.mode.name}, ${formatPlain(closest.mode.frequency)} Hz) and order ${formatPlain(closest.order)}`,
  })
}

/** Such as `order 1` or `orders 1, 2 and 9`. */
function orderWords(orders: readonly number[]): string {
  const words = orders.map((order) => formatPlain(order))
  if (words.length < 2) return `order ${words[0] ?? '–'}`
  return `orders ${words.slice(0, -1).join(', ')} and ${words.at(-1)}`
}

/** @param span lowest and highest speed [rad/s] */
export function closestApproach(
  modes: readonly Mode[],
  orders: readonly number[],
  span: readonly [number, number],
): Closest | null {
  let best: Closest | null = null
  for (const mode of modes) {
    for (const order of orders) {
      const meets = (2 * Math.PI * mode.frequency) / order
      const speed = Math.min(Math.max(meets, span[0]), span[1])
      const exciting = (order * speed) / (2 * Math.PI)
      const separation = speed === meets ? 0 : Math.abs(mode.frequency - exciting) / exciting
      if (best === null || separation < best.separation) best = { mode, order, separation, speed }
    }
  }
  return best
}
