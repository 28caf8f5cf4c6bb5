import { evaluate } from '../../../core/evaluate.ts'
import { displacementPeak, transmissibilityPeak, unbalancePeak } from '../../../core/mounts/single-freedom.ts'
import type { Complex, OrderResponse } from '../../../core/results.ts'
import { singleFreedomProject } from '../cases/single-freedom.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, magnitude, missing, phaseNear, quotient } from './parts.ts'

const FILE = 'A_sdof.json'
const MASS = 180
const OMEGA = 2 * Math.PI * 6.5
const STIFFNESS = MASS * OMEGA ** 2
const FORCE = 37

interface CurveInputs {
  readonly zeta?: number
  readonly eta?: number
  readonly r: readonly number[]
}
interface CurveExpected {
  readonly T_mag: readonly number[]
  readonly T_phase_deg: readonly number[]
  readonly magnification: readonly number[]
  readonly magnification_phase_deg: readonly number[]
  readonly T_peak_at_r_1?: number
}
interface PeakExpected {
  readonly r_peak_T: number
  readonly T_peak: number
  readonly r_peak_displacement_force: number
  readonly magnification_peak: number
  readonly r_peak_displacement_unbalance: number
  readonly unbalance_peak_MX_over_me: number
}

export const transmissibilityChecks: readonly Check[] = [
  ...casesOf<CurveInputs, CurveExpected>(FILE, 'A-TV-').flatMap(curveChecks),
  ...casesOf<CurveInputs, CurveExpected>(FILE, 'A-TH-').flatMap(curveChecks),
  ...casesOf<{ zeta: number; r: number }, { T_re: number; T_im: number; T_mag: number }>(
    FILE,
    'A-TVT',
  ).flatMap(complexChecks),
  ...casesOf<{ zeta: number }, PeakExpected>(FILE, 'A-PK').flatMap(peakChecks),
]

type Damping = Pick<CurveInputs, 'zeta' | 'eta'>

/** Response at frequency ratios, through a whole project. */
function responses(
  { zeta = 0, eta = 0 }: Damping,
  ratios: readonly number[],
  source: { readonly force: number } | { readonly unbalance: number } = { force: FORCE },
): () => readonly OrderResponse[] {
  return once(() => {
    const { response } = evaluate(
      singleFreedomProject({
        mass: MASS,
        stiffness: STIFFNESS,
        viscous: 2 * zeta * MASS * OMEGA,
        lossFactor: eta,
        source,
        speeds: ratios.map((r) => r * OMEGA),
      }),
    )
    return (response ?? missing()).atSpeeds.map(({ orders }) => orders[0] ?? missing())
  })
}

const transmitted = ({ support, excitation }: OrderResponse): Complex => quotient(support[2], excitation[2])
const magnified = ({ body, excitation }: OrderResponse): Complex => {
  const compliance = quotient(body[2], excitation[2])
  return { re: STIFFNESS * compliance.re, im: STIFFNESS * compliance.im }
}

function curveChecks(given: ReferenceCase<CurveInputs, CurveExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const degrees = Number(given.tolerance['abs_deg'] ?? 1e-6) // hysteretic cases state none; same digits
  const all = responses(inputs, inputs.r)
  const at = (index: number) => all()[index] ?? missing()
  const curves = inputs.r.flatMap((r, k) => {
    const [tMag, tPhase] = [expected.T_mag[k] ?? missing(), expected.T_phase_deg[k] ?? missing()]
    const [mMag, mPhase] = [
      expected.magnification[k] ?? missing(),
      expected.magnification_phase_deg[k] ?? missing(),
    ]
    return [
      check(`transmissibility at r = ${r}`, '', tMag, 'evaluate', () => magnitude(transmitted(at(k)))),
      check(
        `its phase at r = ${r}`,
        '°',
        tPhase,
        'evaluate',
        () => phaseNear(transmitted(at(k)), tPhase),
        degrees,
      ),
      check(`magnification at r = ${r}`, '', mMag, 'evaluate', () => magnitude(magnified(at(k)))),
      check(
        `phase of magnification at r = ${r}`,
        '°',
        mPhase,
        'evaluate',
        () => phaseNear(magnified(at(k)), mPhase),
        degrees,
      ),
    ]
  })
  if (expected.T_peak_at_r_1 === undefined) return curves
  const peak = responses(inputs, [1])
  return [
    ...curves,
    check('transmissibility peak', '', expected.T_peak_at_r_1, 'evaluate', () =>
      magnitude(transmitted(peak()[0] ?? missing())),
    ),
  ]
}

/** Support motion passes to the mass as the force on the mass passes to the support. */
function complexChecks(
  given: ReferenceCase<{ zeta: number; r: number }, { T_re: number; T_im: number; T_mag: number }>,
): Check[] {
  const check = checkMaker(given)
  const all = responses({ zeta: given.inputs.zeta }, [given.inputs.r])
  const value = () => transmitted(all()[0] ?? missing())
  return [
    check('transmissibility, real part', '', given.expected.T_re, 'evaluate', () => value().re),
    check('transmissibility, imaginary part', '', given.expected.T_im, 'evaluate', () => value().im),
    check('transmissibility', '', given.expected.T_mag, 'evaluate', () => magnitude(value())),
  ]
}

function peakChecks(given: ReferenceCase<{ zeta: number }, PeakExpected>): Check[] {
  const { zeta } = given.inputs
  const { expected } = given
  const check = checkMaker(given)
  const force = responses({ zeta }, [expected.r_peak_T, expected.r_peak_displacement_force])
  const unbalance = responses({ zeta }, [expected.r_peak_displacement_unbalance], { unbalance: 0.04 })
  return [
    check(
      'r of the transmissibility peak',
      '',
      expected.r_peak_T,
      'formula',
      () => transmissibilityPeak(zeta).at,
    ),
    check('transmissibility peak', '', expected.T_peak, 'formula', () => transmissibilityPeak(zeta).height),
    check('transmissibility at that r', '', expected.T_peak, 'evaluate', () =>
      magnitude(transmitted(force()[0] ?? missing())),
    ),
    check(
      'r of the displacement peak under a force',
      '',
      expected.r_peak_displacement_force,
      'formula',
      () => displacementPeak(zeta)?.at ?? missing(),
    ),
    check('magnification at that r', '', expected.magnification_peak, 'evaluate', () =>
      magnitude(magnified(force()[1] ?? missing())),
    ),
    check(
      'r of the displacement peak under unbalance',
      '',
      expected.r_peak_displacement_unbalance,
      'formula',
      () => unbalancePeak(zeta)?.at ?? missing(),
    ),
    check('m X / U at that r', '', expected.unbalance_peak_MX_over_me, 'evaluate', () => {
      const { body } = unbalance()[0] ?? missing()
      return (MASS * magnitude(body[2])) / 0.04
    }),
  ]
}
