/** Group C: closed forms and true minimax of one absorber on one freedom, through `evaluate(project)`. */
import { fixedPointTuning } from '../../../core/absorber/fixed-points.ts'
import { kindOf } from '../../../core/absorber/kinds.ts'
import { worstPeak } from '../../../core/absorber/peaks.ts'
import { evaluate } from '../../../core/evaluate.ts'
import type { Objective } from '../../../core/project/absorber.ts'
import type { AbsorberResult } from '../../../core/results.ts'
import { absorberProject, OBJECTIVE_OF_KIND } from '../cases/absorber.ts'
import { casesOf, once, sourceOf, type Check, type ReferenceCase } from '../check-type.ts'

const FILE = 'C_absorbers.json'

interface Inputs {
  readonly kind: string
  readonly mu: number
  readonly zeta_1: number
}
interface FixedPoint {
  readonly f: number
  readonly zeta_a: number
  readonly zeta_a_host: number
  readonly g_P: number
  readonly g_Q: number
  readonly height: number
  readonly zeta_a_sq_flat_at_P: number
  readonly zeta_a_sq_flat_at_Q: number
  readonly actual_peak?: number
  readonly max_stroke?: number
  readonly g_at_max_stroke?: number
}
interface Minimax {
  readonly f: number
  readonly zeta_a: number
  readonly zeta_a_host: number
  readonly g_peaks: readonly [number, number]
  readonly peak: number
  readonly max_stroke: number
  readonly g_at_max_stroke: number
}
type Case<Expected> = ReferenceCase<Inputs, Expected>
type Row = readonly [
  quantity: string,
  expected: number | undefined,
  ours: (result: AbsorberResult) => number | null | undefined,
]

export const absorberTableChecks: readonly Check[] = [
  ...casesOf<Inputs, { fixed_point: FixedPoint; hinf?: Minimax }>(FILE, 'C-TAB').flatMap((given) => [
    ...fixedPointChecks(given, given.expected.fixed_point),
    ...(given.expected.hinf
      ? minimaxChecks(given, given.expected.hinf, OBJECTIVE_OF_KIND[given.inputs.kind])
      : []),
  ]),
  ...casesOf<Inputs, Minimax>(FILE, 'C-DMP').flatMap((given) => [
    ...minimaxChecks(given, given.expected, OBJECTIVE_OF_KIND[given.inputs.kind]),
    ...otherWay(given),
  ]),
]

function fixedPointChecks(given: Case<unknown>, expected: FixedPoint): Check[] {
  const { kind, mu } = given.inputs
  const objective = OBJECTIVE_OF_KIND[kind] ?? missing()
  const result = designed(given.inputs, 'fixedPoints', objective)
  // the file weighs the stroke under a force for a velocity by g as well: then it is no travel
  const weighed = kind === 'F1'
  const level = once(() => fixedPointTuning(kindOf(objective, 0), mu)?.levelDampingSquared ?? missing())
  return [
    ...rows(given, 'fixed points', result, [
      ['frequency ratio', expected.f, (r) => r.frequencyRatio],
      ['damping ratio', expected.zeta_a, (r) => r.dampingRatio],
      ['damping ratio over the host', expected.zeta_a_host, (r) => r.dampingRatioOverHost],
      ['lower fixed point', expected.g_P, (r) => r.closedForm?.fixedPointsAt[0]],
      ['upper fixed point', expected.g_Q, (r) => r.closedForm?.fixedPointsAt[1]],
      ['height of the fixed points', expected.height, (r) => r.closedForm?.peak],
      ['highest peak', expected.actual_peak, (r) => r.peak],
      ['largest stroke', weighed ? undefined : expected.max_stroke, (r) => r.maxStrokeRatio],
      [
        'place of the largest stroke',
        weighed || kind === 'F0' ? undefined : expected.g_at_max_stroke,
        (r) => r.maxStrokeAt,
      ],
    ]),
    ...(kind === 'F0' ? [levelStrokePlace(given, expected)] : []),
    ...(['P', 'Q'] as const).map((point, index): Check => {
      const value = index === 0 ? expected.zeta_a_sq_flat_at_P : expected.zeta_a_sq_flat_at_Q
      return {
        id: `${given.id} fixed points, level tangent at ${point}`,
        source: sourceOf(given),
        quantity: `square of the damping ratio with a level tangent at ${point}`,
        unit: '',
        expected: value,
        tolerance: given.tolerance.rel * Math.abs(value),
        through: 'formula',
        ours: () => level()[index] ?? missing(),
      }
    }),
    ...(weighed ? weighedStroke(given, expected, 'fixed points') : []),
  ]
}

function minimaxChecks(given: Case<unknown>, expected: Minimax, objective: Objective = missing()): Check[] {
  const weighed = given.inputs.kind === 'F1'
  return [
    ...rows(given, 'minimax', designed(given.inputs, 'minimax', objective), [
      ['frequency ratio', expected.f, (r) => r.frequencyRatio],
      ['damping ratio', expected.zeta_a, (r) => r.dampingRatio],
      ['damping ratio over the host', expected.zeta_a_host, (r) => r.dampingRatioOverHost],
      ['least worst peak', expected.peak, (r) => r.peak],
      ['place of the lower peak', expected.g_peaks[0], (r) => r.peakAt[0]],
      ['place of the upper peak', expected.g_peaks[1], (r) => r.peakAt[1]],
      ['largest stroke', weighed ? undefined : expected.max_stroke, (r) => r.maxStrokeRatio],
      ['place of the largest stroke', weighed ? undefined : expected.g_at_max_stroke, (r) => r.maxStrokeAt],
    ]),
    ...(weighed ? weighedStroke(given, expected, 'minimax') : []),
  ]
}

/** The same kind asked for by another excitation and response. */
function otherWay(given: Case<Minimax>): Check[] {
  const other: Readonly<Record<string, Objective>> = {
    F0: { excitation: 'force', response: 'relativeDisplacement' },
    F2: { excitation: 'force', response: 'acceleration' },
    TF: { excitation: 'force', response: 'transmittedForce' },
  }
  const objective = other[given.inputs.kind]
  if (!objective) return []
  const { excitation, response } = objective
  return rows(
    given,
    `minimax of ${response} under ${excitation}`,
    designed(given.inputs, 'minimax', objective),
    [
      ['least worst peak', given.expected.peak, (r) => r.peak],
      ['frequency ratio', given.expected.f, (r) => r.frequencyRatio],
    ],
  )
}

/** Under a force both travel peaks of the closed form are level: the file names either, by its rounding. */
function levelStrokePlace(given: Case<unknown>, expected: FixedPoint): Check {
  const { mu, zeta_1 } = given.inputs
  const place = expected.g_at_max_stroke ?? missing()
  return {
    id: `${given.id} fixed points, place of a largest stroke`,
    source: sourceOf(given),
    quantity: 'place of one of the two level travel peaks, kind F0',
    unit: '',
    expected: place,
    tolerance: given.tolerance.rel * place,
    through: 'formula',
    ours: () => {
      const { height, peaks } = worstPeak(
        { power: 2, numerator: 'travel', suspension: false },
        { massRatio: mu, hostDamping: zeta_1, frequencyRatio: expected.f, dampingRatio: expected.zeta_a },
      )
      // level to the twelve digits of the file
      const level = peaks.filter((peak) => peak.height > (height ?? missing()) * (1 - 1e-9))
      const places = level.map(({ at }) => at).toSorted((a, b) => Math.abs(a - place) - Math.abs(b - place))
      return places[0] ?? missing()
    },
  }
}

function weighedStroke(
  given: Case<unknown>,
  expected: {
    readonly f: number
    readonly zeta_a: number
    readonly max_stroke?: number
    readonly g_at_max_stroke?: number
  },
  name: string,
): Check[] {
  const { mu, zeta_1 } = given.inputs
  const found = once(() =>
    worstPeak(
      { power: 3, numerator: 'travel', suspension: false },
      { massRatio: mu, hostDamping: zeta_1, frequencyRatio: expected.f, dampingRatio: expected.zeta_a },
    ),
  )
  const one = (quantity: string, value: number | undefined, ours: () => number | null): Check => ({
    id: `${given.id} ${name}, ${quantity}`,
    source: sourceOf(given),
    quantity,
    unit: '',
    expected: value ?? missing(),
    tolerance: given.tolerance.rel * Math.abs(value ?? missing()),
    through: 'formula',
    ours: () => ours() ?? missing(),
  })
  const highest = () => {
    const { peaks, height } = found()
    return peaks.find((peak) => peak.height === height)?.at ?? null
  }
  return [
    one('largest stroke times g', expected.max_stroke, () => found().height),
    one('place of the largest stroke times g', expected.g_at_max_stroke, highest),
  ]
}

function designed(
  { mu, zeta_1 }: Inputs,
  by: 'fixedPoints' | 'minimax',
  objective: Objective,
): () => AbsorberResult {
  return once(() => {
    const project = absorberProject(
      { size: { by: 'ratio', ratio: mu }, tuning: { by, objective } },
      { dampingRatio: zeta_1 },
    )
    return evaluate(project).absorbers[0] ?? missing()
  })
}

/** 1e-8 throughout, the file's own: the optimiser meets what the file asks of a direct formula. */
function rows(
  given: Case<unknown>,
  name: string,
  result: () => AbsorberResult,
  list: readonly Row[],
): Check[] {
  return list.flatMap(([quantity, expected, ours]) =>
    expected === undefined
      ? []
      : [
          {
            id: `${given.id} ${name}, ${quantity}`,
            source: sourceOf(given),
            quantity: `${quantity}, kind ${given.inputs.kind}`,
            unit: '',
            expected,
            tolerance: given.tolerance.rel * Math.abs(expected),
            through: 'evaluate' as const,
            ours: () => ours(result()) ?? missing(),
          },
        ],
  )
}

function missing(): never {
  throw new Error('not computed')
}
