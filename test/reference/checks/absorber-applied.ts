/** Group C, applied: fixed speed, stroke, complex response at given parameters. */
import { coupledValue } from '../../../core/absorber/coupling.ts'
import type { Shape } from '../../../core/absorber/kinds.ts'
import { shapeValue, type HostAndAbsorber } from '../../../core/absorber/response.ts'
import { evaluate } from '../../../core/evaluate.ts'
import type { Project } from '../../../core/project/project.ts'
import type { AbsorberResult, Complex } from '../../../core/results.ts'
import { absorberProject, HOST } from '../cases/absorber.ts'
import { casesOf, once, sourceOf, type Check, type ReferenceCase } from '../check-type.ts'

const FILE = 'C2_absorbers_applied.json'

type Row = readonly [quantity: string, unit: string, expected: number, tolerance: number, ours: () => number]

const SHAPES: Readonly<Record<string, Shape>> = {
  F0: { power: 0, numerator: 'absolute', suspension: false },
  F1: { power: 1, numerator: 'absolute', suspension: false },
  F2: { power: 2, numerator: 'absolute', suspension: false },
  TF: { power: 0, numerator: 'absolute', suspension: true },
  R0: { power: 0, numerator: 'relative', suspension: false },
  R2: { power: 2, numerator: 'relative', suspension: false },
  absorber_relative_times_k_over_F: { power: 2, numerator: 'travel', suspension: false },
  absorber_relative_over_base_displacement: { power: 2, numerator: 'travel', suspension: true },
}

export const absorberAppliedChecks: readonly Check[] = [
  ...casesOf<{ mu: number; f: number }, { g1: number; g2: number }>(FILE, 'C2-SPLIT').flatMap(splitChecks),
  ...casesOf<UndampedInputs, UndampedExpected>(FILE, 'C2-UNDAMPED').flatMap(undampedChecks),
  ...casesOf<StrokeInputs, { max_stroke: number; g_at_max_stroke: number }>(FILE, 'C2-STROKE').flatMap(
    strokeChecks,
  ),
  ...casesOf<ReceptanceInputs, { H11_with: readonly Complex[] }>(FILE, 'C2-RECEPT').flatMap(receptanceChecks),
  ...casesOf<PointsInputs, Readonly<Record<string, readonly Complex[]>>>(FILE, 'C2-FRFPTS').flatMap(
    pointsChecks,
  ),
]

function finish(
  given: ReferenceCase<unknown, unknown>,
  through: Check['through'],
  rows: readonly Row[],
): Check[] {
  return rows.map(([quantity, unit, expected, tolerance, ours]) => ({
    id: `${given.id} ${quantity}`,
    source: sourceOf(given),
    quantity,
    unit,
    expected,
    tolerance,
    through,
    ours,
  }))
}

function absorberOf(project: Project): () => AbsorberResult {
  return once(() => evaluate(project).absorbers[0] ?? missing())
}

function splitChecks(given: ReferenceCase<{ mu: number; f: number }, { g1: number; g2: number }>): Check[] {
  const { mu, f } = given.inputs
  const { g1, g2 } = given.expected
  const result = absorberOf(
    absorberProject({
      size: { by: 'ratio', ratio: mu },
      tuning: { by: 'given', frequency: f * HOST.frequency },
    }),
  )
  const { rel } = given.tolerance
  return finish(given, 'evaluate', [
    ['lower split frequency', '', g1, rel * g1, () => result().splitFrequencies[0] / HOST.frequency],
    ['upper split frequency', '', g2, rel * g2, () => result().splitFrequencies[1] / HOST.frequency],
  ])
}

interface UndampedInputs {
  readonly host_mass_kg: number
  readonly rpm: number
  readonly force_N: number
  readonly absorber_amplitude_limit_m: number
  readonly host_fn_Hz: number
}
interface UndampedExpected {
  readonly k_a_N_per_m: number
  readonly m_a_kg: number
  readonly mu: number
  readonly split_Hz: readonly [number, number]
  readonly host_amplitude_m: number
}

function undampedChecks(given: ReferenceCase<UndampedInputs, UndampedExpected>): Check[] {
  const { inputs, expected } = given
  const result = absorberOf(
    absorberProject(
      {
        size: { by: 'stroke' },
        strokeLimit: inputs.absorber_amplitude_limit_m,
        tuning: { by: 'speed', speed: (2 * Math.PI * inputs.rpm) / 60 },
      },
      { mass: inputs.host_mass_kg, frequency: inputs.host_fn_Hz, force: inputs.force_N },
    ),
  )
  const { rel } = given.tolerance
  const limit = inputs.absorber_amplitude_limit_m
  const [low, high] = expected.split_Hz
  return finish(given, 'evaluate', [
    ['stiffness', 'N/m', expected.k_a_N_per_m, rel * expected.k_a_N_per_m, () => result().stiffness],
    ['mass', 'kg', expected.m_a_kg, rel * expected.m_a_kg, () => result().mass],
    ['mass ratio', '', expected.mu, rel * expected.mu, () => result().massRatio],
    ['lower split frequency', 'Hz', low, rel * low, () => result().splitFrequencies[0]],
    ['upper split frequency', 'Hz', high, rel * high, () => result().splitFrequencies[1]],
    [
      'host amplitude at the tuned speed',
      'm',
      expected.host_amplitude_m,
      Number(given.tolerance['abs_m']),
      () => result().atTunedSpeed?.hostAmplitude ?? missing(),
    ],
    ['stroke at the tuned speed', 'm', limit, rel * limit, () => result().atTunedSpeed?.stroke ?? missing()],
  ])
}

interface StrokeInputs {
  readonly mu: number
  readonly f: number
  readonly zeta_a: number
}

function strokeChecks(
  given: ReferenceCase<StrokeInputs, { max_stroke: number; g_at_max_stroke: number }>,
): Check[] {
  const { mu, f, zeta_a } = given.inputs
  const { max_stroke, g_at_max_stroke } = given.expected
  const result = absorberOf(
    absorberProject({
      size: { by: 'ratio', ratio: mu },
      tuning: { by: 'given', frequency: f * HOST.frequency, dampingRatio: zeta_a },
    }),
  )
  const { rel } = given.tolerance
  return finish(given, 'evaluate', [
    ['largest stroke', '', max_stroke, rel * max_stroke, () => result().maxStrokeRatio ?? missing()],
    ['its place', '', g_at_max_stroke, rel * g_at_max_stroke, () => result().maxStrokeAt ?? missing()],
  ])
}

interface ReceptanceInputs {
  readonly freqs_Hz: readonly number[]
  readonly receptance_H11_m_per_N: readonly Complex[]
  readonly absorber: {
    readonly mass_kg: number
    readonly fn_Hz: number
    readonly zeta_own: number
    readonly eta: number
  }
}

/** Magnitudes only: a band is judged by them. Cases with a loss factor wait for an elastomer absorber. */
function receptanceChecks(given: ReferenceCase<ReceptanceInputs, { H11_with: readonly Complex[] }>): Check[] {
  const { freqs_Hz, receptance_H11_m_per_N: receptance, absorber } = given.inputs
  if (absorber.eta !== 0) return []
  const own = 2 * Math.PI * absorber.fn_Hz
  return finish(
    given,
    'formula',
    given.expected.H11_with.map((value, k): Row => {
      const frequency = freqs_Hz[k] ?? missing()
      const { re, im } = receptance[k] ?? missing()
      const square = re * re + im * im
      const magnitude = Math.hypot(value.re, value.im)
      return [
        `receptance with the absorber at ${frequency} Hz`,
        'm/N',
        magnitude,
        given.tolerance.rel * magnitude,
        () => {
          const omega = 2 * Math.PI * frequency
          const level = coupledValue(
            re / square,
            -im / square,
            omega,
            absorber.mass_kg,
            own * own,
            2 * absorber.zeta_own * own,
          )
          return Math.exp(level / 2)
        },
      ]
    }),
  )
}

interface PointsInputs {
  readonly mu: number
  readonly f: number
  readonly zeta_a?: number
  readonly eta_a?: number
  readonly zeta_1: number
  readonly g: readonly number[]
}

function pointsChecks(
  given: ReferenceCase<PointsInputs, Readonly<Record<string, readonly Complex[]>>>,
): Check[] {
  const { mu, f, zeta_a = 0, eta_a = 0, zeta_1, g } = given.inputs
  const system: HostAndAbsorber = {
    massRatio: mu,
    hostDamping: zeta_1,
    frequencyRatio: f,
    dampingRatio: zeta_a,
    lossFactor: eta_a,
  }
  return finish(
    given,
    'formula',
    Object.entries(given.expected).flatMap(([name, values]) =>
      values.flatMap((value, index): Row[] => {
        const at = g[index] ?? missing()
        const shape = SHAPES[name] ?? missing()
        // each part to the file's figure of the whole: one part alone may be nearly zero
        const tolerance = given.tolerance.rel * Math.hypot(value.re, value.im)
        return (['re', 'im'] as const).map((part) => [
          `${name} at g = ${at}, ${part}`,
          '',
          value[part],
          tolerance,
          () => shapeValue(shape, system, at)[part],
        ])
      }),
    ),
  )
}

function missing(): never {
  throw new Error('not computed')
}
