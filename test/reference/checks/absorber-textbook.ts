/** Worked examples of handbooks: recomputed to full precision, and the printed answer as remembered. */
import { hostMassFromTrial, massRatioForSplit } from '../../../core/absorber/running-speed.ts'
import { evaluate } from '../../../core/evaluate.ts'
import type { AbsorberResult } from '../../../core/results.ts'
import { absorberProject, HOST } from '../cases/absorber.ts'
import { casesOf, once, sourceOf, type Check, type ReferenceCase } from '../check-type.ts'

const FILE = 'H_textbook.json'

interface DenHartog {
  readonly computed: Readonly<
    Record<'f' | 'c_over_cc' | 'zeta_own' | 'peak' | 'split_low' | 'split_high', number>
  >
  readonly book_answer_from_memory: Readonly<
    Partial<Record<'f' | 'c_over_cc' | 'peak' | 'split_low' | 'split_high', number>>
  >
}
interface RaoInputs {
  readonly trial_mass_kg: number
  readonly tuned_rpm: number
  readonly lower_split_rpm: number
  readonly wanted_lower_rpm: number
}
interface Rao {
  readonly computed: Readonly<
    Record<
      'mu_trial' | 'host_mass_kg' | 'mu_final' | 'absorber_mass_kg' | 'absorber_k_N_per_m' | 'upper_rpm',
      number
    >
  >
  readonly book_answer_from_memory: Readonly<
    Record<'host_mass_kg' | 'absorber_mass_kg' | 'upper_rpm', number>
  >
}
type Row = readonly [
  quantity: string,
  unit: string,
  expected: number,
  tolerance: number,
  through: Check['through'],
  ours: () => number | undefined,
]

export const absorberTextbookChecks: readonly Check[] = [
  ...casesOf<{ mu: number }, DenHartog>(FILE, 'H-DENHARTOG').flatMap(denHartogChecks),
  ...casesOf<RaoInputs, Rao>(FILE, 'H-RAO-04').flatMap(raoChecks),
]

function denHartogChecks(given: ReferenceCase<{ mu: number }, DenHartog>): Check[] {
  const size = { by: 'ratio', ratio: given.inputs.mu } as const
  const objective = { excitation: 'force', response: 'displacement' } as const
  const optimum = designed({ size, tuning: { by: 'fixedPoints', objective } })
  const level = designed({ size, tuning: { by: 'given', frequency: HOST.frequency } })
  const { computed, book_answer_from_memory: book } = given.expected
  const near = (value: number) => given.tolerance.rel * value
  return finish(given, [
    ['frequency ratio', '', computed.f, near(computed.f), 'evaluate', () => optimum().frequencyRatio],
    [
      'c/c_c',
      '',
      computed.c_over_cc,
      near(computed.c_over_cc),
      'evaluate',
      () => optimum().dampingRatioOverHost,
    ],
    [
      'damping ratio',
      '',
      computed.zeta_own,
      near(computed.zeta_own),
      'evaluate',
      () => optimum().dampingRatio,
    ],
    ['peak', '', computed.peak, near(computed.peak), 'evaluate', () => optimum().closedForm?.peak],
    [
      'lower split',
      '',
      computed.split_low,
      near(computed.split_low),
      'evaluate',
      () => level().splitFrequencies[0] / HOST.frequency,
    ],
    [
      'upper split',
      '',
      computed.split_high,
      near(computed.split_high),
      'evaluate',
      () => level().splitFrequencies[1] / HOST.frequency,
    ],
    ...printed('frequency ratio', book.f, () => optimum().frequencyRatio),
    ...printed('c/c_c', book.c_over_cc, () => optimum().dampingRatioOverHost),
    ...printed('peak', book.peak, () => optimum().closedForm?.peak),
    ...printed('lower split', book.split_low, () => level().splitFrequencies[0] / HOST.frequency),
    ...printed('upper split', book.split_high, () => level().splitFrequencies[1] / HOST.frequency),
  ])
}

function raoChecks(given: ReferenceCase<RaoInputs, Rao>): Check[] {
  const { trial_mass_kg, tuned_rpm, lower_split_rpm, wanted_lower_rpm } = given.inputs
  const { computed, book_answer_from_memory: book } = given.expected
  const hostMass = once(() => hostMassFromTrial(trial_mass_kg, lower_split_rpm / tuned_rpm))
  const ratio = once(() => massRatioForSplit(wanted_lower_rpm / tuned_rpm))
  const result = designed(
    {
      size: { by: 'mass', mass: computed.absorber_mass_kg },
      tuning: { by: 'speed', speed: (2 * Math.PI * tuned_rpm) / 60 },
    },
    { mass: computed.host_mass_kg, frequency: tuned_rpm / 60 },
  )
  const near = (value: number) => given.tolerance.rel * value
  const upper = () => 60 * result().splitFrequencies[1]
  return finish(given, [
    [
      'mass ratio of the trial',
      '',
      computed.mu_trial,
      near(computed.mu_trial),
      'formula',
      () => massRatioForSplit(lower_split_rpm / tuned_rpm),
    ],
    ['host mass', 'kg', computed.host_mass_kg, near(computed.host_mass_kg), 'formula', hostMass],
    ['mass ratio wanted', '', computed.mu_final, near(computed.mu_final), 'formula', ratio],
    [
      'absorber mass',
      'kg',
      computed.absorber_mass_kg,
      near(computed.absorber_mass_kg),
      'formula',
      () => ratio() * hostMass(),
    ],
    [
      'absorber stiffness',
      'N/m',
      computed.absorber_k_N_per_m,
      near(computed.absorber_k_N_per_m),
      'evaluate',
      () => result().stiffness,
    ],
    ['upper split', 'rpm', computed.upper_rpm, near(computed.upper_rpm), 'evaluate', upper],
    [
      'lower split',
      'rpm',
      wanted_lower_rpm,
      near(wanted_lower_rpm),
      'evaluate',
      () => 60 * result().splitFrequencies[0],
    ],
    // printed answers are remembered to about 0.1 %
    ['printed host mass', 'kg', book.host_mass_kg, 1e-3 * book.host_mass_kg, 'formula', hostMass],
    [
      'printed absorber mass',
      'kg',
      book.absorber_mass_kg,
      1e-3 * book.absorber_mass_kg,
      'formula',
      () => ratio() * hostMass(),
    ],
    ['printed upper split', 'rpm', book.upper_rpm, 1e-3 * book.upper_rpm, 'evaluate', upper],
  ])
}

function designed(...given: Parameters<typeof absorberProject>): () => AbsorberResult {
  return once(() => evaluate(absorberProject(...given)).absorbers[0] ?? missing())
}

function finish(given: ReferenceCase<unknown, unknown>, rows: readonly Row[]): Check[] {
  return rows.map(([quantity, unit, expected, tolerance, through, ours]) => ({
    id: `${given.id} ${quantity}`,
    source: sourceOf(given),
    quantity,
    unit,
    expected,
    tolerance,
    through,
    ours: () => ours() ?? missing(),
  }))
}

/** The printed answer, where one is remembered: to half a unit of its last digit. */
function printed(quantity: string, value: number | undefined, ours: () => number | undefined): Row[] {
  if (value === undefined) return []
  const decimals = String(value).split('.')[1]?.length ?? 0
  return [[`printed ${quantity}`, '', value, 0.5 * 10 ** -decimals, 'evaluate', ours]]
}

function missing(): never {
  throw new Error('not computed')
}
