import type { Vec3 } from '../../../core/project/fields.ts'
import type { MountType, PlacedMount } from '../../../core/project/mounts.ts'
import type { UnitSystem } from '../../../core/units/dimensions.ts'
import { newId, newName } from '../../state/ids.ts'

const INCH = 0.0254
/** Nearer than this two mounts count as being at one place [m]. */
const SAME_PLACE = 1e-6

/** Steps of the grid on which mounts snap [m], with how they are called; 0 snaps to nothing. */
export const GRID_STEPS: Readonly<
  Record<UnitSystem, readonly { readonly step: number; readonly label: string }[]>
> = {
  SI: [
    { step: 0, label: 'no grid' },
    { step: 0.001, label: '1 mm' },
    { step: 0.005, label: '5 mm' },
    { step: 0.01, label: '10 mm' },
    { step: 0.025, label: '25 mm' },
    { step: 0.05, label: '50 mm' },
  ],
  US: [
    { step: 0, label: 'no grid' },
    { step: INCH / 8, label: '1/8 in' },
    { step: INCH / 4, label: '1/4 in' },
    { step: INCH / 2, label: '1/2 in' },
    { step: INCH, label: '1 in' },
    { step: 2 * INCH, label: '2 in' },
  ],
}
export const USUAL_GRID: Readonly<Record<UnitSystem, number>> = { SI: 0.01, US: INCH / 2 }

/** The nearest line of the grid. @param step [m]; 0 leaves the value as it is */
export function snap(value: number, step: number): number {
  return step === 0 ? value : Number((Math.round(value / step) * step).toPrecision(12))
}

/** Where each mount stands before it is moved. */
export function startPositions(placed: readonly PlacedMount[]): ReadonlyMap<string, Readonly<Vec3>> {
  return new Map(placed.map((mount) => [mount.id, mount.position]))
}

/** Moves these mounts on the plan, in place. */
export function moveMounts(
  placed: PlacedMount[],
  ids: readonly string[],
  starts: ReadonlyMap<string, Readonly<Vec3>>,
  shift: readonly [x: number, y: number],
): void {
  for (const mount of placed) {
    const start = starts.get(mount.id)
    if (!start || !ids.includes(mount.id)) continue
    mount.position = [tidy(start[0] + shift[0]), tidy(start[1] + shift[1]), start[2]]
  }
}

function tidy(value: number): number {
  return Number(value.toPrecision(12))
}

/**
 * Copies of these mounts on the other side of a line of the plan.
 * @param axis the coordinate that changes sign
 * @param about where the line lies on that axis [m]
 * @returns further mounts; none where one stands already
 */
export function mirroredMounts(
  placed: readonly PlacedMount[],
  ids: readonly string[],
  axis: 0 | 1,
  about: number,
): PlacedMount[] {
  const all = [...placed]
  for (const mount of placed) {
    if (!ids.includes(mount.id)) continue
    const position: Vec3 = [...mount.position]
    position[axis] = tidy(2 * about - position[axis])
    if (all.some((other) => distance(other.position, position) < SAME_PLACE)) continue
    all.push({
      ...mount,
      id: newId('m', all),
      name: newName('M', all),
      position,
      tilt: mount.tilt && { angle: mount.tilt.angle, axis: mirrorTurn(mount.tilt.axis, axis) },
    })
  }
  return all.slice(placed.length)
}

/** A turn seen in a mirror keeps its component along the normal and reverses the others. */
function mirrorTurn(turn: Readonly<Vec3>, normal: 0 | 1): Vec3 {
  return [normal === 0 ? turn[0] : 0 - turn[0], normal === 1 ? turn[1] : 0 - turn[1], 0 - turn[2]]
}

function distance(a: Readonly<Vec3>, b: Readonly<Vec3>): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])
}

export interface SettingOut {
  /** pairs along the length; two make four corners */
  readonly pairs: number
  /** between the first and the last pair [m] */
  readonly length: number
  /** between the two of a pair [m] */
  readonly width: number
  /** middle of the layout; its third part is the level of the mounts [m] */
  readonly centre: Readonly<Vec3>
  readonly type: string
}

/** Mounts in pairs, evenly along x and alike on both sides: M1 and M2 the first pair, and so on. */
export function setOutPairs({ pairs, length, width, centre, type }: SettingOut): PlacedMount[] {
  const placed: PlacedMount[] = []
  for (let pair = 0; pair < pairs; pair += 1) {
    const along = pairs === 1 ? 0 : -length / 2 + (pair * length) / (pairs - 1)
    for (const side of [-1, 1]) {
      const number = placed.length + 1
      placed.push({
        id: `m${number}`,
        name: `M${number}`,
        type,
        position: [tidy(centre[0] + along), tidy(centre[1] + (side * width) / 2), centre[2]],
        tilt: null,
        shim: 0,
        share: null,
      })
    }
  }
  return placed
}

/**
 * A type to begin with: springs that put heave at a third of the running speed (common practice,
 * no source), as far as mass and speed are known.
 * @param count mounts that will share the mass
 */
export function firstType(
  types: readonly MountType[],
  mass: number | null,
  speed: number | null,
  count: number,
): MountType {
  const wanted = mass === null || speed === null ? 1e5 : (mass * (speed / 3) ** 2) / count
  const stiffness = Number(wanted.toPrecision(2))
  return {
    id: newId('type', types),
    name: newName('Type ', types),
    kind: '',
    stiffness: [stiffness, stiffness, stiffness],
    law: { kind: 'linear' },
    design: null,
    dynamicRatio: 1,
    lossFactor: 0.05,
    viscous: [0, 0, 0],
    ratedLoad: null,
    leastLoad: null,
    deflectionLimit: null,
    snubberGap: null,
    stiffnessAtTemperature: null,
    height: null,
    price: null,
    note: '',
  }
}

/** Distinct values in rising order: where dimension lines begin and end. */
export function distinct(values: readonly number[]): number[] {
  return values
    .toSorted((a, b) => a - b)
    .filter((value, index, all) => index === 0 || value - (all[index - 1] ?? 0) > SAME_PLACE)
}
