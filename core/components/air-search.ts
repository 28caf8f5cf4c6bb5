import { InputError } from '../errors.ts'
import { airDesignSchema, type AirDesign } from '../project/component-designs.ts'
import { analyseAir, type AirFigures } from './air-spring.ts'
import type { ComponentProblem } from './problem.ts'

/** What an air spring shall do; pressures, exponents and bellows as in `like`. */
export interface AirAim {
  /** vertical natural frequency of vibration under the load [Hz] */
  readonly frequency: number
  /** static load [N] */
  readonly load: number
  /** gauge pressure to work at [Pa]; left out: the area in `like` decides */
  readonly gaugePressure?: number
  readonly like: AirDesign
  /** [m/s²] */
  readonly gravity?: number
}

export interface AirSearch {
  readonly design: AirDesign | null
  readonly figures: AirFigures | null
  readonly problems: readonly ComponentProblem[]
  /** why there is none; empty when there is one */
  readonly reason: string
}

const none = (reason: string): AirSearch => ({ design: null, figures: null, problems: [], reason })

/**
 * An air spring of a wanted frequency: the load and the pressure give the effective area, the rate then
 * gives the volume V = n p A² / (k - (p - p_atm) dA/dx). Where the bellows' own volume is given, the
 * auxiliary volume makes up the rest; else the bellows have it all.
 * @throws InputError when the aim is not positive
 */
export function searchAir(aim: AirAim): AirSearch {
  const { frequency, load, like, gravity = 9.80665 } = aim
  if (!(frequency > 0)) throw new InputError('frequency', frequency, 'must be greater than 0')
  if (!(load > 0)) throw new InputError('load', load, 'must be greater than 0')
  if (aim.gaugePressure !== undefined && !(aim.gaugePressure > 0)) {
    throw new InputError('gaugePressure', aim.gaugePressure, 'must be greater than 0')
  }
  const area = aim.gaugePressure === undefined ? like.effectiveArea : load / aim.gaugePressure
  if (area === null) return none('Give the effective area, or the pressure to work at.')
  const gauge = load / area
  const rate = (load / gravity) * (2 * Math.PI * frequency) ** 2
  const byGas = rate / like.correction - gauge * like.areaSlope
  if (!(byGas > 0)) {
    return none('The growth of the effective area alone is stiffer than the wanted frequency allows.')
  }
  const volume = (like.exponent * (like.atmosphericPressure + gauge) * area ** 2) / byGas
  const bellows = like.bellowsVolume ?? volume
  if (bellows > volume * (1 + 1e-12)) {
    return none('The bellows alone hold more gas than the wanted frequency needs: it would be softer.')
  }
  const design = airDesignSchema.parse({
    ...like,
    load,
    effectiveArea: area,
    bellowsVolume: bellows,
    auxiliaryVolume: Math.max(0, volume - bellows),
  })
  return { design, ...analyseAir(design, gravity), reason: '' }
}
