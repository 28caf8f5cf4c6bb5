/** Group H: worked examples of textbooks on one freedom, recomputed; printed answers are from memory. */
import { evaluate } from '../../../core/evaluate.ts'
import { dampingFromDecrement, decrementFromDecay } from '../../../core/mounts/decay.ts'
import {
  displacementPeak,
  frequencyFromDeflection,
  ratioForEfficiency,
} from '../../../core/mounts/single-freedom.ts'
import { singleFreedomProject } from '../cases/single-freedom.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, magnitude, missing } from './parts.ts'

const FILE = 'H_textbook.json'
interface Computed {
  readonly computed: Readonly<Record<string, number>>
}
type Case<Inputs> = ReferenceCase<Inputs, Computed>

interface Unbalanced {
  readonly mass_kg: number
  readonly k_N_per_m: number
  readonly force_N: number
  readonly rpm: number
  readonly zeta: number
}
interface Fan {
  readonly mass_kg: number
  readonly rpm: number
  readonly T: number
  readonly n_springs: number
}

export const textbookChecks: readonly Check[] = [
  ...casesOf<Unbalanced, Computed>(FILE, 'H-THOMSON').flatMap(unbalancedMachine),
  ...casesOf<Fan, Computed>(FILE, 'H-RAO-02').flatMap(exhaustFan),
  ...casesOf<{ g: number }, Computed>(FILE, 'H-RULES').flatMap(rulesOfThumb),
  ...casesOf<{ ratio: number; n?: number }, Computed>(FILE, 'H-LOGDEC').flatMap(decay),
  ...casesOf<{ zeta: number }, Computed>(FILE, 'H-HALFPOWER').flatMap(quality),
]

function of({ expected }: Case<unknown>, name: string): number {
  return expected.computed[name] ?? missing()
}

function unbalancedMachine(given: Case<Unbalanced>): Check[] {
  const { mass_kg: mass, k_N_per_m: stiffness, force_N: force, rpm, zeta } = given.inputs
  const check = checkMaker(given)
  const result = once(() => {
    const project = singleFreedomProject({
      mass,
      stiffness,
      viscous: 2 * zeta * Math.sqrt(stiffness * mass),
      source: { force },
      speeds: [(rpm * 2 * Math.PI) / 60],
    })
    // the example reckons with 9.81 m/s²
    return evaluate({ ...project, analysis: { ...project.analysis, gravity: 9.81 } })
  })
  const running = () => result().response?.atSpeeds[0] ?? missing()
  const heave = () => result().modes?.find(({ name }) => name === 'heave') ?? missing()
  return [
    check(
      'static deflection',
      'm',
      of(given, 'static_deflection_m'),
      'evaluate',
      () => result().statics?.mounts[0]?.deflection ?? missing(),
    ),
    check('natural frequency', 'Hz', of(given, 'fn_Hz'), 'evaluate', () => heave().frequency),
    check('amplitude', 'm', of(given, 'X_m'), 'evaluate', () =>
      magnitude(running().orders[0]?.body[2] ?? missing()),
    ),
    check('transmissibility', '', of(given, 'T'), 'evaluate', () => running().forceRatio ?? missing()),
    check('transmitted force', 'N', of(given, 'F_transmitted_N'), 'evaluate', () => running().supportForce),
  ]
}

function exhaustFan(given: Case<Fan>): Check[] {
  const { mass_kg: mass, rpm, T, n_springs: springs } = given.inputs
  const check = checkMaker(given)
  const ratio = () => ratioForEfficiency(1 - T, { dampingRatio: 0 })
  const speed = (rpm * 2 * Math.PI) / 60
  const stiffness = () => mass * (speed / ratio()) ** 2
  const result = once(() =>
    evaluate(singleFreedomProject({ mass, stiffness: stiffness(), source: { force: 1 }, speeds: [speed] })),
  )
  return [
    check('frequency ratio', '', of(given, 'r'), 'formula', ratio),
    check('stiffness of all springs', 'N/m', of(given, 'k_total_N_per_m'), 'formula', stiffness),
    check(
      'stiffness of one spring',
      'N/m',
      of(given, 'k_each_N_per_m'),
      'formula',
      () => stiffness() / springs,
    ),
    check(
      'transmissibility with them',
      '',
      T,
      'evaluate',
      () => result().response?.atSpeeds[0]?.forceRatio ?? missing(),
    ),
  ]
}

function rulesOfThumb(given: Case<{ g: number }>): Check[] {
  const check = checkMaker(given)
  const { g } = given.inputs
  return [
    check('f √δ with δ in mm', 'Hz √mm', of(given, 'coef_mm_Hz'), 'formula', () =>
      frequencyFromDeflection(0.001, g),
    ),
    check('f √δ with δ in inches', 'Hz √in', of(given, 'coef_inch_Hz'), 'formula', () =>
      frequencyFromDeflection(0.0254, g),
    ),
    check(
      'the same per minute',
      '√in / min',
      of(given, 'coef_inch_cpm'),
      'formula',
      () => 60 * frequencyFromDeflection(0.0254, g),
    ),
  ]
}

function decay(given: Case<{ ratio: number; n?: number }>): Check[] {
  const check = checkMaker(given)
  const delta = () => decrementFromDecay(1 / given.inputs.ratio, given.inputs.n ?? 1)
  return [
    check('logarithmic decrement', '', of(given, 'delta'), 'formula', delta),
    check('damping ratio', '', of(given, 'zeta'), 'formula', () => dampingFromDecrement(delta())),
  ]
}

function quality(given: Case<{ zeta: number }>): Check[] {
  const check = checkMaker(given)
  return [
    check(
      'height of the peak',
      '',
      of(given, 'Q'),
      'formula',
      () => displacementPeak(given.inputs.zeta)?.height ?? missing(),
    ),
  ]
}
