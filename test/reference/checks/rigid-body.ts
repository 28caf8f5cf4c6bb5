/** Group B: one rigid body on a rigid support, every number through `evaluate(project)`. */
import { evaluate } from '../../../core/evaluate.ts'
import type { Complex, Evaluation, Mode, OrderResponse } from '../../../core/results.ts'
import { rigidBodyProject, type BodyInputs } from '../cases/rigid-body.ts'
import { casesOf, once, sourceOf, type Check, type ReferenceCase } from '../check-type.ts'

const FILE = 'B_rigidbody6.json'
const FREEDOMS = ['ux', 'uy', 'uz', 'rx', 'ry', 'rz'] as const
const AXES = ['x', 'y', 'z'] as const
type Case<Expected> = ReferenceCase<BodyInputs, Expected>
type Part = Omit<Check, 'source' | 'through' | 'id'> & { readonly name: string }

interface ModesExpected {
  readonly fn_Hz: readonly number[]
  readonly mode_shapes_columns: readonly (readonly number[])[]
  readonly ke_fraction_columns: readonly (readonly number[])[]
}
interface StaticExpected {
  readonly q_static: readonly number[]
  readonly mount_displacement_m: readonly (readonly number[])[]
  readonly mount_force_on_body_N: readonly (readonly number[])[]
  readonly sum_z_N: number
}
interface ForcedExpected {
  readonly q_cg: readonly (readonly Complex[])[]
  readonly force_vector_N: readonly (readonly Complex[])[]
  readonly mount_force_on_foundation_N: readonly (readonly (readonly Complex[])[])[]
  readonly sum_force_on_foundation_N: readonly (readonly Complex[])[]
  readonly point_displacement_m: Readonly<Record<string, readonly (readonly Complex[])[]>>
}
interface SymmetricExpected {
  readonly f_vertical_Hz: number
  readonly f_yaw_Hz: number
  readonly f_x_ty_pair_Hz: readonly [number, number]
  readonly f_y_tx_pair_Hz: readonly [number, number]
}

export const rigidBodyChecks: readonly Check[] = [
  ...casesOf<BodyInputs, ModesExpected>(FILE, 'B-MODES').flatMap(modesChecks),
  ...casesOf<BodyInputs, StaticExpected>(FILE, 'B-STATIC').flatMap(staticChecks),
  ...casesOf<BodyInputs, ForcedExpected>(FILE, 'B-FORCED').flatMap(forcedChecks),
  ...casesOf<BodyInputs, SymmetricExpected>(FILE, 'B-SYMCF').flatMap(symmetricChecks),
]

function evaluated(inputs: BodyInputs): () => Evaluation {
  return once(() => evaluate(rigidBodyProject(inputs)))
}

function finish(given: Case<unknown>, parts: readonly Part[]): Check[] {
  return parts.map(({ name, ...part }) => ({
    id: `${given.id} ${name}`,
    source: sourceOf(given),
    through: 'evaluate',
    ...part,
  }))
}

function modesChecks(given: Case<ModesExpected>): Check[] {
  const result = evaluated(given.inputs)
  const { fn_Hz, mode_shapes_columns: shapes, ke_fraction_columns: shares } = given.expected
  const mode = (r: number): Mode => result().modes?.[r] ?? missing()
  const ofLargest = Number(given.tolerance['mode_shape_abs_of_largest'])
  return finish(
    given,
    fn_Hz.flatMap((frequency, r): Part[] => {
      const column = (rows: readonly (readonly number[])[], i: number) => rows[i]?.[r] ?? missing()
      const largest = Math.max(...shapes.map((row) => Math.abs(row[r] ?? 0)))
      return [
        {
          name: `frequency ${r + 1}`,
          quantity: `natural frequency of mode ${r + 1}`,
          unit: 'Hz',
          expected: frequency,
          tolerance: given.tolerance.rel * frequency,
          ours: () => mode(r).frequency,
        },
        ...FREEDOMS.map((freedom, i) => ({
          name: `shape ${r + 1} ${freedom}`,
          quantity: `mass-normalised shape of mode ${r + 1}, ${freedom}`,
          unit: i < 3 ? '1/√kg' : '1/(m √kg)',
          expected: column(shapes, i),
          tolerance: ofLargest * largest,
          ours: () => mode(r).shape[i] ?? missing(),
        })),
        ...FREEDOMS.map((freedom, i) => ({
          name: `share ${r + 1} ${freedom}`,
          quantity: `share of kinetic energy of mode ${r + 1} in ${freedom}`,
          unit: '',
          expected: column(shares, i),
          // a share is second order in the shape
          tolerance: 2 * ofLargest,
          ours: () => mode(r).energyShare[i] ?? missing(),
        })),
      ]
    }),
  )
}

function staticChecks(given: Case<StaticExpected>): Check[] {
  const result = evaluated(given.inputs)
  const statics = () => result().statics ?? missing()
  const { expected } = given
  const weight = expected.sum_z_N
  const { rel } = given.tolerance
  return finish(given, [
    {
      name: 'sum of loads',
      quantity: 'sum of the mount loads',
      unit: 'N',
      expected: weight,
      tolerance: 1e-9 * weight, // the equilibrium that is promised, tighter than the file asks
      ours: () => statics().loadSum,
    },
    ...FREEDOMS.map((freedom, i): Part => ({
      name: `displacement ${freedom}`,
      quantity: `static displacement ${freedom}`,
      unit: i < 3 ? 'm' : 'rad',
      expected: expected.q_static[i] ?? missing(),
      // exact zeros by symmetry come out as rounding of the largest
      tolerance: rel * largestOf(expected.q_static),
      ours: () => statics().bodyDisplacement[i] ?? missing(),
    })),
    ...expected.mount_force_on_body_N.flatMap((force, m) =>
      AXES.flatMap((axis, i): Part[] => [
        {
          name: `M${m + 1} force ${axis}`,
          quantity: `static force of mount ${m + 1} on the machine, ${axis}`,
          unit: 'N',
          expected: force[i] ?? missing(),
          tolerance: rel * largestOf(force),
          ours: () => statics().mounts[m]?.force[i] ?? missing(),
        },
        {
          name: `M${m + 1} displacement ${axis}`,
          quantity: `static displacement of the top of mount ${m + 1}, ${axis}`,
          unit: 'm',
          expected: expected.mount_displacement_m[m]?.[i] ?? missing(),
          tolerance: rel * largestOf(expected.mount_displacement_m[m] ?? []),
          ours: () => statics().mounts[m]?.displacement[i] ?? missing(),
        },
      ]),
    ),
  ])
}

function forcedChecks(given: Case<ForcedExpected>): Check[] {
  const result = evaluated(given.inputs)
  const { expected, inputs } = given
  const order = (f: number): OrderResponse => result().response?.atSpeeds[f]?.orders[0] ?? missing()
  return finish(
    given,
    (inputs.freqs_Hz ?? []).flatMap((frequency, f) => {
      const at = `at ${frequency} Hz`
      const list = (
        what: string,
        unit: string,
        names: readonly string[],
        values: readonly Complex[],
        ours: (order: OrderResponse) => readonly Complex[],
      ) => complexParts(given, `${what} ${at}`, unit, names, values, () => ours(order(f)))
      return [
        ...list('exciting force', 'N', AXES, expected.force_vector_N[f] ?? [], (o) => o.excitation),
        ...list(
          'motion of the centre of gravity',
          'm or rad',
          FREEDOMS,
          expected.q_cg[f] ?? [],
          (o) => o.body,
        ),
        ...list(
          'force into the support',
          'N',
          AXES,
          expected.sum_force_on_foundation_N[f] ?? [],
          (o) => o.support,
        ),
        ...inputs.mounts.flatMap((_, m) =>
          list(
            `force of mount ${m + 1} on the support`,
            'N',
            AXES,
            expected.mount_force_on_foundation_N[f]?.[m] ?? [],
            (o) => o.mountForces[m] ?? missing(),
          ),
        ),
        ...Object.keys(inputs.points_m ?? {}).flatMap((point, p) =>
          list(
            `displacement of ${point}`,
            'm',
            AXES,
            expected.point_displacement_m[point]?.[f] ?? [],
            (o) => o.points[p] ?? missing(),
          ),
        ),
      ]
    }),
  )
}

/** Real and imaginary part of each component: relative to its own size, or to the largest beside it. */
function complexParts(
  given: Case<unknown>,
  what: string,
  unit: string,
  names: readonly string[],
  values: readonly Complex[],
  ours: () => readonly Complex[],
): Part[] {
  const largest = Math.max(...values.map(({ re, im }) => Math.hypot(re, im)))
  const floor = Number(given.tolerance['abs_fraction_of_largest_component']) * largest
  return values.flatMap((value, i) =>
    (['re', 'im'] as const).map((part) => ({
      name: `${what} ${names[i] ?? ''} ${part}`,
      quantity: `${what}, ${names[i] ?? ''}, ${part === 're' ? 'real' : 'imaginary'} part`,
      unit,
      expected: value[part],
      tolerance: given.tolerance.rel * Math.hypot(value.re, value.im) + floor,
      ours: () => ours()[i]?.[part] ?? missing(),
    })),
  )
}

function symmetricChecks(given: Case<SymmetricExpected>): Check[] {
  const result = evaluated(given.inputs)
  /** Frequencies of the modes whose energy lies in the given freedoms, rising. */
  const within = (...freedoms: readonly number[]) =>
    (result().modes ?? missing())
      .filter((mode) => freedoms.reduce((sum, i) => sum + (mode.energyShare[i] ?? 0), 0) > 0.99)
      .map((mode) => mode.frequency)
  const { expected } = given
  const one = (name: string, value: number, freedoms: readonly number[], index: number): Part => ({
    name,
    quantity: `closed form, ${name}`,
    unit: 'Hz',
    expected: value,
    tolerance: given.tolerance.rel * value,
    ours: () => within(...freedoms)[index] ?? missing(),
  })
  return finish(given, [
    one('vertical', expected.f_vertical_Hz, [2], 0),
    one('yaw', expected.f_yaw_Hz, [5], 0),
    one('x with pitch, lower', expected.f_x_ty_pair_Hz[0], [0, 4], 0),
    one('x with pitch, upper', expected.f_x_ty_pair_Hz[1], [0, 4], 1),
    one('y with roll, lower', expected.f_y_tx_pair_Hz[0], [1, 3], 0),
    one('y with roll, upper', expected.f_y_tx_pair_Hz[1], [1, 3], 1),
  ])
}

function largestOf(values: readonly number[]): number {
  return Math.max(...values.map(Math.abs))
}

function missing(): never {
  throw new Error('not computed')
}
