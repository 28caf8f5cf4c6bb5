/** Group E: helical springs, every number through `evaluate(project)`. */
import { figuresOf, onFourMounts } from '../cases/components.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'E_components.json'

interface WireInputs {
  readonly d_m: number
  readonly D_m: number
  readonly n_active: number
  readonly G_Pa: number
}
interface StressExpected {
  readonly k_N_per_m: number
  readonly spring_index: number
  readonly wahl_factor: number
  readonly EN13906_k_factor: number
  readonly tau_uncorrected_Pa: number
  readonly tau_wahl_Pa: number
  readonly tau_EN_Pa: number
  readonly deflection_m: number
}
interface LateralInputs extends WireInputs {
  readonly L0_m: number
  readonly s_m: number
  readonly E_Pa: number
}
interface LateralExpected {
  readonly k_axial_N_per_m: number
  readonly eta_lateral_over_axial: number
  readonly k_lateral_N_per_m: number
}
interface BuckleInputs {
  readonly L0_m: number
  readonly D_m: number
  readonly nu: number
  readonly E_Pa: number
  readonly G_Pa: number
}
interface BuckleExpected {
  readonly buckles: boolean
  readonly s_K_m: number | null
}
interface SurgeExpected {
  readonly k_N_per_m: number
  readonly active_mass_kg: number
  readonly f_surge_Hz: number
  readonly f_surge_fixed_free_Hz: number
}

/** Length with room for the deflections of the cases; the free length is no part of what they ask. */
const LONG = 2

function springDesign(inputs: WireInputs, freeLength: number, load: number, material = {}) {
  return {
    component: 'helicalSpring',
    wireDiameter: inputs.d_m,
    coilDiameter: inputs.D_m,
    activeCoils: inputs.n_active,
    freeLength,
    load,
    material: { shearModulus: inputs.G_Pa, ...material },
  } as const
}

function stressChecks(given: ReferenceCase<WireInputs & { readonly F_N: number }, StressExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const figures = once(() => figuresOf(springDesign(inputs, LONG, inputs.F_N)))
  return [
    check('rate', 'N/m', expected.k_N_per_m, 'evaluate', () => figures().rate),
    check('index', '', expected.spring_index, 'evaluate', () => figures().index),
    check('Wahl factor', '', expected.wahl_factor, 'evaluate', () => figures().wahlFactor),
    check(
      'factor of EN 13906-1',
      '',
      expected.EN13906_k_factor,
      'evaluate',
      () => figures().bergstraesserFactor,
    ),
    check('stress', 'Pa', expected.tau_uncorrected_Pa, 'evaluate', () => figures().shearStress),
    check('Wahl stress', 'Pa', expected.tau_wahl_Pa, 'evaluate', () => figures().wahlStress),
    check('stress by EN 13906-1', 'Pa', expected.tau_EN_Pa, 'evaluate', () => figures().bergstraesserStress),
    check('deflection', 'm', expected.deflection_m, 'evaluate', () => figures().deflection),
  ]
}

function lateralChecks(given: ReferenceCase<LateralInputs, LateralExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const load = expected.k_axial_N_per_m * inputs.s_m
  const design = springDesign(inputs, inputs.L0_m, load, { youngsModulus: inputs.E_Pa })
  const figures = once(() => figuresOf(design))
  const mount = once(() => onFourMounts(design, load).statics?.mounts[0] ?? missing())
  return [
    check('rate', 'N/m', expected.k_axial_N_per_m, 'evaluate', () => figures().rate),
    check(
      'lateral ratio',
      '',
      expected.eta_lateral_over_axial,
      'evaluate',
      () => figures().lateralRatio ?? missing(),
    ),
    check(
      'lateral rate',
      'N/m',
      expected.k_lateral_N_per_m,
      'evaluate',
      () => figures().lateralRate ?? missing(),
    ),
    check(
      'lateral rate of a mount',
      'N/m',
      expected.k_lateral_N_per_m,
      'evaluate',
      () => mount().dynamicStiffness[0],
    ),
    check('deflection of a mount', 'm', inputs.s_m, 'evaluate', () => mount().deflection),
  ]
}

function buckleChecks(given: ReferenceCase<BuckleInputs, BuckleExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const wire = { d_m: inputs.D_m / 10, D_m: inputs.D_m, n_active: 5, G_Pa: inputs.G_Pa }
  const design = springDesign(wire, inputs.L0_m, 1, { youngsModulus: inputs.E_Pa })
  const found = once(() => figuresOf({ ...design, seating: inputs.nu }).bucklingDeflection)
  if (expected.s_K_m !== null) {
    return [check('buckling deflection', 'm', expected.s_K_m, 'evaluate', () => found() ?? missing())]
  }
  return [check('buckles (0 never)', '', 0, 'evaluate', () => (found() === null ? 0 : 1))]
}

function surgeChecks(given: ReferenceCase<WireInputs & { readonly rho: number }, SurgeExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const figures = once(() => figuresOf(springDesign(inputs, LONG, 1, { density: inputs.rho })))
  const activeMass = () => (figures().mass * inputs.n_active) / figures().totalCoils
  return [
    check('rate', 'N/m', expected.k_N_per_m, 'evaluate', () => figures().rate),
    check('active mass', 'kg', expected.active_mass_kg, 'evaluate', activeMass),
    check('surge', 'Hz', expected.f_surge_Hz, 'evaluate', () => figures().surgeFrequency),
    check(
      'surge with one end free',
      'Hz',
      expected.f_surge_fixed_free_Hz,
      'evaluate',
      () => figures().surgeFrequency / 2,
    ),
  ]
}

export const springChecks: readonly Check[] = [
  ...casesOf<WireInputs & { F_N: number }, StressExpected>(FILE, 'E-SPRING').flatMap(stressChecks),
  ...casesOf<LateralInputs, LateralExpected>(FILE, 'E-LATERAL').flatMap(lateralChecks),
  ...casesOf<BuckleInputs, BuckleExpected>(FILE, 'E-BUCKLE').flatMap(buckleChecks),
  ...casesOf<WireInputs & { rho: number }, SurgeExpected>(FILE, 'E-SURGE').flatMap(surgeChecks),
]
