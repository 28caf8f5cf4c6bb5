/**
 * A closed volume of gas behind an effective area: p Vⁿ = const, F = (p - p_atm) A.
 * C. M. Harris (ed.), Shock and Vibration Handbook (air springs). x counts in compression from the
 * design height; A(x) = A0 + A' x and V(x) = V0 - A0 x - A' x²/2.
 */
export interface GasColumn {
  /** absolute, at the design height [Pa] */
  readonly pressure: number
  /** absolute [Pa] */
  readonly atmosphere: number
  /** at the design height [m²] */
  readonly area: number
  /** A' [m] */
  readonly areaSlope: number
  /** bellows and auxiliary volume together, at the design height [m³] */
  readonly volume: number
}

export interface GasState {
  /** [N] */
  readonly force: number
  /** dF/dx for a further small motion with `further` as exponent [N/m] */
  readonly stiffness: number
  /** absolute [Pa] */
  readonly pressure: number
}

/** Compression that would leave no volume [m]; infinite where the area shrinks away first. */
export function emptyTravel({ area, areaSlope, volume }: GasColumn): number {
  if (areaSlope === 0) return volume / area
  const inside = area ** 2 + 2 * areaSlope * volume
  return inside < 0 ? Infinity : (2 * volume) / (area + Math.sqrt(inside))
}

/**
 * Force and stiffness at a compression.
 * @param compression [m], below `emptyTravel`
 * @param exponent of the change from the design height to here: 1 slow, 1.4 sudden
 * @param further exponent of the small motion about this state
 */
export function gasState(
  column: GasColumn,
  compression: number,
  exponent: number,
  further = exponent,
): GasState {
  const { atmosphere, areaSlope } = column
  const area = column.area + areaSlope * compression
  const volume = column.volume - column.area * compression - (areaSlope * compression ** 2) / 2
  const pressure = column.pressure * (column.volume / volume) ** exponent
  return {
    force: (pressure - atmosphere) * area,
    stiffness: (further * pressure * area ** 2) / volume + (pressure - atmosphere) * areaSlope,
    pressure,
  }
}
