import type { Mounting, MountType, PlacedMount } from '../../../core/project/mounts.ts'
import type { Project } from '../../../core/project/project.ts'
import type { MountStatics } from '../../../core/statics-results.ts'
import type { UnitSystem } from '../../../core/units/dimensions.ts'
import { formatNumber } from '../../../core/units/format.ts'
import type { Column } from '../../components/table-columns.ts'

const AXES = ['x', 'y', 'z'] as const
const TILTS = { none: null, x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] } as const
type TiltChoice = keyof typeof TILTS | 'own'

function mountOf(draft: Project, index: number): PlacedMount | undefined {
  return draft.mounting.placed[index]
}

export function tiltChoice({ tilt }: PlacedMount): TiltChoice {
  if (tilt === null) return 'none'
  const index = tilt.axis.findIndex((part) => part !== 0)
  const alone = tilt.axis.filter((part) => part !== 0).length === 1 && (tilt.axis[index] ?? 0) > 0
  return alone ? (AXES[index] ?? 'own') : 'own'
}

/**
 * @param statics by mount id; missing while they are not known
 * @param setting how the machine is set: it decides whether packing is typed or read
 */
export function mountColumns(
  types: readonly MountType[],
  statics: ReadonlyMap<string, MountStatics>,
  units: UnitSystem,
  setting: Mounting['setting'],
): Column<PlacedMount>[] {
  return [
    {
      kind: 'text',
      key: 'name',
      title: 'Mark',
      width: '3rem',
      path: 'name',
      get: (mount) => mount.name,
      set: (draft, index, value) => {
        const mount = mountOf(draft, index)
        if (mount) mount.name = value
      },
    },
    {
      kind: 'choice',
      key: 'type',
      title: 'Type',
      width: '6.75rem',
      path: 'type',
      options: types.map((type) => ({ value: type.id, label: type.name || type.id })),
      get: (mount) => mount.type,
      set: (draft, index, value) => {
        const mount = mountOf(draft, index)
        if (mount) mount.type = value
      },
    },
    ...AXES.map((axis, position): Column<PlacedMount> => ({
      kind: 'quantity',
      key: axis,
      title: axis,
      group: 'Position',
      dimension: 'length',
      width: '3.25rem',
      path: `position[${position}]`,
      get: (mount) => mount.position[position] ?? 0,
      set: (draft, index, value) => {
        const mount = mountOf(draft, index)
        if (mount && value !== null) mount.position[position] = value
      },
    })),
    {
      kind: 'choice',
      key: 'tilt',
      title: 'about',
      hint: 'Tilted about',
      width: '4.25rem',
      group: 'Tilt',
      path: 'tilt',
      options: [
        { value: 'none', label: 'none' },
        ...AXES.map((axis) => ({ value: axis, label: axis })),
        { value: 'own', label: 'slanting' },
      ],
      get: tiltChoice,
      set: (draft, index, value) => {
        const mount = mountOf(draft, index)
        if (!mount) return
        const axis = value in TILTS ? TILTS[value as keyof typeof TILTS] : null // checked just before
        if (value === 'none') mount.tilt = null
        else mount.tilt = { axis: axis ? [...axis] : [1, 1, 0], angle: mount.tilt?.angle ?? 0 }
      },
    },
    {
      kind: 'quantity',
      key: 'angle',
      title: 'angle',
      hint: 'Tilt angle',
      group: 'Tilt',
      dimension: 'angle',
      width: '3.25rem',
      path: 'tilt.angle',
      get: (mount) => mount.tilt?.angle,
      set: (draft, index, value) => {
        const tilt = mountOf(draft, index)?.tilt
        if (tilt && value !== null) tilt.angle = value
      },
    },
    ...settingColumns(statics, units, setting),
    {
      kind: 'value',
      key: 'load',
      title: 'Load',
      hint: 'Static load',
      group: 'At rest',
      numeric: true,
      dimension: 'force',
      text: (mount) => formatNumber(statics.get(mount.id)?.load, 'force', units),
      refused: (mount) => (statics.get(mount.id)?.load ?? 0) < 0,
    },
    {
      kind: 'value',
      key: 'share',
      title: 'Rated',
      hint: 'Share of the rated load',
      group: 'At rest',
      numeric: true,
      dimension: 'share',
      text: (mount) => formatNumber(statics.get(mount.id)?.ratedShare, 'share', units, 3),
      refused: (mount) => (statics.get(mount.id)?.ratedShare ?? 0) > 1,
    },
    {
      kind: 'value',
      key: 'deflection',
      title: 'Sinks',
      hint: 'Static deflection',
      group: 'At rest',
      numeric: true,
      dimension: 'deflection',
      text: (mount) => formatNumber(statics.get(mount.id)?.deflection, 'deflection', units, 3),
      refused: (mount) => (statics.get(mount.id)?.limitShare ?? 0) > 1,
    },
  ]
}

/** Packing as built, or what levelling aims at and asks for. */
function settingColumns(
  statics: ReadonlyMap<string, MountStatics>,
  units: UnitSystem,
  setting: Mounting['setting'],
): Column<PlacedMount>[] {
  if (setting.kind === 'asBuilt') {
    return [
      {
        kind: 'quantity',
        key: 'shim',
        title: 'under',
        hint: 'Packing under the mount',
        group: 'Packing',
        dimension: 'deflection',
        width: '4rem',
        path: 'shim',
        get: (mount) => mount.shim,
        set: (draft, index, value) => {
          const mount = mountOf(draft, index)
          if (mount && value !== null) mount.shim = value
        },
      },
    ]
  }
  return [
    ...(setting.by === 'givenShares'
      ? [
          {
            kind: 'quantity' as const,
            key: 'wishedShare',
            title: 'Share',
            hint: 'Share of the weight aimed at',
            group: 'Set level',
            dimension: 'share' as const,
            width: '4rem',
            path: 'share',
            optional: true,
            placeholder: 'rest',
            get: (mount: PlacedMount) => mount.share,
            set: (draft: Project, index: number, value: number | null) => {
              const mount = mountOf(draft, index)
              if (mount) mount.share = value
            },
          },
        ]
      : []),
    {
      kind: 'value',
      key: 'shim',
      title: 'Packing',
      hint: 'Packing that sets it level',
      group: 'Set level',
      numeric: true,
      dimension: 'deflection',
      text: (mount) => formatNumber(statics.get(mount.id)?.shim, 'deflection', units, 3),
    },
  ]
}
