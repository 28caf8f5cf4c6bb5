/**
 * A short elastic column that shears as well as it bends, under a compressive force: coil springs and
 * rubber blocks alike.
 * J. A. Haringx, On highly compressible helical springs and rubber rods, and their application for
 * vibration-free mountings, Philips Research Reports, 1948-49. For rubber: A. N. Gent, Elastic
 * stability of rubber compression springs, J. Mechanical Engineering Science 6, 1964.
 *
 * Symbols: P force, L length under load, B bending rigidity, S shear rigidity, q² = P (1 + P/S) / B,
 * z = q L / 2.
 */
export interface Column {
  /** under load [m] */
  readonly length: number
  /** [N m²] */
  readonly bendingRigidity: number
  /** [N] */
  readonly shearRigidity: number
}

/**
 * Stiffness against a sideways shift of one end that stays parallel to the other [N/m]:
 * P² / (2 q B tan z - P L), written so that nothing cancels when P goes to zero, where it is
 * 1 / (L/S + L³/(12 B)).
 * @param force compression [N], >= 0
 * @returns null where the column gives way sideways: its stiffness would be zero or negative
 */
export function transverseStiffness(column: Column, force: number): number | null {
  const { length, bendingRigidity, shearRigidity } = column
  const share = force / shearRigidity
  const half = (force * (1 + share) * length ** 2) / (4 * bendingRigidity)
  const z = Math.sqrt(half)
  if (!(z < Math.PI / 2)) return null
  const slant = z === 0 ? 1 : Math.tan(z) / z
  const compliance =
    length * (slant / shearRigidity + (excess(z) * (1 + share) * length ** 2) / (4 * bendingRigidity))
  return compliance > 0 && Number.isFinite(compliance) ? 1 / compliance : null
}

/** (tan z / z - 1) / z². */
function excess(z: number): number {
  // at 0.02 the series' next term, 62 z⁶ / 2835, and the rounding of the closed form are both 1e-12
  if (z < 0.02) return 1 / 3 + (2 * z ** 2) / 15 + (17 * z ** 4) / 315
  return (Math.tan(z) / z - 1) / z ** 2
}

/**
 * Force at which the column buckles without its length changing [N]: q L = pi / seating.
 * @param seating nu of EN 13906-1: 0.5 both ends guided, 1 one end free to move sideways but kept
 *   parallel, 2 one end free
 */
export function bucklingForce({ length, bendingRigidity, shearRigidity }: Column, seating: number): number {
  const euler = ((Math.PI / seating) ** 2 * bendingRigidity) / length ** 2
  // P (1 + P/S) = euler, in the form that keeps its digits when the column hardly shears
  return (2 * euler) / (1 + Math.sqrt(1 + (4 * euler) / shearRigidity))
}
