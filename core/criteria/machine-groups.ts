/**
 * Zone boundaries of ISO 10816-3 by machine group, as velocity and as displacement. Groups 3 and 4
 * (pumps) are of the edition of 1998; they moved to ISO 10816-7 in 2009. From memory; the
 * displacements are remembered with less certainty than the velocities.
 */
export interface MachineGroup {
  readonly group: 1 | 2 | 3 | 4
  readonly support: 'rigid' | 'flexible'
  /** upper boundaries of zones A, B, C: RMS velocity [m/s] */
  readonly velocity: readonly [number, number, number]
  /** the same as RMS displacement [m] */
  readonly displacement: readonly [number, number, number]
}

export const MACHINE_GROUP_SOURCE = {
  source: 'ISO 10816-3:1998 and 2009 (now ISO 20816-3:2022)',
  provenance: 'from memory',
} as const

const RIGID_ABOVE = 1.25

/**
 * Whether a support counts as rigid in a direction: its lowest natural frequency there lies at least
 * a quarter above the main exciting frequency.
 * @param naturalFrequency of machine and support together in the measuring direction [Hz]
 * @param excitingFrequency usually the rotational frequency [Hz]
 */
export function supportKind(naturalFrequency: number, excitingFrequency: number): MachineGroup['support'] {
  return naturalFrequency >= RIGID_ABOVE * excitingFrequency ? 'rigid' : 'flexible'
}

type Three = readonly [number, number, number]

function row(
  group: MachineGroup['group'],
  support: MachineGroup['support'],
  velocity: Three,
  displacement: Three,
): MachineGroup {
  return { group, support, velocity: scaled(velocity, 1e3), displacement: scaled(displacement, 1e6) }
}

function scaled([a, b, c]: Three, per: number): Three {
  return [a / per, b / per, c / per]
}

export const machineGroups: readonly MachineGroup[] = [
  row(1, 'rigid', [2.3, 4.5, 7.1], [29, 57, 90]),
  row(1, 'flexible', [3.5, 7.1, 11], [45, 90, 140]),
  row(2, 'rigid', [1.4, 2.8, 4.5], [22, 45, 71]),
  row(2, 'flexible', [2.3, 4.5, 7.1], [37, 71, 113]),
  row(3, 'rigid', [2.3, 4.5, 7.1], [18, 36, 56]),
  row(3, 'flexible', [3.5, 7.1, 11], [28, 56, 90]),
  row(4, 'rigid', [1.4, 2.8, 4.5], [11, 22, 36]),
  row(4, 'flexible', [2.3, 4.5, 7.1], [18, 36, 56]),
]
