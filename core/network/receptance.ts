import type { ComplexParts } from '../numerics/block-combine.ts'
import { unit } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import { readRow } from './block-reader.ts'
import { placeRow } from './kinematics.ts'
import type { Attachment } from './network.ts'
import { emptyLoad, respond, type ResponseSolver } from './response.ts'
import { addScaled } from './statics.ts'
import type { System } from './assemble.ts'

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
): ComplexParts {
  const row = placeRow(system.freedoms, place, unit(direction))
  const load = emptyLoad(solver.freedoms)
  addScaled(load.constantRe, row, 1)
  const curve = {
    re: new Float64Array(frequencies.length),
    im: new Float64Array(frequencies.length),
  }
  const omegas = frequencies.map((frequency) => 2 * Math.PI * frequency)
  respond(solver, omegas, [load], (block) => {
    readRow(row, block, curve, block.first)
  })
  return curve
}
