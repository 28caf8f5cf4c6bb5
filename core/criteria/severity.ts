/**
 * Severity scales for broad-band RMS velocity on the non-rotating parts of machines.
 * The boundaries are tables of the named standards; they were written down from memory and are
 * marked so wherever they are shown. The standard itself decides: check it before you rely on a zone.
 */
export interface SeverityZone {
  readonly zone: string
  /** upper boundary of the zone, RMS velocity [m/s] */
  readonly limit: number
}

export interface SeverityClass {
  readonly id: string
  readonly name: string
  readonly zones: readonly SeverityZone[]
}

export interface SeverityScale {
  readonly id: 'iso10816-1' | 'iso20816-3' | 'iso14694'
  readonly name: string
  readonly source: string
  readonly provenance: 'from memory'
  readonly classes: readonly SeverityClass[]
}

const MM_PER_S = 1e-3

function machineClass(
  id: string,
  name: string,
  zones: readonly string[],
  limits: readonly number[],
): SeverityClass {
  return {
    id,
    name,
    zones: zones.map((zone, index) => ({
      zone,
      limit: Number(((limits[index] ?? Infinity) * MM_PER_S).toPrecision(12)),
    })),
  }
}

const ABC = ['A', 'B', 'C']
const FAN_STAGES = ['start-up', 'alarm']
const FAN_STAGES_WITH_SHUTDOWN = [...FAN_STAGES, 'shutdown']

export const severityScales: readonly SeverityScale[] = [
  {
    id: 'iso20816-3',
    name: 'ISO 20816-3, industrial machines',
    source: 'ISO 20816-3:2022 (zones as in ISO 10816-3:2009)',
    provenance: 'from memory',
    classes: [
      machineClass('1-rigid', 'Group 1, above 300 kW, rigid support', ABC, [2.3, 4.5, 7.1]),
      machineClass('1-flexible', 'Group 1, above 300 kW, flexible support', ABC, [3.5, 7.1, 11]),
      machineClass('2-rigid', 'Group 2, 15 to 300 kW, rigid support', ABC, [1.4, 2.8, 4.5]),
      machineClass('2-flexible', 'Group 2, 15 to 300 kW, flexible support', ABC, [2.3, 4.5, 7.1]),
    ],
  },
  {
    id: 'iso10816-1',
    name: 'ISO 10816-1, general machines',
    source: 'ISO 10816-1:1995 Annex B (withdrawn; followed by ISO 20816-1:2016)',
    provenance: 'from memory',
    classes: [
      machineClass('I', 'Class I, small, up to 15 kW', ABC, [0.71, 1.8, 4.5]),
      machineClass('II', 'Class II, medium, 15 to 75 kW', ABC, [1.12, 2.8, 7.1]),
      machineClass('III', 'Class III, large, rigid heavy foundation', ABC, [1.8, 4.5, 11.2]),
      machineClass('IV', 'Class IV, large, relatively soft foundation', ABC, [2.8, 7.1, 18]),
    ],
  },
  {
    id: 'iso14694',
    name: 'ISO 14694, industrial fans, measured in place',
    source: 'ISO 14694:2003',
    provenance: 'from memory',
    classes: [
      machineClass('BV-1 rigid', 'BV-1, rigid mounting', FAN_STAGES, [10, 10.6]),
      machineClass('BV-1 flexible', 'BV-1, flexible mounting', FAN_STAGES, [11.2, 14]),
      machineClass('BV-2 rigid', 'BV-2, rigid mounting', FAN_STAGES, [5.6, 9]),
      machineClass('BV-2 flexible', 'BV-2, flexible mounting', FAN_STAGES, [9, 14]),
      machineClass('BV-3 rigid', 'BV-3, rigid mounting', FAN_STAGES_WITH_SHUTDOWN, [4.5, 7.1, 9]),
      machineClass('BV-3 flexible', 'BV-3, flexible mounting', FAN_STAGES_WITH_SHUTDOWN, [6.3, 11.8, 12.5]),
      machineClass('BV-4 rigid', 'BV-4, rigid mounting', FAN_STAGES_WITH_SHUTDOWN, [2.8, 4.5, 7.1]),
      machineClass('BV-4 flexible', 'BV-4, flexible mounting', FAN_STAGES_WITH_SHUTDOWN, [4.5, 7.1, 11.2]),
      machineClass('BV-5 rigid', 'BV-5, rigid mounting', FAN_STAGES_WITH_SHUTDOWN, [1.8, 4, 5.6]),
      machineClass('BV-5 flexible', 'BV-5, flexible mounting', FAN_STAGES_WITH_SHUTDOWN, [2.8, 5.7, 7.1]),
    ],
  },
]

/** The limit of a zone, or null when scale, class or zone is not in the tables. */
export function severityLimit(scale: string, machineClassId: string, zone: string): number | null {
  const classes = severityScales.find((candidate) => candidate.id === scale)?.classes
  const zones = classes?.find((candidate) => candidate.id === machineClassId)?.zones
  return zones?.find((candidate) => candidate.zone === zone)?.limit ?? null
}

/** Zone in which an RMS velocity [m/s] falls; above the last boundary it has no acceptable zone. */
export function severityZone(zones: readonly SeverityZone[], velocity: number): string {
  return (
    zones.find((candidate) => velocity <= candidate.limit)?.zone ?? `above ${zones.at(-1)?.zone ?? 'all'}`
  )
}
