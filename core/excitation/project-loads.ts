import type { Vec3 } from '../project/fields.ts'
import type { Project } from '../project/project.ts'
import type { Problem } from '../results.ts'
import { sourceLoad, type SourceLoad } from './order-loads.ts'

/** Orders of the exciting forces and of the requirements; the shaft's own where there are none. */
export function ordersOf(project: Project): readonly number[] {
  const orders = new Set<number>()
  for (const source of project.sources) {
    if (source.enabled) orders.add(source.kind === 'unbalance' ? 1 : source.order)
  }
  for (const requirement of project.requirements) {
    if (requirement.enabled && requirement.kind === 'modeSeparation') {
      for (const order of requirement.orders) orders.add(order)
    }
  }
  if (orders.size === 0) orders.add(1)
  return [...orders].toSorted((a, b) => a - b)
}

/**
 * Loads of all enabled sources; null, with the reasons, when there is none or one is not known.
 * @param centre centre of gravity from the datum [m]
 */
export function knownLoads(
  project: Project,
  centre: Readonly<Vec3>,
  problems: Problem[],
): readonly SourceLoad[] | null {
  const active = project.sources.flatMap((source, index) => (source.enabled ? [{ source, index }] : []))
  if (active.length === 0) {
    problems.push({
      field: 'sources',
      message: 'Nothing excites the machine yet: add an exciting force.',
      kind: 'missing',
    })
    return null
  }
  const amounts = active.map(({ source, index }) =>
    sourceLoad(source, project.machine, centre, `sources[${index}]`),
  )
  problems.push(...amounts.flatMap((amount) => amount.problems))
  const loads = amounts.flatMap(({ load }) => (load === null ? [] : [load]))
  return loads.length === amounts.length ? loads : null
}
