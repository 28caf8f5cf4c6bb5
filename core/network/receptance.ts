import { unit } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import { placeRow } from './kinematics.ts'
import type { Attachment } from './network.ts'
import { BLOCK, emptyLoad, respond, type ResponseSolver } from './response.ts'
import { addScaled } from './statics.ts'
import type { System } from './assemble.ts'

/** A complex curve, real and imaginary parts apart. */
export interface ComplexCurve {
  readonly re: Float64Array
  readonly im: Float64Array
}

/**
 * Drive-point receptance: displacement along `direction` at a place per unit harmonic force there [m/N].
 * @param direction any length but zero; used as a unit vector
 * @param frequencies [Hz]
 */
export function pointReceptance(
  system: System,
  solver: ResponseSolver,
  place: Attachment,
  direction: Readonly<Vec3>,
  frequencies: Float64Array,
): ComplexCurve {
  const row = placeRow(system.freedoms, place, unit(direction))
  const load = emptyLoad(solver.freedoms)
  addScaled(load.constantRe, row, 1)
  const curve = {
    re: new Float64Array(frequencies.length),
    im: new Float64Array(frequencies.length),
  }
  const omegas = frequencies.map((frequency) => 2 * Math.PI * frequency)
  respond(solver, omegas, [load], ({ first, count, re, im }) => {
    for (let f = 0; f < count; f++) {
      let real = 0
      let imaginary = 0
      for (let k = 0; k < row.indices.length; k++) {
        const at = (row.indices[k] ?? 0) * BLOCK + f
        real += (row.values[k] ?? 0) * (re[at] ?? 0)
        imaginary += (row.values[k] ?? 0) * (im[at] ?? 0)
      }
      curve.re[first + f] = real
      curve.im[first + f] = imaginary
    }
  })
  return curve
}
