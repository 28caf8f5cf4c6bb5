/** Groups E and J: rubber pads, every number through `evaluate(project)`. */
import { figuresOf, onFourMounts, type DesignInput } from '../cases/components.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'E_components.json'
const MEGA = 1e6

interface RubberRow {
  readonly IRHD: number
  readonly E0_MPa: number
  readonly G_MPa: number
  readonly k: number
  readonly bulk_MPa: number
}
interface PadInputs {
  readonly IRHD: number
  readonly shape: 'disc' | 'rect'
  readonly diameter_m?: number
  readonly length_width_m?: readonly [number, number]
  readonly thickness_m: number
}
interface PadExpected {
  readonly area_m2: number
  readonly shape_factor: number
  readonly Ec_Pa: number
  readonly k_compression_N_per_m: number
  readonly k_shear_N_per_m: number
}

const ANY_PAD = {
  component: 'rubberPad',
  shape: { kind: 'disc', diameter: 0.05 },
  thickness: 0.01,
  load: 1,
} as const

function tableChecks(given: ReferenceCase<object, { readonly rows: readonly RubberRow[] }>): Check[] {
  const check = checkMaker({ ...given, tolerance: { rel: 1e-12 } }) // table values; rounding of the mega
  return given.expected.rows.flatMap((row) => {
    const figures = once(() => figuresOf({ ...ANY_PAD, rubber: { from: 'hardness', hardness: row.IRHD } }))
    const at = `at ${row.IRHD} IRHD`
    return [
      check(`E0 ${at}`, 'MPa', row.E0_MPa, 'evaluate', () => figures().moduli.youngsModulus / MEGA),
      check(`G ${at}`, 'MPa', row.G_MPa, 'evaluate', () => figures().moduli.shearModulus / MEGA),
      check(`k ${at}`, '', row.k, 'evaluate', () => figures().moduli.compressionFactor),
      check(`bulk modulus ${at}`, 'MPa', row.bulk_MPa, 'evaluate', () => figures().moduli.bulkModulus / MEGA),
    ]
  })
}

function padChecks(given: ReferenceCase<PadInputs, PadExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const [length, width] = inputs.length_width_m ?? [0, 0]
  const design = {
    component: 'rubberPad',
    shape:
      inputs.diameter_m === undefined
        ? { kind: 'rectangle', length, width }
        : { kind: 'disc', diameter: inputs.diameter_m },
    thickness: inputs.thickness_m,
    rubber: { from: 'hardness', hardness: inputs.IRHD },
    // the reference takes rubber itself as incompressible
    volumeCompressibility: false,
    load: 1,
  } as const satisfies DesignInput
  const figures = once(() => figuresOf(design))
  const mount = once(() => onFourMounts(design, 1).statics?.mounts[0] ?? missing())
  return [
    check('area', 'm²', expected.area_m2, 'evaluate', () => figures().area),
    check('shape factor', '', expected.shape_factor, 'evaluate', () => figures().shapeFactor),
    check('compression modulus', 'Pa', expected.Ec_Pa, 'evaluate', () => figures().compressionModulus),
    check('vertical rate', 'N/m', expected.k_compression_N_per_m, 'evaluate', () => figures().rate),
    check(
      'rate of a mount',
      'N/m',
      expected.k_compression_N_per_m,
      'evaluate',
      () => mount().staticStiffness,
    ),
    check('shear rate', 'N/m', expected.k_shear_N_per_m, 'evaluate', () => figures().shearRate),
  ]
}

function idealChecks(given: ReferenceCase<{ readonly aspect: number }, { readonly C: number }>): Check[] {
  const shape = { kind: 'rectangle', length: 0.02 * given.inputs.aspect, width: 0.02 } as const
  const figures = once(() => figuresOf({ ...ANY_PAD, shape, rubber: { from: 'hardness', hardness: 50 } }))
  return [
    checkMaker(given)('pressure coefficient', '', given.expected.C, 'evaluate', () => {
      return figures().pressureCoefficient ?? missing()
    }),
  ]
}

function gentChecks(given: ReferenceCase<{ readonly shore_A: number }, { readonly E_MPa: number }>): Check[] {
  const rubber = { from: 'hardness', hardness: given.inputs.shore_A } as const
  const figures = once(() => figuresOf({ ...ANY_PAD, rubber }))
  return [
    checkMaker(given)("Young's modulus", 'MPa', given.expected.E_MPa, 'evaluate', () => {
      return (figures().modulusByGent ?? missing()) / MEGA
    }),
  ]
}

interface ColumnInputs {
  readonly E0_Pa: number
  readonly G_Pa: number
  readonly k: number
  readonly side_m: number
  readonly thickness_m: number
  readonly layers: number
  readonly load_N: number
}

function columnChecks(given: ReferenceCase<ColumnInputs, { readonly k_lateral_N_per_m: number }>): Check[] {
  const { inputs, expected } = given
  // a design has a load: a millionth of a newton takes 1e-10 of the stiffness
  const load = Math.max(inputs.load_N, 1e-6)
  const figures = once(() =>
    figuresOf({
      component: 'rubberPad',
      shape: { kind: 'rectangle', length: inputs.side_m, width: inputs.side_m },
      thickness: inputs.thickness_m,
      layers: inputs.layers,
      rubber: {
        from: 'typed',
        youngsModulus: inputs.E0_Pa,
        shearModulus: inputs.G_Pa,
        compressionFactor: inputs.k,
      },
      load,
    }),
  )
  return [
    checkMaker(given)('lateral rate', 'N/m', expected.k_lateral_N_per_m, 'evaluate', () => {
      return figures().lateralRate[0] ?? missing()
    }),
  ]
}

export const rubberPadChecks: readonly Check[] = [
  ...casesOf<object, { rows: readonly RubberRow[] }>(FILE, 'E-RUBTAB').flatMap(tableChecks),
  ...casesOf<PadInputs, PadExpected>(FILE, 'E-RUBPAD').flatMap(padChecks),
  ...casesOf<{ aspect: number }, { C: number }>(FILE, 'E-RUBIDEAL').flatMap(idealChecks),
  ...casesOf<{ shore_A: number }, { E_MPa: number }>(FILE, 'E-GENT').flatMap(gentChecks),
  ...casesOf<ColumnInputs, { k_lateral_N_per_m: number }>('J_component_columns.json', 'J-PAD').flatMap(
    columnChecks,
  ),
]
