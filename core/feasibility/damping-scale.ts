/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within square matrices by construction */
import type { Observed } from '../excitation/observed.ts'
import { addProduct, type AssembledElement } from '../network/assemble.ts'
import { isUncoupled } from '../network/damped-modes.ts'
import { steadyPart } from '../network/laws.ts'
import { modalMatrix } from '../network/modes.ts'

/** What the mounts alone add to the damping of a network, so that it can be scaled without a new assembly. */
export interface MountDamping {
  readonly observed: Observed
  /** of the freedoms */
  readonly viscous: Float64Array
  readonly hysteretic: Float64Array
  /** of the modes */
  readonly modalViscous: Float64Array
  readonly modalHysteretic: Float64Array
}

export function mountDamping(observed: Observed): MountDamping {
  const { freedoms, omegaSquared, shapes } = observed.solver
  const viscous = new Float64Array(freedoms * freedoms)
  const hysteretic = new Float64Array(freedoms * freedoms)
  for (const { branches } of observed.supports) {
    for (const { law, row } of branches) {
      const part = steadyPart(law)
      addProduct(viscous, freedoms, row, part.viscous)
      addProduct(hysteretic, freedoms, row, part.hysteretic)
    }
  }
  const modes = { count: freedoms, omegaSquared, shapes }
  return {
    observed,
    viscous,
    hysteretic,
    modalViscous: modalMatrix(viscous, modes),
    modalHysteretic: modalMatrix(hysteretic, modes),
  }
}

/** The same network with the mounts' loss factors and viscous coefficients times a factor. */
export function withDampingTimes(
  { observed, viscous, hysteretic, modalViscous, modalHysteretic }: MountDamping,
  factor: number,
): Observed {
  const { system, solver } = observed
  const more = (whole: Float64Array, mounts: Float64Array) =>
    whole.map((value, at) => value + (factor - 1) * mounts[at]!)
  const supports = observed.supports.map((element) => scaled(element, factor))
  const byElement = new Map(observed.supports.map((element, index) => [element, supports[index]!]))
  const modal = {
    viscous: more(solver.viscous, modalViscous),
    hysteretic: more(solver.hysteretic, modalHysteretic),
  }
  return {
    ...observed,
    supports,
    system: {
      ...system,
      viscous: more(system.viscous, viscous),
      hysteretic: more(system.hysteretic, hysteretic),
      elements: system.elements.map((element) => byElement.get(element) ?? element),
    },
    solver: {
      ...solver,
      ...modal,
      uncoupled:
        isUncoupled(modal.viscous, solver.freedoms) &&
        isUncoupled(modal.hysteretic, solver.freedoms) &&
        system.varying.length === 0,
    },
  }
}

function scaled(element: AssembledElement, factor: number): AssembledElement {
  return {
    ...element,
    branches: element.branches.map((assembled) => {
      const { law } = assembled
      if (law.kind !== 'springDamper') return assembled
      return {
        ...assembled,
        law: { ...law, lossFactor: law.lossFactor * factor, viscous: law.viscous * factor },
      }
    }),
  }
}

/** Share of critical damping that all dampers give mode r, as if it were alone. */
export function modalRatio({ solver }: Observed, r: number): number {
  const n = solver.freedoms
  const omega = Math.sqrt(solver.omegaSquared[r]!)
  return (solver.viscous[r * n + r]! + solver.hysteretic[r * n + r]! / omega) / (2 * omega)
}
