/**
 * Cylindrical helical compression spring of round wire.
 * [1] A. M. Wahl, Mechanical Springs. [2] EN 13906-1, Cylindrical helical springs made from round
 * wire and bar, calculation and design, part 1 (formulas from memory). [3] haringx-column.ts.
 *
 * Symbols: d wire, D mean coil diameter, n active coils, w = D/d index, G and E moduli, R rate,
 * L0 free length, s deflection, L = L0 - s.
 * Validity [2]: 4 <= w <= 20, n >= 2, coils of small pitch.
 */
import { transverseStiffness, type Column } from './haringx-column.ts'

/** What a spring is; every figure known. */
export interface SpringGeometry {
  /** [m] */
  readonly wireDiameter: number
  /** mean [m] */
  readonly coilDiameter: number
  readonly activeCoils: number
  /** [Pa] */
  readonly shearModulus: number
  /** [Pa] */
  readonly youngsModulus: number
}

/** Axial rate R = G d⁴ / (8 D³ n) [N/m] [1]. */
export function springRate({ wireDiameter: d, coilDiameter: D, activeCoils, shearModulus }: SpringGeometry) {
  return (shearModulus * d ** 4) / (8 * D ** 3 * activeCoils)
}

/** Shear stress of a straight bar in torsion, 8 F D / (pi d³) [Pa]: how [2] judges static loads. */
export function shearStress(wireDiameter: number, coilDiameter: number, force: number): number {
  return (8 * force * coilDiameter) / (Math.PI * wireDiameter ** 3)
}

/** How much curvature raises the stress at the inside of the coil [1]: (4w - 1)/(4w - 4) + 0.615/w. */
export function wahlFactor(index: number): number {
  return (4 * index - 1) / (4 * index - 4) + 0.615 / index
}

/** The same by [2]: (w + 0.5) / (w - 0.75). */
export function bergstraesserFactor(index: number): number {
  return (index + 0.5) / (index - 0.75)
}

/** Length with all coils touching [m] [2]: n_t d with ground ends, (n_t + 1.5) d without. */
export function solidLength(
  wireDiameter: number,
  totalCoils: number,
  ends: 'closedGround' | 'closed',
): number {
  return wireDiameter * (ends === 'closedGround' ? totalCoils : totalCoils + 1.5)
}

/**
 * Sum of the clearances between coils that must be left under the largest static load [m] [2]:
 * cold formed n (0.0015 D²/d + 0.1 d), hot formed 0.02 n (D + d).
 */
export function leastClearance(
  { wireDiameter: d, coilDiameter: D, activeCoils }: SpringGeometry,
  forming: 'cold' | 'hot',
): number {
  return activeCoils * (forming === 'cold' ? (0.0015 * D ** 2) / d + 0.1 * d : 0.02 * (D + d))
}

/**
 * The spring as a column [3] under a deflection: S = R L E / G and B = R L D² / (2 (1 + 2 G/E)).
 * @param deflection [m], less than the free length
 */
export function springColumn(geometry: SpringGeometry, freeLength: number, deflection: number): Column {
  const length = freeLength - deflection
  const lengthwise = springRate(geometry) * length
  const g = geometry.shearModulus / geometry.youngsModulus
  return {
    length,
    shearRigidity: lengthwise / g,
    bendingRigidity: (lengthwise * geometry.coilDiameter ** 2) / (2 * (1 + 2 * g)),
  }
}

/**
 * Stiffness across the axis with parallel guided ends [N/m]. [2] gives the same as a ratio to R.
 * @returns null where the spring gives way sideways
 */
export function springLateralRate(
  geometry: SpringGeometry,
  freeLength: number,
  deflection: number,
): number | null {
  if (deflection >= freeLength) return null
  const force = springRate(geometry) * deflection
  return transverseStiffness(springColumn(geometry, freeLength, deflection), force)
}

/**
 * Deflection at which the spring buckles [m] [2]:
 * s_K / L0 = (1 - √(1 - (1 - G/E)/(0.5 + G/E) (pi D / (nu L0))²)) / (2 (1 - G/E)).
 * Whether it comes before the coils touch is for the caller to see.
 * @param seating nu
 * @returns null when it does not buckle at any deflection
 */
export function bucklingDeflection(
  geometry: SpringGeometry,
  freeLength: number,
  seating: number,
): number | null {
  const g = geometry.shearModulus / geometry.youngsModulus
  const slender = (Math.PI * geometry.coilDiameter) / (seating * freeLength)
  const inside = 1 - ((1 - g) / (0.5 + g)) * slender ** 2
  if (inside < 0) return null
  const share = (1 - Math.sqrt(inside)) / (2 * (1 - g))
  return share < 1 ? share * freeLength : null
}

/** Mass of the wire in the active coils [kg]: ρ (pi d²/4) (pi D n). */
export function activeMass(
  { wireDiameter: d, coilDiameter: D, activeCoils }: SpringGeometry,
  density: number,
) {
  return density * ((Math.PI * d ** 2) / 4) * Math.PI * D * activeCoils
}

/** First surge of the coils between two still ends [Hz] [1]: √(R/m) / 2; half of it with one end free. */
export function surgeFrequency(geometry: SpringGeometry, density: number): number {
  return Math.sqrt(springRate(geometry) / activeMass(geometry, density)) / 2
}
