import {
  dampingFromDecrement,
  decrementFromDecay,
  hystereticHalfPower,
  logDecrement,
  mobilityHalfPower,
  receptanceHalfPower,
} from '../../../core/mounts/decay.ts'
import { casesOf, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker } from './parts.ts'

const FILE = 'A_sdof.json'

interface DecayInputs {
  readonly zeta: number
  readonly n_cycles: number
}
interface DecayExpected {
  readonly delta: number
  readonly amplitude_ratio_per_cycle: number
  readonly amplitude_ratio_after_5_cycles: number
  readonly zeta_from_delta_exact: number
  readonly zeta_from_delta_small: number
}
interface HalfPowerExpected {
  readonly r1: number
  readonly r2: number
  readonly receptance_bandwidth: number
  readonly zeta_from_receptance_bandwidth_over_2: number
  readonly mobility_r1: number
  readonly mobility_r2: number
  readonly mobility_bandwidth: number
}
interface HystereticExpected {
  readonly r1: number
  readonly r2: number
  readonly eta_from_r2sq_minus_r1sq_over_2: number
}

export const decayChecks: readonly Check[] = [
  ...casesOf<DecayInputs, DecayExpected>(FILE, 'A-LD').flatMap(decrementChecks),
  ...casesOf<{ zeta: number }, HalfPowerExpected>(FILE, 'A-HP-').flatMap(halfPowerChecks),
  ...casesOf<{ eta: number }, HystereticExpected>(FILE, 'A-HPH').flatMap(hystereticChecks),
]

function decrementChecks(given: ReferenceCase<DecayInputs, DecayExpected>): Check[] {
  const { expected, inputs } = given
  const check = checkMaker(given)
  const delta = () => logDecrement(inputs.zeta)
  return [
    check('logarithmic decrement', '', expected.delta, 'formula', delta),
    check('amplitude ratio per cycle', '', expected.amplitude_ratio_per_cycle, 'formula', () =>
      Math.exp(delta()),
    ),
    check('amplitude ratio after the cycles', '', expected.amplitude_ratio_after_5_cycles, 'formula', () =>
      Math.exp(inputs.n_cycles * delta()),
    ),
    check('damping ratio from the decrement', '', expected.zeta_from_delta_exact, 'formula', () =>
      dampingFromDecrement(expected.delta),
    ),
    check('decrement from the decay', '', expected.delta, 'formula', () =>
      decrementFromDecay(expected.amplitude_ratio_after_5_cycles, inputs.n_cycles),
    ),
    check(
      'damping ratio from the decrement, small damping',
      '',
      expected.zeta_from_delta_small,
      'formula',
      () => delta() / (2 * Math.PI),
    ),
  ]
}

function halfPowerChecks(given: ReferenceCase<{ zeta: number }, HalfPowerExpected>): Check[] {
  const { expected } = given
  const check = checkMaker(given)
  const receptance = () => receptanceHalfPower(given.inputs.zeta)
  const mobility = () => mobilityHalfPower(given.inputs.zeta)
  const width = ([low, high]: readonly [number, number]) => high - low
  // a difference of two numbers near 1 keeps fewer digits than they have
  const ofDifference = 1e-11
  return [
    check('lower half-power point of receptance', '', expected.r1, 'formula', () => receptance()[0]),
    check('upper half-power point of receptance', '', expected.r2, 'formula', () => receptance()[1]),
    check(
      'receptance bandwidth',
      '',
      expected.receptance_bandwidth,
      'formula',
      () => width(receptance()),
      ofDifference,
    ),
    check(
      'damping ratio read from it',
      '',
      expected.zeta_from_receptance_bandwidth_over_2,
      'formula',
      () => width(receptance()) / 2,
      ofDifference,
    ),
    check('lower half-power point of mobility', '', expected.mobility_r1, 'formula', () => mobility()[0]),
    check('upper half-power point of mobility', '', expected.mobility_r2, 'formula', () => mobility()[1]),
    check(
      'mobility bandwidth',
      '',
      expected.mobility_bandwidth,
      'formula',
      () => width(mobility()),
      ofDifference,
    ),
  ]
}

function hystereticChecks(given: ReferenceCase<{ eta: number }, HystereticExpected>): Check[] {
  const { expected } = given
  const check = checkMaker(given)
  const points = () => hystereticHalfPower(given.inputs.eta)
  return [
    check('lower half-power point', '', expected.r1, 'formula', () => points()[0]),
    check('upper half-power point', '', expected.r2, 'formula', () => points()[1]),
    check('loss factor read from them', '', expected.eta_from_r2sq_minus_r1sq_over_2, 'formula', () => {
      const [low, high] = points()
      return (high ** 2 - low ** 2) / 2
    }),
  ]
}
