/** Groups A and H: the rule of static deflection, as each mount reports it, on a curve that is a line. */
import { evaluate } from '../../../core/evaluate.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { MountStatics } from '../../../core/statics-results.ts'
import { curvedProject } from '../cases/curved.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const MASS = 250
const CORNERS: readonly Vec3[] = [
  [1, 1, 0],
  [1, -1, 0],
  [-1, 1, 0],
  [-1, -1, 0],
]

/** A mount of a machine that sinks by `sag` [m] on four equal ones, whose law is given as two points. */
function mountUnder(sag: number): () => MountStatics {
  return once(() => {
    const stiffness = (MASS * 9.80665) / sag / 4
    const points = [0.8, 2].map((share): [number, number] => [share * sag, stiffness * share * sag])
    const { statics } = evaluate(
      curvedProject({
        body: {
          mass_kg: MASS,
          cg_m: [0, 0, 0],
          inertia_about_cg_kg_m2: { Ixx: MASS, Iyy: MASS, Izz: MASS, Ixy: 0, Ixz: 0, Iyz: 0 },
        },
        types: { line: { k_lateral_N_per_m: [2 * stiffness, 3 * stiffness], law: { points } } },
        mounts: CORNERS.map((pos_m) => ({ type: 'line', pos_m })),
      }),
    )
    return statics?.mounts[0] ?? missing()
  })
}

function sagChecks(
  given: ReferenceCase<{ readonly static_deflection_m: number }, { readonly fn_Hz: number }>,
): Check[] {
  const sag = given.inputs.static_deflection_m
  const mount = mountUnder(sag)
  const check = checkMaker(given)
  const { fn_Hz } = given.expected
  return [
    check('deflection on a curve', 'm', sag, 'evaluate', () => mount().deflection),
    check(
      'frequency by deflection',
      'Hz',
      fn_Hz,
      'evaluate',
      () => mount().frequencyByDeflection ?? missing(),
    ),
    check('frequency on its load', 'Hz', fn_Hz, 'evaluate', () => mount().frequencyOnLoad ?? missing()),
  ]
}

interface RulesExpected {
  readonly computed: {
    readonly coef_mm_Hz: number
    readonly coef_inch_cpm: number
    readonly coef_inch_Hz: number
  }
}

function ruleChecks(given: ReferenceCase<object, RulesExpected>): Check[] {
  const { computed } = given.expected
  const check = checkMaker(given)
  const [millimetre, inch] = [mountUnder(1e-3), mountUnder(0.0254)]
  const by = (mount: () => MountStatics) => () => mount().frequencyByDeflection ?? missing()
  return [
    check('frequency by 1 mm of deflection', 'Hz', computed.coef_mm_Hz, 'evaluate', by(millimetre)),
    check('frequency by 1 in of deflection', 'Hz', computed.coef_inch_Hz, 'evaluate', by(inch)),
    check(
      'frequency by 1 in, per minute',
      '1/min',
      computed.coef_inch_cpm,
      'evaluate',
      () => 60 * by(inch)(),
    ),
  ]
}

export const deflectionRuleChecks: readonly Check[] = [
  ...casesOf<{ static_deflection_m: number }, { fn_Hz: number }>('A_sdof.json', 'A-SD').flatMap(sagChecks),
  ...casesOf<object, RulesExpected>('H_textbook.json', 'H-RULES').flatMap(ruleChecks),
]
