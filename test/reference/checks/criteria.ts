/** Group F: limits by tables and curves. Tables from memory guard against slips between two write-downs. */
import { balanceGrades } from '../../../core/criteria/balance-grades.ts'
import { comfortReactions } from '../../../core/criteria/comfort.ts'
import { fanCategories } from '../../../core/criteria/fan-categories.ts'
import { floorLimit, multiplyingFactors, type FloorCurveId } from '../../../core/criteria/floor-curves.ts'
import { machineGroups } from '../../../core/criteria/machine-groups.ts'
import { casesOf, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'F_criteria.json'
/** Table values: only the rounding of their units may differ. */
const EXACT = { rel: 1e-12 }
const MICRO = 1e6

/** Checks of a case with the given relative tolerance. */
const checks = (given: ReferenceCase<unknown, unknown>, tolerance = EXACT) =>
  checkMaker({ ...given, tolerance })

interface GenericExpected extends Readonly<Record<`VC-${'A' | 'B' | 'C' | 'D' | 'E' | 'F' | 'G'}`, number>> {
  readonly operating_theatre_ISO: number
  readonly residential_day_ISO: number
  readonly office_ISO: number
  readonly workshop_ISO: number
  readonly 'VC-A_acceleration_4_to_8_Hz_m_s2': number
}

function genericChecks(given: ReferenceCase<object, GenericExpected>): Check[] {
  const { expected } = given
  const check = checks(given)
  const at = (curve: FloorCurveId, frequency: number) => (floorLimit(curve, frequency) ?? missing()) * MICRO
  const levels = [
    ...(['VC-A', 'VC-B', 'VC-C', 'VC-D', 'VC-E', 'VC-F', 'VC-G'] as const).map(
      (curve) => [curve, expected[curve]] as const,
    ),
    ['operatingTheatre', expected.operating_theatre_ISO],
    ['residentialDay', expected.residential_day_ISO],
    ['office', expected.office_ISO],
    ['workshop', expected.workshop_ISO],
  ] as const
  const flat = levels.flatMap(([curve, level]) =>
    [8, 20, 80].map((frequency) =>
      check(`${curve} at ${frequency} Hz`, 'µm/s', level, 'formula', () => at(curve, frequency)),
    ),
  )
  const low = [4, 6, 8].map((frequency) =>
    checks(given, { rel: 1e-10 })(
      // the file writes 12 digits
      `VC-A as acceleration at ${frequency} Hz`,
      'm/s²',
      expected['VC-A_acceleration_4_to_8_Hz_m_s2'],
      'formula',
      () => (2 * Math.PI * frequency * at('VC-A', frequency)) / MICRO,
    ),
  )
  const slow = levels
    .filter(([curve]) => /VC-[C-G]/.test(curve))
    .map(([curve, level]) => check(`${curve} at 1 Hz`, 'µm/s', level, 'formula', () => at(curve, 1)))
  return [...flat, ...low, ...slow]
}

interface HumanExpected {
  readonly z_curve_m_s2_at_Hz: Readonly<Record<string, number>>
}

function humanChecks(given: ReferenceCase<object, HumanExpected>): Check[] {
  const check = checkMaker(given)
  const acceleration = (curve: FloorCurveId, frequency: number) =>
    2 * Math.PI * frequency * (floorLimit(curve, frequency) ?? missing())
  const velocity = (curve: FloorCurveId, frequency: number) => floorLimit(curve, frequency) ?? missing()
  const along = Object.entries(given.expected.z_curve_m_s2_at_Hz).map(([frequency, value]) =>
    check(`along the spine at ${frequency} Hz`, 'm/s²', value, 'formula', () =>
      acceleration('iso2631-z', Number(frequency)),
    ),
  )
  // the words of the case: figures in its sentences
  return [
    ...along,
    check('along the spine at 2 Hz', 'm/s²', 0.01 / Math.SQRT2, 'formula', () =>
      acceleration('iso2631-z', 2),
    ),
    check('across the spine at 1 Hz', 'm/s²', 0.0036, 'formula', () => acceleration('iso2631-xy', 1)),
    check('across the spine at 20 Hz', 'm/s', 0.287e-3, 'formula', () => velocity('iso2631-xy', 20)),
    check('any posture at 2 Hz', 'm/s²', 0.0036, 'formula', () => acceleration('iso2631-combined', 2)),
    check('any posture at 40 Hz', 'm/s', 0.1e-3, 'formula', () => velocity('iso2631-combined', 40)),
  ]
}

interface FactorsExpected {
  readonly multiplying_factors_continuous: Readonly<Record<string, number | string>>
}

function factorChecks(given: ReferenceCase<object, FactorsExpected>): Check[] {
  const named: readonly (readonly [string, string, 'day' | 'night' | 'any'])[] = [
    ['critical working areas', 'critical working areas', 'any'],
    ['residential day', 'dwellings', 'day'],
    ['residential night', 'dwellings', 'night'],
    ['office', 'offices', 'any'],
    ['workshop', 'workshops', 'any'],
  ]
  return named.flatMap(([key, place, time]) => {
    const stated = given.expected.multiplying_factors_continuous[key]
    const [least, most = least] = String(stated).split(' to ').map(Number)
    const ours = () =>
      multiplyingFactors.find((entry) => entry.place === place && entry.time === time)?.factor ?? missing()
    const check = checks(given)
    return [
      check(`least factor, ${key}`, '', least ?? missing(), 'formula', () => ours()[0]),
      check(`largest factor, ${key}`, '', most ?? missing(), 'formula', () => ours()[1]),
    ]
  })
}

interface ComfortExpected {
  readonly rows: readonly (readonly [string, number | null, number | null])[]
}

function comfortChecks(given: ReferenceCase<object, ComfortExpected>): Check[] {
  return given.expected.rows.flatMap(([words, from, to]) => {
    const ours = () => comfortReactions.find((reaction) => reaction.words === words) ?? missing()
    const check = checks(given)
    return [
      ...(from === null
        ? []
        : [check(`${words} from`, 'm/s²', from, 'formula', () => ours().from ?? missing())]),
      ...(to === null ? [] : [check(`${words} to`, 'm/s²', to, 'formula', () => ours().to ?? missing())]),
    ]
  })
}

function gradeChecks(given: ReferenceCase<object, { readonly G_mm_s: readonly number[] }>): Check[] {
  return given.expected.G_mm_s.map((figure, index) =>
    checks(given)(`grade ${index + 1}`, 'mm/s', figure, 'formula', () => {
      return 1000 * (balanceGrades[index]?.grade ?? missing())
    }),
  )
}

interface FanExpected {
  readonly rows: readonly {
    readonly cat: string
    readonly balance_G: number
    readonly factory_rms_mm_s_rigid_flex: readonly [number, number]
  }[]
}

function fanChecks(given: ReferenceCase<object, FanExpected>): Check[] {
  return given.expected.rows.flatMap(({ cat, balance_G, factory_rms_mm_s_rigid_flex: [rigid, flexible] }) => {
    const ours = () => fanCategories.find(({ id }) => id === cat) ?? missing()
    const check = checks(given)
    return [
      check(`${cat} grade`, 'mm/s', balance_G, 'formula', () => 1000 * ours().balanceGrade),
      check(`${cat} factory, rigid`, 'mm/s', rigid, 'formula', () => 1000 * ours().factory.rigid),
      check(`${cat} factory, flexible`, 'mm/s', flexible, 'formula', () => 1000 * ours().factory.flexible),
    ]
  })
}

interface GroupsExpected {
  readonly rows: readonly {
    readonly group: number
    readonly support: string
    readonly v_mm_s_rms: readonly number[]
    readonly d_um_rms: readonly number[]
  }[]
}

function groupChecks(given: ReferenceCase<object, GroupsExpected>): Check[] {
  return given.expected.rows.flatMap(({ group, support, v_mm_s_rms, d_um_rms }) => {
    const ours = () =>
      machineGroups.find((row) => row.group === group && row.support === support) ?? missing()
    const check = checks(given)
    return ['A', 'B', 'C'].flatMap((zone, index) => [
      check(
        `group ${group} ${support}, velocity ${zone}`,
        'mm/s',
        v_mm_s_rms[index] ?? missing(),
        'formula',
        () => {
          return 1000 * (ours().velocity[index] ?? missing())
        },
      ),
      check(
        `group ${group} ${support}, displacement ${zone}`,
        'µm',
        d_um_rms[index] ?? missing(),
        'formula',
        () => {
          return MICRO * (ours().displacement[index] ?? missing())
        },
      ),
    ])
  })
}

export const criteriaChecks: readonly Check[] = [
  ...casesOf<object, GenericExpected>(FILE, 'F-VC').flatMap(genericChecks),
  ...casesOf<object, HumanExpected & FactorsExpected>(FILE, 'F-ISO2631_2').flatMap((given) => [
    ...humanChecks(given),
    ...factorChecks(given),
  ]),
  ...casesOf<object, ComfortExpected>(FILE, 'F-ISO2631_1').flatMap(comfortChecks),
  ...casesOf<object, { G_mm_s: readonly number[] }>(FILE, 'F-GRADES').flatMap(gradeChecks),
  ...casesOf<object, FanExpected>(FILE, 'F-ISO14694').flatMap(fanChecks),
  ...casesOf<object, GroupsExpected>(FILE, 'F-ISO10816_3').flatMap(groupChecks),
]
