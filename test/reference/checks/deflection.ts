import { evaluate } from '../../../core/evaluate.ts'
import {
  deflectionForFrequency,
  frequencyFromDeflection,
  ratioForEfficiency,
  stiffnessForDeflection,
} from '../../../core/mounts/single-freedom.ts'
import type { Evaluation } from '../../../core/results.ts'
import { singleFreedomProject } from '../cases/single-freedom.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'A_sdof.json'
const MASS = 250

interface SagInputs {
  readonly static_deflection_m: number
  readonly g: number
}
interface SagExpected {
  readonly fn_Hz: number
  readonly fn_cpm: number
  readonly stiffness_for_250kg_N_per_m: number
}
interface EfficiencyInputs {
  readonly rpm?: number
  readonly efficiency: number
  readonly zeta?: number
  readonly eta?: number
  readonly g?: number
}
interface EfficiencyExpected {
  readonly r: number
  readonly fn_Hz?: number
  readonly static_deflection_m?: number
  readonly T?: number
  readonly attenuation_dB?: number
}

export const deflectionChecks: readonly Check[] = [
  ...casesOf<SagInputs, SagExpected>(FILE, 'A-SD').flatMap(sagChecks),
  ...casesOf<EfficiencyInputs, EfficiencyExpected>(FILE, 'A-EF').flatMap(efficiencyChecks),
]

function heave({ modes }: Evaluation): number {
  return modes?.find(({ name }) => name === 'heave')?.frequency ?? missing()
}

function sagChecks(given: ReferenceCase<SagInputs, SagExpected>): Check[] {
  const { static_deflection_m: sag, g } = given.inputs
  const { expected } = given
  const check = checkMaker(given)
  const stiffness = () => stiffnessForDeflection(MASS, sag, g)
  const result = once(() =>
    evaluate(
      singleFreedomProject({ mass: MASS, stiffness: stiffness(), source: { force: 1 }, speeds: [100] }),
    ),
  )
  return [
    check('natural frequency by formula', 'Hz', expected.fn_Hz, 'formula', () =>
      frequencyFromDeflection(sag, g),
    ),
    check('stiffness for 250 kg', 'N/m', expected.stiffness_for_250kg_N_per_m, 'formula', stiffness),
    check('natural frequency in heave', 'Hz', expected.fn_Hz, 'evaluate', () => heave(result())),
    check('natural frequency per minute', '1/min', expected.fn_cpm, 'evaluate', () => 60 * heave(result())),
    check(
      'static deflection of each mount',
      'm',
      sag,
      'evaluate',
      () => result().statics?.mounts[2]?.deflection ?? missing(),
    ),
  ]
}

function efficiencyChecks(given: ReferenceCase<EfficiencyInputs, EfficiencyExpected>): Check[] {
  const { rpm = 1200, efficiency, zeta = 0, eta, g } = given.inputs
  const { expected } = given
  const check = checkMaker(given)
  const ratio = () =>
    ratioForEfficiency(efficiency, eta === undefined ? { dampingRatio: zeta } : { lossFactor: eta })
  const speed = (rpm * 2 * Math.PI) / 60
  const frequency = () => rpm / 60 / ratio()
  const omega = () => 2 * Math.PI * frequency()
  const result = once(() =>
    evaluate(
      singleFreedomProject({
        mass: MASS,
        stiffness: MASS * omega() ** 2,
        viscous: eta === undefined ? 2 * zeta * MASS * omega() : 0,
        lossFactor: eta ?? 0,
        source: { force: 12 },
        speeds: [speed],
      }),
    ),
  )
  const running = () => result().response?.atSpeeds[0] ?? missing()
  const optional = (value: number | undefined, make: (value: number) => Check): readonly Check[] =>
    value === undefined ? [] : [make(value)]
  return [
    check('frequency ratio needed', '', expected.r, 'formula', ratio),
    ...optional(expected.fn_Hz, (value) =>
      check('natural frequency needed', 'Hz', value, 'evaluate', () => heave(result())),
    ),
    ...optional(expected.static_deflection_m, (value) =>
      check('static deflection needed, by formula', 'm', value, 'formula', () =>
        deflectionForFrequency(frequency(), g),
      ),
    ),
    ...optional(expected.static_deflection_m, (value) =>
      check(
        'static deflection',
        'm',
        value,
        'evaluate',
        () => result().statics?.mounts[0]?.deflection ?? missing(),
      ),
    ),
    ...optional(expected.T, (value) =>
      check('transmissibility', '', value, 'evaluate', () => running().forceRatio ?? missing()),
    ),
    ...optional(expected.attenuation_dB, (value) =>
      check(
        'attenuation',
        'dB',
        value,
        'evaluate',
        () => -20 * Math.log10(running().forceRatio ?? missing()),
      ),
    ),
    check(
      'isolation efficiency with that ratio',
      '',
      efficiency,
      'evaluate',
      () => running().isolationEfficiency ?? missing(),
    ),
  ]
}
