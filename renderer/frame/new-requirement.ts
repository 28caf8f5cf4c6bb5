import type { Project } from '../../core/project/project.ts'
import type { Requirement, RequirementKind } from '../../core/project/requirements.ts'

/** In words, as a person asks for it. */
export const REQUIREMENT_NAMES: Readonly<Record<RequirementKind, string>> = {
  isolation: 'Isolation',
  transmittedForce: 'Force into the support',
  vibrationVelocity: 'Vibration velocity of a point',
  modeSeparation: 'Natural frequencies clear of orders',
  mountLoad: 'Load on the mounts',
  mountDeflection: 'Deflection of the mounts',
  absorberStroke: 'Travel of an absorber',
  runUpMotion: 'Displacement during run-up and coast-down',
  runUpForce: 'Force through a mount during run-up and coast-down',
}

export const REQUIREMENT_KINDS: readonly RequirementKind[] = [
  'isolation',
  'transmittedForce',
  'vibrationVelocity',
  'modeSeparation',
  'mountLoad',
  'mountDeflection',
  'absorberStroke',
  'runUpMotion',
  'runUpForce',
]

/** A requirement of one kind that fits the project; its limit is left to the person who answers for it. */
export function newRequirement(kind: RequirementKind, project: Project, id: string): Requirement {
  const common = { id, enabled: true, source: '' }
  const { runningSpeed, lowestSpeed, highestSpeed } = project.machine.duty
  const ranged = lowestSpeed !== null || highestSpeed !== null
  const speeds = ranged || runningSpeed === null ? 'operating' : 'running'
  switch (kind) {
    case 'isolation':
      return { ...common, kind, speeds: 'running', limit: null }
    case 'transmittedForce':
      return { ...common, kind, speeds, place: 'support', limit: null }
    case 'vibrationVelocity':
      return {
        ...common,
        kind,
        speeds,
        point: project.machine.points[0]?.id ?? null,
        direction: 'worst',
        scale: 'own',
        machineClass: '',
        zone: '',
        limit: null,
      }
    case 'modeSeparation':
      return { ...common, kind, orders: ordersOf(project), speeds, limit: null }
    case 'mountLoad':
      // all of the rating may be used: what the word means
      return { ...common, kind, limit: 1 }
    case 'mountDeflection':
      return { ...common, kind, limit: null }
    case 'absorberStroke':
      return { ...common, kind, speeds: 'chart', absorber: null, limit: null }
    case 'runUpMotion':
      return {
        ...common,
        kind,
        place: 'mounts',
        point: null,
        direction: 'resultant',
        during: 'both',
        limit: null,
      }
    case 'runUpForce':
      return { ...common, kind, during: 'both', limit: null }
  }
}

/** Orders at which something excites the machine; the first order where nothing is said yet. */
function ordersOf(project: Project): number[] {
  const orders = project.sources
    .filter((source) => source.enabled)
    .map((source) => (source.kind === 'unbalance' ? 1 : source.order))
  return orders.length === 0 ? [1] : [...new Set(orders)].toSorted((a, b) => a - b)
}

/**
 * Orders typed as numbers with commas, semicolons or blanks between them.
 * @returns null when something else stands there
 */
export function readOrders(text: string): number[] | null {
  const parts = text.split(/[\s;]+|,\s*/).filter((part) => part !== '')
  const orders = parts.map((part) => Number(part.replace(/[x×]$/i, '')))
  const usable = orders.every((order) => Number.isFinite(order) && order > 0 && order <= 1000)
  return usable && orders.length > 0 && orders.length <= 50 ? orders : null
}
