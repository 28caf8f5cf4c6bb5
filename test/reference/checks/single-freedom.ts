/** Group A: one freedom. Project results through `evaluate(project)`, the rest by formula or network. */
import type { Check } from '../check-type.ts'
import { decayChecks } from './decay.ts'
import { deflectionChecks } from './deflection.ts'
import { relaxationChecks } from './relaxation.ts'
import { transmissibilityChecks } from './transmissibility.ts'
import { unbalanceChecks } from './unbalance.ts'

export const singleFreedomChecks: readonly Check[] = [
  ...transmissibilityChecks,
  ...deflectionChecks,
  ...relaxationChecks,
  ...unbalanceChecks,
  ...decayChecks,
]
