/** Groups E and J: air springs, every number through `evaluate(project)`. */
import { figuresOf, onFourMounts } from '../cases/components.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

interface GasInputs {
  readonly p_abs_Pa: number
  readonly p_atm_Pa: number
  readonly area_m2: number
  readonly volume_m3: number
  readonly n: number
  readonly dA_dx_m?: number
}
interface GasExpected {
  readonly k_N_per_m: number
  readonly load_N?: number
  readonly fn_Hz?: number
}

function airDesign(inputs: GasInputs) {
  return {
    component: 'airSpring',
    load: (inputs.p_abs_Pa - inputs.p_atm_Pa) * inputs.area_m2,
    effectiveArea: inputs.area_m2,
    areaSlope: inputs.dA_dx_m ?? 0,
    // the split between bellows and vessel is free
    bellowsVolume: 0.6 * inputs.volume_m3,
    auxiliaryVolume: 0.4 * inputs.volume_m3,
    exponent: inputs.n,
    atmosphericPressure: inputs.p_atm_Pa,
    lateralStiffness: 3e4,
  } as const
}

function airChecks(given: ReferenceCase<GasInputs, GasExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const design = airDesign(inputs)
  const figures = once(() => figuresOf(design))
  const onMounts = once(() => onFourMounts(design, design.load))
  const mount = () => onMounts().statics?.mounts[0] ?? missing()
  const heave = () => onMounts().modes?.find(({ name }) => name === 'heave')?.frequency ?? missing()
  return [
    check('rate', 'N/m', expected.k_N_per_m, 'evaluate', () => figures().rate),
    check('rate of a mount', 'N/m', expected.k_N_per_m, 'evaluate', () => mount().dynamicStiffness[2]),
    ...(expected.load_N === undefined
      ? []
      : [check('load of a mount', 'N', expected.load_N, 'evaluate', () => mount().load)]),
    ...(expected.fn_Hz === undefined
      ? []
      : [
          check('frequency', 'Hz', expected.fn_Hz, 'evaluate', () => figures().frequency),
          check('heave on four', 'Hz', expected.fn_Hz, 'evaluate', heave),
        ]),
  ]
}

function travelChecks(
  given: ReferenceCase<
    GasInputs & { readonly load_shares: readonly number[] },
    { readonly travel_m: readonly number[] }
  >,
): Check[] {
  const { inputs, expected } = given
  const figures = once(() => figuresOf({ ...airDesign(inputs), slowExponent: inputs.n }))
  return inputs.load_shares.map((share, index) =>
    checkMaker(given)(
      `compression at ${share} of the load`,
      'm',
      expected.travel_m[index] ?? missing(),
      'evaluate',
      () => {
        return figures().heightChange.find(({ loadShare }) => loadShare === share)?.travel ?? missing()
      },
    ),
  )
}

export const airSpringChecks: readonly Check[] = [
  ...casesOf<GasInputs, GasExpected>('E_components.json', 'E-AIR').flatMap(airChecks),
  ...casesOf<GasInputs & { load_shares: readonly number[] }, { travel_m: readonly number[] }>(
    'J_component_columns.json',
    'J-AIR',
  ).flatMap(travelChecks),
]
