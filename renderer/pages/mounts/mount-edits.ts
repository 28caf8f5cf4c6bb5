import type { Vec3 } from '../../../core/project/fields.ts'
import type { MountType, PlacedMount } from '../../../core/project/mounts.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Evaluation } from '../../../core/results.ts'
import { newId, newName } from '../../state/ids.ts'
import { firstType } from './plan-moves.ts'

/** The type that a further mount gets: that of the last one, else the first, else a new one. */
export function typeForNext(draft: Project, evaluation: Evaluation | null, count: number): string {
  const { placed, types } = draft.mounting
  const known = placed.at(-1)?.type ?? types[0]?.id
  if (known !== undefined) return known
  const mass = evaluation?.massSummary?.mass ?? null
  const type = firstType(types, mass, draft.machine.duty.runningSpeed, count)
  types.push(type)
  return type.id
}

/** Adds one mount, in place. @returns its id */
export function addMount(draft: Project, evaluation: Evaluation | null, position: Readonly<Vec3>): string {
  const type = typeForNext(draft, evaluation, 4)
  const { placed } = draft.mounting
  const id = newId('m', placed)
  placed.push({
    id,
    name: newName('M', placed),
    type,
    position: [...position],
    tilt: null,
    shim: 0,
    share: null,
  })
  return id
}

/**
 * Gives these mounts a type of the catalogue; the project keeps its own copy of it. Trying one
 * item after the other leaves no heap behind: copies of other items that nothing uses any more go,
 * and so does the guess that stood under the first mounts, where nobody has touched its figures.
 */
export function takeFromCatalogue(
  draft: Project,
  item: MountType,
  ids: readonly string[],
  catalogue: readonly MountType[],
  evaluation: Evaluation | null,
): void {
  const { mounting } = draft
  const standing = new Set(mounting.placed.map((mount) => mount.type))
  const own = mounting.types.find((type) => sameFigures(type, item))
  const id = own?.id ?? freeId(item.id, mounting.types)
  if (!own) mounting.types.push({ ...structuredClone(item), id })
  for (const mount of mounting.placed) if (ids.includes(mount.id)) mount.type = id
  const used = new Set(mounting.placed.map((mount) => mount.type))
  mounting.types = mounting.types.filter(
    (type) =>
      type.id === id ||
      used.has(type.id) ||
      !(
        catalogue.some((other) => sameFigures(other, type)) ||
        (standing.has(type.id) && isFirstGuess(type, draft, evaluation))
      ),
  )
}

function isFirstGuess(type: MountType, draft: Project, evaluation: Evaluation | null): boolean {
  const { placed } = draft.mounting
  const mass = evaluation?.massSummary?.mass ?? null
  return [4, placed.length].some((count) =>
    sameFigures({ ...firstType([], mass, draft.machine.duty.runningSpeed, count), name: type.name }, type),
  )
}

function freeId(wanted: string, types: readonly MountType[]): string {
  return types.some((type) => type.id === wanted) ? newId(`${wanted}-`, types) : wanted
}

/** Whether two types are the same but for their identifiers. */
export function sameFigures(a: MountType, b: MountType): boolean {
  return JSON.stringify({ ...a, id: '' }) === JSON.stringify({ ...b, id: '' })
}

/** The middle of the machine on the plan, at the level of the present mounts or the lowest point. */
export function middle(project: Project, evaluation: Evaluation | null, lowest: number): Vec3 {
  const cg = evaluation?.massSummary?.centreOfGravity ?? [0, 0, 0]
  const level = project.mounting.placed[0]?.position[2] ?? lowest
  return [cg[0], cg[1], level]
}

/** The nearest place along x, in these steps, where no mount stands yet [m]. */
export function freePlace(placed: readonly PlacedMount[], wanted: Readonly<Vec3>, step: number): Vec3 {
  const place: Vec3 = [...wanted]
  while (placed.some(({ position }) => Math.hypot(...position.map((p, i) => p - (place[i] ?? 0))) < step / 2))
    place[0] += step
  return place
}

/** Mounts named in a sentence: `M1, M2, M3`, or how many there are. */
export function nameMounts(mounts: readonly PlacedMount[]): string {
  if (mounts.length === 0) return 'no mount'
  if (mounts.length > 6) return `${mounts.length} mounts`
  return mounts.map((mount) => mount.name || mount.id).join(', ')
}
