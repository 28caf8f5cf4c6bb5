/**
 * Receptance at the attachment with the absorber in place, H / (1 + H D_a) = 1 / (Z + D_a), with
 * Z = 1/H and the absorber's dynamic stiffness D_a = -m omega² S / (S - omega²), S = a + i omega beta,
 * a = omega_a², beta = c / m. Its logarithm L = -ln |Z + D_a|² comes with exact derivatives.
 * Source of the coupling: R. E. D. Bishop and D. C. Johnson, The Mechanics of Vibration, 1960.
 */

/** First and second derivatives by omega (w), a and beta (b). */
export interface CoupledJet {
  readonly value: number
  readonly w: number
  readonly a: number
  readonly b: number
  readonly ww: number
  readonly wa: number
  readonly wb: number
  readonly aa: number
  readonly ab: number
  readonly bb: number
}

/** Value of L only. `z` holds re and im of the dynamic stiffness at omega. */
export function coupledValue(
  zRe: number,
  zIm: number,
  omega: number,
  mass: number,
  a: number,
  beta: number,
): number {
  const x = omega * omega
  const eRe = a - x
  const eIm = omega * beta
  const scale = (mass * x * x) / (eRe * eRe + eIm * eIm)
  const re = zRe - mass * x - scale * eRe
  const im = zIm + scale * eIm
  return -Math.log(re * re + im * im)
}

/** @param z dynamic stiffness with two derivatives, as `dynamicStiffness` writes it */
export function coupledJet(
  z: Float64Array,
  omega: number,
  mass: number,
  a: number,
  beta: number,
): CoupledJet {
  const x = omega * omega
  const eRe = a - x
  const eIm = omega * beta
  const e2 = eRe * eRe + eIm * eIm
  // powers of 1/E, E = S - omega²
  const i1 = mul(eRe / e2, -eIm / e2, 1, 0)
  const i2 = mul(i1[0], i1[1], i1[0], i1[1])
  const i3 = mul(i2[0], i2[1], i1[0], i1[1])
  const ew: C = [-2 * omega, beta]
  const ewI2 = mul(ew[0], ew[1], i2[0], i2[1])
  const ewI3 = mul(ew[0], ew[1], i3[0], i3[1])
  const ew2I3 = mul(ew[0], ew[1], ewI3[0], ewI3[1])
  const m = mass
  const m3 = m * omega * x
  const m4 = m * x * x
  const w: C = [(z[0] ?? 0) - m * x - m4 * i1[0], (z[1] ?? 0) - m4 * i1[1]]
  const dw: C = [
    (z[2] ?? 0) - 2 * m * omega - 4 * m3 * i1[0] + m4 * ewI2[0],
    (z[3] ?? 0) - 4 * m3 * i1[1] + m4 * ewI2[1],
  ]
  const dww: C = [
    (z[4] ?? 0) - 2 * m - 12 * m * x * i1[0] + 8 * m3 * ewI2[0] - 2 * m4 * (i2[0] + ew2I3[0]),
    (z[5] ?? 0) - 12 * m * x * i1[1] + 8 * m3 * ewI2[1] - 2 * m4 * (i2[1] + ew2I3[1]),
  ]
  const da: C = [m4 * i2[0], m4 * i2[1]]
  const db: C = [-omega * da[1], omega * da[0]]
  const daa: C = [-2 * m4 * i3[0], -2 * m4 * i3[1]]
  const dab: C = [-omega * daa[1], omega * daa[0]]
  const dbb: C = [-x * daa[0], -x * daa[1]]
  const daw: C = [4 * m3 * i2[0] - 2 * m4 * ewI3[0], 4 * m3 * i2[1] - 2 * m4 * ewI3[1]]
  // d/dw of i omega D_a' = i (D_a' + omega d/dw D_a')
  const dbw: C = [-(da[1] + omega * daw[1]), da[0] + omega * daw[0]]

  const size = w[0] * w[0] + w[1] * w[1]
  const q = (v: C): C => [(v[0] * w[0] + v[1] * w[1]) / size, (v[1] * w[0] - v[0] * w[1]) / size]
  const [qw, qa, qb] = [q(dw), q(da), q(db)]
  const second = (v: C, one: C, other: C) => -2 * (q(v)[0] - (one[0] * other[0] - one[1] * other[1]))
  return {
    value: -Math.log(size),
    w: -2 * qw[0],
    a: -2 * qa[0],
    b: -2 * qb[0],
    ww: second(dww, qw, qw),
    wa: second(daw, qw, qa),
    wb: second(dbw, qw, qb),
    aa: second(daa, qa, qa),
    ab: second(dab, qa, qb),
    bb: second(dbb, qb, qb),
  }
}

type C = readonly [number, number]

function mul(ar: number, ai: number, br: number, bi: number): C {
  return [ar * br - ai * bi, ar * bi + ai * br]
}
