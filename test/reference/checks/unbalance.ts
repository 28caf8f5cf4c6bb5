import { evaluate } from '../../../core/evaluate.ts'
import { singleFreedomProject } from '../cases/single-freedom.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, magnitude, missing, phaseNear, quotient } from './parts.ts'

interface Inputs {
  readonly mass_kg: number
  readonly unbalance_kg_m: number
  readonly rpm: number
  readonly fn_Hz: number
  readonly zeta: number
}
interface Expected {
  readonly force_N: number
  readonly X_m: number
  readonly X_phase_deg: number
  readonly velocity_rms_mm_s: number
  readonly F_transmitted_N: number
  readonly T: number
  readonly static_deflection_m: number
}

export const unbalanceChecks: readonly Check[] = [
  ...casesOf<Inputs, Expected>('A_sdof.json', 'A-UN').flatMap(unbalanceCase),
]

/** The vertical component of a rotating unbalance on one vertical freedom. */
function unbalanceCase(given: ReferenceCase<Inputs, Expected>): Check[] {
  const { mass_kg: mass, unbalance_kg_m: unbalance, rpm, fn_Hz, zeta } = given.inputs
  const { expected } = given
  const omega = 2 * Math.PI * fn_Hz
  const check = checkMaker(given)
  const result = once(() =>
    evaluate(
      singleFreedomProject({
        mass,
        stiffness: mass * omega ** 2,
        viscous: 2 * zeta * mass * omega,
        source: { unbalance },
        speeds: [(rpm * 2 * Math.PI) / 60],
      }),
    ),
  )
  const running = () => result().response?.atSpeeds[0] ?? missing()
  const order = () => running().orders[0] ?? missing()
  return [
    check('exciting force', 'N', expected.force_N, 'evaluate', () => magnitude(order().excitation[2])),
    check(
      'exciting force in the summary',
      'N',
      expected.force_N,
      'evaluate',
      () => result().sourceSummaries[0]?.amplitude ?? missing(),
    ),
    check('amplitude', 'm', expected.X_m, 'evaluate', () => magnitude(order().body[2])),
    check('phase of the amplitude against the force', '°', expected.X_phase_deg, 'evaluate', () =>
      phaseNear(quotient(order().body[2], order().excitation[2]), expected.X_phase_deg),
    ),
    check(
      'RMS velocity',
      'mm/s',
      expected.velocity_rms_mm_s,
      'evaluate',
      () => 1000 * (running().pointVelocity[0]?.[2] ?? missing()),
    ),
    check('transmitted force', 'N', expected.F_transmitted_N, 'evaluate', () =>
      magnitude(order().support[2]),
    ),
    check('transmissibility', '', expected.T, 'evaluate', () =>
      magnitude(quotient(order().support[2], order().excitation[2])),
    ),
    check(
      'static deflection',
      'm',
      expected.static_deflection_m,
      'evaluate',
      () => result().statics?.mounts[0]?.deflection ?? missing(),
    ),
  ]
}
