/** Group I: rest on curved, packed and levelled mounts, every number through `evaluate(project)`. */
import { evaluate } from '../../../core/evaluate.ts'
import type { Evaluation } from '../../../core/results.ts'
import { curvedProject, type CurvedInputs } from '../cases/curved.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'I_static_curves.json'
const FREEDOMS = ['ux', 'uy', 'uz', 'rx', 'ry', 'rz'] as const
const AXES = ['x', 'y', 'z'] as const

interface RestExpected {
  readonly q_static: readonly number[]
  readonly force_on_body_N: readonly (readonly number[])[]
  readonly compression_m: readonly number[]
  readonly tangent_N_per_m: readonly number[]
  readonly fn_Hz: readonly number[]
}
type LateralExpected = Pick<RestExpected, 'q_static' | 'force_on_body_N'>
interface LevelExpected {
  readonly wished_N: readonly number[]
  readonly loads_N: readonly number[]
  readonly shims_m: readonly number[]
  readonly sinking_m: number
}
type Case<Expected> = ReferenceCase<CurvedInputs, Expected>

export const curvedMountChecks: readonly Check[] = [
  ...casesOf<CurvedInputs, RestExpected>(FILE, 'I-REST').flatMap(restChecks),
  ...casesOf<CurvedInputs, LateralExpected>(FILE, 'I-LATERAL').flatMap(lateralChecks),
  ...casesOf<CurvedInputs, LevelExpected>(FILE, 'I-LEVEL').flatMap(levelChecks),
]

function evaluated(inputs: CurvedInputs): () => Evaluation {
  return once(() => evaluate(curvedProject(inputs)))
}

/** Checks of a list whose small members are rounding of the largest. */
function lists(given: Case<unknown>) {
  const check = checkMaker(given)
  return (
    quantity: string,
    unit: string,
    expected: readonly number[],
    ours: (index: number) => number | undefined,
    names: readonly string[] = expected.map((_, index) => `M${index + 1}`),
  ): Check[] => {
    const tolerance = given.tolerance.rel * Math.max(...expected.map(Math.abs))
    return expected.map((value, index) =>
      check(
        `${quantity} ${names[index] ?? ''}`,
        unit,
        value,
        'evaluate',
        () => ours(index) ?? missing(),
        tolerance,
      ),
    )
  }
}

function forceNames(mounts: readonly unknown[]): string[] {
  return mounts.flatMap((_, index) => AXES.map((axis) => `M${index + 1} ${axis}`))
}

function restChecks(given: Case<RestExpected>): Check[] {
  const { expected } = given
  const result = evaluated(given.inputs)
  const statics = () => result().statics ?? missing()
  const list = lists(given)
  return [
    ...list('displacement', 'm', expected.q_static, (i) => statics().bodyDisplacement[i], FREEDOMS),
    ...list(
      'force on the machine of',
      'N',
      expected.force_on_body_N.flat(),
      (i) => statics().mounts[Math.floor(i / 3)]?.force[i % 3],
      forceNames(expected.force_on_body_N),
    ),
    ...list('compression of', 'm', expected.compression_m, (i) => statics().mounts[i]?.deflection),
    ...list(
      'static stiffness at rest of',
      'N/m',
      expected.tangent_N_per_m,
      (i) => statics().mounts[i]?.staticStiffness,
    ),
    ...list(
      'natural frequency',
      'Hz',
      expected.fn_Hz,
      (i) => result().modes?.[i]?.frequency,
      expected.fn_Hz.map((_, index) => String(index + 1)),
    ),
  ]
}

function lateralChecks(given: Case<LateralExpected>): Check[] {
  const { expected } = given
  const result = evaluated(given.inputs)
  const statics = () => result().statics ?? missing()
  const along = () => statics().lateral?.cases[0] ?? missing()
  const list = lists(given)
  return [
    ...list(
      'displacement under the load',
      'm',
      expected.q_static,
      (i) => (along().bodyDisplacement[i] ?? missing()) + (statics().bodyDisplacement[i] ?? missing()),
      FREEDOMS,
    ),
    ...list(
      'force under the load of',
      'N',
      expected.force_on_body_N.flat(),
      (i) => along().mounts[Math.floor(i / 3)]?.force[i % 3],
      forceNames(expected.force_on_body_N),
    ),
  ]
}

function levelChecks(given: Case<LevelExpected>): Check[] {
  const { expected } = given
  const result = evaluated(given.inputs)
  const statics = () => result().statics ?? missing()
  const list = lists(given)
  return [
    ...list('wished load of', 'N', expected.wished_N, (i) => statics().mounts[i]?.wishedLoad ?? missing()),
    ...list('load of', 'N', expected.loads_N, (i) => statics().mounts[i]?.load),
    ...list('packing under', 'm', expected.shims_m, (i) => statics().mounts[i]?.shim),
    ...list('sinking', 'm', [expected.sinking_m], () => -statics().bodyDisplacement[2], ['']),
    ...list('tilt', 'rad', [0, 0], (i) => statics().tilt[i], ['about x', 'about y']),
  ]
}
