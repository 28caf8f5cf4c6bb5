/** Group D: run-up and coast-down, peaks through `evaluate(project)`, instants through the trace. */
import { evaluate } from '../../../core/evaluate.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { Complex, RunUpPass, RunUpPeak } from '../../../core/results.ts'
import { runUpTrace } from '../../../core/runup/run-up-trace.ts'
import {
  FREEDOM,
  passageProject,
  sixFreedomProject,
  unitOf,
  type PassageInputs,
  type SixFreedomInputs,
} from '../cases/run-up.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'D_runup.json'
const AXES = ['x', 'y', 'z'] as const

interface PassageExpected {
  readonly envelope_peak: number
  readonly r_at_envelope_peak: number
  readonly tau_at_envelope_peak: number
  readonly real_peak: number
  readonly imag_peak: number
  readonly steady_state_peak: number
  readonly ratio_to_steady_state_peak: number
}
interface LimitExpected {
  readonly limit_peak_times_sqrt_alpha: number
  readonly finite_alpha_peak_times_sqrt_alpha: readonly { readonly alpha: number; readonly value: number }[]
  readonly 'same_as_3.67_rule_coefficient': number
}
interface PointPeak {
  readonly envelope_peak_m: number
  readonly t_s: number
  readonly f_inst_Hz: number
}
interface SixExpected {
  readonly points: Readonly<Record<string, Readonly<Record<'x' | 'y' | 'z', PointPeak>>>>
  readonly mount_force_z_N: readonly {
    readonly envelope_peak_N: number
    readonly t_s: number
    readonly f_inst_Hz: number
  }[]
  readonly q_cg_at_times: readonly { readonly t_s: number; readonly q: readonly Complex[] }[]
}

export const runUpChecks: readonly Check[] = [
  ...casesOf<PassageInputs, PassageExpected>(FILE, 'D-UP').flatMap(passageChecks),
  ...casesOf<PassageInputs, PassageExpected>(FILE, 'D-DN').flatMap(passageChecks),
  ...casesOf<PassageInputs, LimitExpected>(FILE, 'D-ASYM').flatMap(limitChecks),
  ...casesOf<SixFreedomInputs, SixExpected>(FILE, 'D-SIX').flatMap(sixFreedomChecks),
]

function passageChecks(given: ReferenceCase<PassageInputs, PassageExpected>): Check[] {
  const { inputs, expected } = given
  const relative = (name: string) => Number(given.tolerance[name])
  const ofPeak = relative('envelope_peak_rel')
  const atPeak = relative('r_at_peak_abs')
  const ofReal = relative('real_imag_peak_rel')
  const unit = unitOf(inputs)
  const check = checkMaker(given)
  const peak = once(() => passagePeak(inputs))
  // the tallest swing stands within a few cycles of the envelope's top
  const swings = once(() => swingsAbout(inputs, peak().time))
  return [
    check(
      'peak',
      '',
      expected.envelope_peak,
      'evaluate',
      () => peak().value / unit,
      ofPeak * expected.envelope_peak,
    ),
    check(
      'frequency ratio at the peak',
      '',
      expected.r_at_envelope_peak,
      'evaluate',
      () => peak().speed / FREEDOM.omega,
      atPeak,
    ),
    check(
      'time of the peak',
      '',
      expected.tau_at_envelope_peak,
      'evaluate',
      () => peak().time * FREEDOM.omega,
      atPeak / inputs.alpha,
    ),
    check(
      'steady peak',
      '',
      expected.steady_state_peak,
      'evaluate',
      () => (peak().steady ?? missing()) / unit,
      ofPeak * expected.steady_state_peak,
    ),
    check(
      'ratio to the steady peak',
      '',
      expected.ratio_to_steady_state_peak,
      'evaluate',
      () => peak().ratio ?? missing(),
      ofPeak * expected.ratio_to_steady_state_peak,
    ),
    check(
      'largest swing, cosine start',
      '',
      expected.real_peak,
      'formula',
      () => swings().real / unit,
      ofReal * expected.real_peak,
    ),
    check(
      'largest swing, sine start',
      '',
      expected.imag_peak,
      'formula',
      () => swings().imaginary / unit,
      ofReal * expected.imag_peak,
    ),
  ]
}

function passagePeak(inputs: PassageInputs): RunUpPeak {
  const { runUp } = evaluate(passageProject(inputs))
  const pass = runUp?.up ?? runUp?.down ?? missing()
  return pass.points[0]?.peaks.z ?? missing()
}

/** Largest |z| of the motion itself about a time [m]: 40 000 samples over 12 cycles on either side. */
function swingsAbout(inputs: PassageInputs, time: number) {
  const project = passageProject(inputs)
  const reach = (12 * 2 * Math.PI) / FREEDOM.omega
  const end = Math.abs(inputs.r_end - inputs.r_start) / (inputs.alpha * FREEDOM.omega)
  const from = Math.max(0, time - reach)
  const to = Math.min(end, time + reach)
  const times = Float64Array.from({ length: 40_000 }, (_, i) => from + ((to - from) * i) / 39_999)
  const direction = inputs.r_end > inputs.r_start ? 'up' : 'down'
  const { trace } = runUpTrace(project, direction, [0, 0, 0], times, [])
  const largest = (curve: Float64Array | undefined) =>
    (curve ?? missing()).reduce((best, value) => Math.max(best, Math.abs(value)), 0)
  const quarter = rotatesAhead(inputs)
  const real = largest(trace?.re[2])
  const imaginary = largest(trace?.im[2])
  return quarter ? { real: imaginary, imaginary: real } : { real, imaginary }
}

/** About x the vertical part of an unbalance is a quarter turn behind its force on y. */
function rotatesAhead({ forcing }: PassageInputs): boolean {
  return forcing === 'unbalance_full'
}

function limitChecks(given: ReferenceCase<PassageInputs, LimitExpected>): Check[] {
  const { expected } = given
  const check = checkMaker(given)
  const finite = Number(given.tolerance['finite_rel'])
  const scaled = (alpha: number) => {
    const inputs: PassageInputs = { zeta: 0, alpha, forcing: 'constant', r_start: 0, r_end: 2.5 }
    return (passagePeak(inputs).value / unitOf(inputs)) * Math.sqrt(alpha)
  }
  // the undamped start-up motion stays: as the reference says, peaks scatter about the limit by sqrt(alpha)
  const slowest = 1e-7
  const scatter = Math.sqrt(slowest)
  const slow = once(() => scaled(slowest))
  return [
    ...expected.finite_alpha_peak_times_sqrt_alpha.map(({ alpha, value }) =>
      check(`peak times √alpha at ${alpha}`, '', value, 'evaluate', () => scaled(alpha), finite * value),
    ),
    check('limit of peak times √alpha', '', expected.limit_peak_times_sqrt_alpha, 'evaluate', slow, scatter),
    check(
      'peak over natural frequency and root of the sweep rate',
      '',
      expected['same_as_3.67_rule_coefficient'],
      'evaluate',
      () => slow() * Math.sqrt(2 * Math.PI),
      scatter * Math.sqrt(2 * Math.PI),
    ),
  ]
}

function sixFreedomChecks(given: ReferenceCase<SixFreedomInputs, SixExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const project = sixFreedomProject(inputs)
  const pass = once((): RunUpPass => evaluate(project).runUp?.up ?? missing())
  const ofPeak = Number(given.tolerance['envelope_peak_rel'])
  const within = Number(given.tolerance['t_abs'])
  const rate = inputs.end_frequency_Hz / inputs.duration_s
  const ofOne = (
    name: string,
    unit: string,
    value: number,
    at: { readonly t_s: number; readonly f_inst_Hz: number },
    peak: () => RunUpPeak,
  ) => [
    check(`peak ${name}`, unit, value, 'evaluate', () => peak().value, ofPeak * value),
    check(`time of peak ${name}`, 's', at.t_s, 'evaluate', () => peak().time, within),
    check(
      `frequency at peak ${name}`,
      'Hz',
      at.f_inst_Hz,
      'evaluate',
      () => peak().speed / (2 * Math.PI),
      within * rate,
    ),
  ]
  return [
    ...Object.entries(expected.points).flatMap(([id, byAxis]) =>
      AXES.flatMap((axis) =>
        ofOne(
          `of ${id} along ${axis}`,
          'm',
          byAxis[axis].envelope_peak_m,
          byAxis[axis],
          () => (pass().points.find((point) => point.id === id) ?? missing()).peaks[axis],
        ),
      ),
    ),
    ...expected.mount_force_z_N.flatMap((one, index) =>
      ofOne(
        `vertical force of M${index + 1}`,
        'N',
        one.envelope_peak_N,
        one,
        () => (pass().mounts[index] ?? missing()).force.z,
      ),
    ),
    ...motionChecks(given, project),
  ]
}

/** Displacement and rotation of the centre of gravity at instants, the rotations from three places about it. */
function motionChecks(
  given: ReferenceCase<SixFreedomInputs, SixExpected>,
  project: ReturnType<typeof sixFreedomProject>,
): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const centre = inputs.body.cg_m
  const times = Float64Array.from(expected.q_cg_at_times, ({ t_s }) => t_s)
  const at = (shift: Vec3) => {
    const place: Vec3 = [centre[0] + shift[0], centre[1] + shift[1], centre[2] + shift[2]]
    return runUpTrace(project, 'up', place, times, []).trace ?? missing()
  }
  const traces = once(() => ({
    centre: at([0, 0, 0]),
    x: at([1, 0, 0]),
    y: at([0, 1, 0]),
    z: at([0, 0, 1]),
  }))
  const six = (part: 're' | 'im', i: number): readonly number[] => {
    const { centre: c, x, y, z } = traces()
    const shift = (trace: typeof c, axis: number) => trace[part][axis]?.[i] ?? missing()
    return [
      shift(c, 0),
      shift(c, 1),
      shift(c, 2),
      shift(y, 2) - shift(c, 2),
      shift(z, 0) - shift(c, 0),
      shift(x, 1) - shift(c, 1),
    ]
  }
  return expected.q_cg_at_times.flatMap(({ t_s, q }, i) => {
    const largest = Math.max(...q.map(({ re, im }) => Math.hypot(re, im)))
    const tolerance = Number(given.tolerance['q_rel_of_largest']) * largest
    return q.flatMap((value, freedom) =>
      (['re', 'im'] as const).map((part) =>
        check(
          `freedom ${freedom + 1} at ${t_s} s, ${part}`,
          freedom < 3 ? 'm' : 'rad',
          value[part],
          'formula',
          () => six(part, i)[freedom] ?? missing(),
          tolerance,
        ),
      ),
    )
  })
}
