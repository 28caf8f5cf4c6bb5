/**
 * Limits for the vibration of floors: generic curves for sensitive equipment and base curves for
 * people, RMS velocity by one-third octave against frequency.
 * [1] C. G. Gordon, Generic criteria for vibration-sensitive equipment, Proc. SPIE 1619, 1991;
 *     H. Amick, M. Gendreau, T. Busch and C. Gordon, Evolving criteria for research facilities:
 *     vibration, Proc. SPIE 5933, 2005 (VC-C to VC-G flat from 1 Hz is the later form).
 * [2] ISO 2631-2:1989, base curves and multiplying factors (withdrawn in the edition of 2003;
 *     also in BS 6472:1992).
 * All values were written down from memory and are marked so wherever they are shown: check them in
 * the source before you rely on them.
 */
import { InputError } from '../errors.ts'

export interface FloorCurve {
  readonly id: FloorCurveId
  readonly name: string
  /** what it is for, in words */
  readonly use: string
  readonly source: string
  readonly provenance: 'from memory'
  /** frequencies between which it is defined [Hz] */
  readonly band: readonly [low: number, high: number]
}

const FLOOR_CURVE_IDS = [
  'workshop',
  'office',
  'residentialDay',
  'operatingTheatre',
  'VC-A',
  'VC-B',
  'VC-C',
  'VC-D',
  'VC-E',
  'VC-F',
  'VC-G',
  'iso2631-z',
  'iso2631-xy',
  'iso2631-combined',
] as const
export type FloorCurveId = (typeof FLOOR_CURVE_IDS)[number]

type Limit = (frequency: number) => number
interface Entry extends Omit<FloorCurve, 'id' | 'provenance'> {
  /** RMS velocity [m/s] within the band */
  readonly limit: Limit
}

const GENERIC = 'Gordon, Proc. SPIE 1619, 1991; Amick and others, Proc. SPIE 5933, 2005'
const HUMAN = 'ISO 2631-2:1989 (values withdrawn in 2003)'
const MICRO = 1e-6

/** Constant velocity from 8 Hz up, constant acceleration below it. */
function generic(name: string, use: string, level: number): Entry {
  return {
    name,
    use,
    source: GENERIC,
    band: [4, 80],
    limit: (frequency) => MICRO * level * Math.max(1, 8 / frequency),
  }
}

function flat(name: string, use: string, level: number): Entry {
  return { name, use, source: GENERIC, band: [1, 80], limit: () => MICRO * level }
}

/** A base curve given as RMS acceleration [m/s²]. */
function base(name: string, use: string, acceleration: Limit): Entry {
  return {
    name,
    use,
    source: HUMAN,
    band: [1, 80],
    limit: (frequency) => acceleration(frequency) / (2 * Math.PI * frequency),
  }
}

const Z_LOW = 0.005
const XY_LOW = 0.0036

const CURVES: Readonly<Record<FloorCurveId, Entry>> = {
  workshop: generic('Workshop', 'distinctly felt; workshops and non-sensitive areas', 800),
  office: generic('Office', 'felt; offices', 400),
  residentialDay: generic('Dwelling by day', 'barely felt; computer equipment, optics up to 20×', 200),
  operatingTheatre: generic('Operating theatre', 'threshold of perception; optics up to 100×', 100),
  'VC-A': generic('VC-A', 'optics up to 400×, microbalances', 50),
  'VC-B': generic('VC-B', 'inspection and lithography down to 3 µm', 25),
  'VC-C': flat('VC-C', 'optics up to 1000×, lithography down to 1 µm', 12.5),
  'VC-D': flat('VC-D', 'electron microscopes and the most demanding electron-beam work', 6.25),
  'VC-E': flat('VC-E', 'long laser paths and the like; hard to reach', 3.12),
  'VC-F': flat('VC-F', 'extraordinarily quiet research space; for evaluation, not for design', 1.56),
  'VC-G': flat('VC-G', 'extraordinarily quiet research space; for evaluation, not for design', 0.78),
  'iso2631-z': base('ISO 2631-2, along the spine', 'people standing or sitting, vertical vibration', (f) => {
    if (f < 4) return (2 * Z_LOW) / Math.sqrt(f)
    return Z_LOW * Math.max(1, f / 8)
  }),
  'iso2631-xy': base(
    'ISO 2631-2, across the spine',
    'people standing or sitting, horizontal vibration',
    (f) => XY_LOW * Math.max(1, f / 2),
  ),
  'iso2631-combined': base('ISO 2631-2, any posture', 'people whose posture is not known', (f) => {
    if (f >= 8) return (Z_LOW * f) / 8
    return f <= 2 ? XY_LOW : XY_LOW + ((Z_LOW - XY_LOW) * (f - 2)) / 6
  }),
}

export const floorCurves: readonly FloorCurve[] = FLOOR_CURVE_IDS.map((id) => {
  const { name, use, source, band } = CURVES[id]
  return { id, name, use, source, provenance: 'from memory', band }
})

/**
 * The limit of a curve at a frequency.
 * @param curve a generic curve stands as it is; a base curve of ISO 2631-2 is multiplied by `factor`
 * @param frequency [Hz]
 * @param factor multiplying factor for place and time of day, see `multiplyingFactors`
 * @returns RMS velocity [m/s], null outside the curve's band
 * @example floorLimit('VC-A', 16) // 5e-5
 */
export function floorLimit(curve: FloorCurveId, frequency: number, factor = 1): number | null {
  if (!(factor > 0 && Number.isFinite(factor))) {
    throw new InputError('factor', factor, 'must be greater than 0')
  }
  const { band, limit } = CURVES[curve]
  if (!(frequency >= band[0] && frequency <= band[1])) return null
  return factor * limit(frequency)
}

/** A multiplying factor of ISO 2631-2:1989 for continuous or intermittent vibration. */
export interface MultiplyingFactor {
  readonly place: string
  readonly time: 'day' | 'night' | 'any'
  /** from the strictest to the loosest in use */
  readonly factor: readonly [least: number, most: number]
}

export const multiplyingFactors: readonly MultiplyingFactor[] = [
  { place: 'critical working areas', time: 'any', factor: [1, 1] },
  { place: 'dwellings', time: 'day', factor: [2, 4] },
  { place: 'dwellings', time: 'night', factor: [1.4, 1.4] },
  { place: 'offices', time: 'any', factor: [4, 4] },
  { place: 'workshops', time: 'any', factor: [8, 8] },
]
