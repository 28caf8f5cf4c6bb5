/** Group C: an absorber at the corner of a six-freedom body, through `evaluate(project)`. */
import { evaluate } from '../../../core/evaluate.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { ProjectInput } from '../../../core/project/project.ts'
import type { Complex, Evaluation, OrderResponse } from '../../../core/results.ts'
import { rigidBodyProject, type BodyInputs } from '../cases/rigid-body.ts'
import { casesOf, once, sourceOf, type Check, type ReferenceCase } from '../check-type.ts'

const FILE = 'C2_absorbers_applied.json'
/** A component below this share of the largest beside it is zero by symmetry, up to rounding. */
const ZERO_SHARE = 1e-12

type Row = readonly [quantity: string, unit: string, expected: number, tolerance: number, ours: () => number]

export const absorberCornerChecks: readonly Check[] = [
  ...casesOf<CornerInputs, CornerExpected>(FILE, 'C2-CORNER-').flatMap(cornerChecks),
  ...casesOf<CornerBandInputs, { fn_Hz: number; zeta_own: number; peak_m_per_N: number }>(
    FILE,
    'C2-CORNEROPT',
  ).flatMap(cornerBandChecks),
]

function finish(given: ReferenceCase<unknown, unknown>, rows: readonly Row[]): Check[] {
  return rows.map(([quantity, unit, expected, tolerance, ours]) => ({
    id: `${given.id} ${quantity}`,
    source: sourceOf(given),
    quantity,
    unit,
    expected,
    tolerance,
    through: 'evaluate',
    ours,
  }))
}

interface CornerInputs extends BodyInputs {
  readonly attach_point_m: Vec3
  readonly direction: Vec3
  readonly absorber: { readonly mass_kg: number; readonly fn_Hz: number; readonly zeta_own: number }
  readonly freqs_Hz: readonly number[]
}
interface CornerExpected {
  readonly corner_receptance_without: readonly Complex[]
  readonly corner_receptance_with: readonly Complex[]
  readonly absorber_relative_per_force: readonly Complex[]
  readonly q_cg_unbalance_with_absorber: readonly (readonly Complex[])[]
  readonly absorber_displacement_unbalance: readonly Complex[]
  readonly undamped_fn_Hz_7dof: readonly number[]
}

function cornerChecks(given: ReferenceCase<CornerInputs, CornerExpected>): Check[] {
  const { inputs, expected } = given
  const absorber = {
    id: 'absorber',
    host: { kind: 'mode', mode: 2, position: inputs.attach_point_m, direction: inputs.direction },
    size: { by: 'mass', mass: inputs.absorber.mass_kg },
    tuning: { by: 'given', frequency: inputs.absorber.fn_Hz, dampingRatio: inputs.absorber.zeta_own },
  } as const
  const push: ProjectInput['sources'] = [
    {
      kind: 'harmonic',
      id: 'push',
      position: inputs.attach_point_m,
      load: { kind: 'force', direction: inputs.direction, amplitude: 1 },
    },
  ]
  const turning = once(() => evaluate(rigidBodyProject(inputs, { absorbers: [absorber] })))
  const point = { ...inputs, points_m: { corner: inputs.attach_point_m } }
  const pushed = once(() => evaluate(rigidBodyProject(point, { absorbers: [absorber], sources: push })))
  const bare = once(() => evaluate(rigidBodyProject(point, { sources: push })))
  const order = (result: Evaluation, k: number): OrderResponse =>
    result.response?.atSpeeds[k]?.orders[0] ?? missing()
  const along = (motion: readonly Complex[]): Complex => ({
    re: inputs.direction.reduce((sum, d, i) => sum + d * (motion[i]?.re ?? 0), 0),
    im: inputs.direction.reduce((sum, d, i) => sum + d * (motion[i]?.im ?? 0), 0),
  })
  const { rel } = given.tolerance
  const complex = (name: string, unit: string, value: Complex, floor: number, ours: () => Complex): Row[] =>
    (['re', 'im'] as const).map((part) => [
      `${name}, ${part}`,
      unit,
      value[part],
      rel * Math.hypot(value.re, value.im) + floor,
      () => ours()[part],
    ])
  return finish(given, [
    ...expected.undamped_fn_Hz_7dof.map((frequency, k): Row => [
      `natural frequency ${k + 1} with the absorber`,
      'Hz',
      frequency,
      rel * frequency,
      () => turning().modesWithAbsorbers?.[k]?.frequency ?? missing(),
    ]),
    ...inputs.freqs_Hz.flatMap((frequency, k): Row[] => {
      const at = `at ${frequency} Hz`
      const body = expected.q_cg_unbalance_with_absorber[k] ?? missing()
      const floor = ZERO_SHARE * Math.max(...body.map(({ re, im }) => Math.hypot(re, im)))
      const of = (list: readonly Complex[]) => list[k] ?? missing()
      return [
        ...complex(`receptance without ${at}`, 'm/N', of(expected.corner_receptance_without), 0, () =>
          along(order(bare(), k).points[0] ?? missing()),
        ),
        ...complex(`receptance with ${at}`, 'm/N', of(expected.corner_receptance_with), 0, () =>
          along(order(pushed(), k).points[0] ?? missing()),
        ),
        ...complex(
          `stroke per force ${at}`,
          'm/N',
          of(expected.absorber_relative_per_force),
          0,
          () => order(pushed(), k).absorbers[0]?.stroke ?? missing(),
        ),
        ...complex(
          `absorber mass under unbalance ${at}`,
          'm',
          of(expected.absorber_displacement_unbalance),
          floor,
          () => order(turning(), k).absorbers[0]?.mass ?? missing(),
        ),
        ...body.flatMap((value, i) =>
          complex(
            `machine under unbalance ${at}, coordinate ${i + 1}`,
            i < 3 ? 'm' : 'rad',
            value,
            floor,
            () => order(turning(), k).body[i] ?? missing(),
          ),
        ),
      ]
    }),
  ])
}

interface CornerBandInputs extends BodyInputs {
  readonly attach_point_m: Vec3
  readonly direction: Vec3
  readonly absorber_mass_kg: number
  readonly band_Hz: readonly [number, number]
}

function cornerBandChecks(
  given: ReferenceCase<CornerBandInputs, { fn_Hz: number; zeta_own: number; peak_m_per_N: number }>,
): Check[] {
  const { inputs, expected } = given
  const result = once(
    () =>
      evaluate(
        rigidBodyProject(inputs, {
          absorbers: [
            {
              id: 'absorber',
              host: { kind: 'mode', mode: 2, position: inputs.attach_point_m, direction: inputs.direction },
              size: { by: 'mass', mass: inputs.absorber_mass_kg },
              tuning: { by: 'networkMinimax', lowest: inputs.band_Hz[0], highest: inputs.band_Hz[1] },
            },
          ],
        }),
      ).absorbers[0] ?? missing(),
  )
  const share = (name: string) => Number(given.tolerance[name])
  const { fn_Hz, zeta_own, peak_m_per_N: peak } = expected
  return finish(given, [
    ['own frequency', 'Hz', fn_Hz, share('fn_rel') * fn_Hz, () => result().frequency],
    ['damping ratio', '', zeta_own, share('zeta_rel') * zeta_own, () => result().dampingRatio],
    [
      'least worst receptance',
      'm/N',
      peak,
      share('peak_rel') * peak,
      () => result().network?.peak ?? missing(),
    ],
  ])
}

function missing(): never {
  throw new Error('not computed')
}
