/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays sized by construction */
import type { Observed } from '../excitation/observed.ts'

/** The mode by which a mounting is named: that with the largest share of vertical motion of the machine. */
export interface ReferenceMode {
  readonly index: number
  /** [Hz] */
  readonly frequency: number
}

/** @param vertical freedom along z among the machine's six */
export function referenceMode({ solver, system, machineFreedom }: Observed): ReferenceMode {
  const n = solver.freedoms
  const vertical = machineFreedom + 2
  let index = 0
  let most = -Infinity
  for (let r = 0; r < n; r++) {
    let momentum = 0
    for (let i = 0; i < n; i++) momentum += system.mass[vertical * n + i]! * solver.shapes[r * n + i]!
    const share = momentum * solver.shapes[r * n + vertical]!
    if (share <= most) continue
    most = share
    index = r
  }
  return { index, frequency: Math.sqrt(solver.omegaSquared[index]!) / (2 * Math.PI) }
}
