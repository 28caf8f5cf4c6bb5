/** Group F: balance grades and motion at one frequency, through `evaluate(project)`. */
import { evaluate } from '../../../core/evaluate.ts'
import { readProject } from '../../../core/project/read.ts'
import type { Evaluation } from '../../../core/results.ts'
import type {
  BalanceExpected,
  BalanceInputs,
  MotionExpected,
  MotionInputs,
  OtherSpeedInputs,
} from '../cases/criteria.ts'
import { casesOf, sourceOf, type Check } from '../check-type.ts'

const FILE = './F_criteria.json'
const RPM = (2 * Math.PI) / 60
const GRADE = 1e-3

/** A machine that runs at `speed` [rad/s] with one source, on four soft mounts. */
function machine(speed: number, source: object): Evaluation {
  return evaluate(
    readProject({
      format: 'stillbed-project',
      version: 1,
      machine: {
        massProperties: { from: 'typed', mass: 1000, inertia: { xx: 100, yy: 100, zz: 100 } },
        duty: { runningSpeed: speed },
        points: [{ id: 'p', name: 'P', position: [0.3, 0, 0.2] }],
      },
      sources: [{ id: 's', ...source }],
      mounting: {
        types: [{ id: 't', stiffness: [5e4, 5e4, 5e4], lossFactor: 0.05 }],
        placed: [-1, 1].flatMap((x) =>
          [-1, 1].map((y) => ({ id: `${x} ${y}`, type: 't', position: [0.5 * x, 0.4 * y, -0.2] })),
        ),
      },
    }),
    { sweepPoints: 50 },
  )
}

/** Force across the shaft with which the network is excited [N]; y and z are a quarter turn apart. */
function rotatingForce(speed: number, amount: object): number {
  const { response } = machine(speed, { kind: 'unbalance', amount })
  const [, y, z] = response?.atSpeeds[0]?.orders[0]?.excitation ?? []
  if (!y || !z) return NaN
  // |y| = |z| and y perpendicular to z in the complex plane, or it does not rotate
  const turns =
    Math.abs(y.re * z.re + y.im * z.im) + Math.abs(Math.hypot(y.re, y.im) - Math.hypot(z.re, z.im))
  return turns > 1e-9 * Math.hypot(y.re, y.im) ? NaN : Math.hypot(y.re, y.im)
}

const grades: readonly Check[] = casesOf<BalanceInputs, BalanceExpected>(FILE, 'F-BAL-').flatMap((entry) => {
  const { inputs, expected, id } = entry
  const speed = inputs.rpm * RPM
  const rotorMass = inputs.rotor_mass_kg
  const amounts = {
    'from the grade': { by: 'grade', rotorMass, grade: inputs.grade_mm_s * GRADE },
    'from the unbalance': { by: 'unbalance', unbalance: `${expected.U_per_g_mm} g mm` },
    'from the eccentricity': { by: 'eccentricity', rotorMass, eccentricity: `${expected.e_per_um} um` },
  }
  return Object.entries(amounts).map(([words, amount]) => ({
    ...force(id, words, expected.force_N, entry.tolerance.rel),
    source: sourceOf(entry),
    ours: () => rotatingForce(speed, amount),
  }))
})

const otherSpeeds: readonly Check[] = casesOf<OtherSpeedInputs, { force_N: number }>(FILE, 'F-BALRUN-').map(
  (entry) => {
    const { inputs, expected, id } = entry
    const amount = {
      by: 'grade',
      rotorMass: inputs.rotor_mass_kg,
      grade: inputs.grade_mm_s * GRADE,
      serviceSpeed: `${inputs.balancing_rpm} rpm`,
    }
    return {
      ...force(id, 'at another speed than it was balanced for', expected.force_N, entry.tolerance.rel),
      source: sourceOf(entry),
      ours: () => rotatingForce(inputs.running_rpm * RPM, amount),
    }
  },
)

function force(id: string, words: string, expected: number, tolerance: number) {
  return {
    id: `${id} ${words}`,
    quantity: `rotating force ${words}`,
    unit: 'N',
    expected,
    tolerance: tolerance * expected,
    through: 'evaluate',
  } as const
}

const motion: readonly Check[] = casesOf<MotionInputs, MotionExpected>(FILE, 'F-CONV-').map((entry) => {
  const { inputs, expected, id } = entry
  return {
    id: `${id} peak displacement`,
    source: sourceOf(entry),
    quantity: 'peak displacement of the RMS velocity',
    unit: 'um',
    expected: expected.d_peak_um,
    tolerance: entry.tolerance.rel * expected.d_peak_um,
    through: 'evaluate',
    ours: () => {
      const load = { kind: 'force', direction: [0, 0, 1], amplitude: 100 }
      const at = machine(2 * Math.PI * inputs.f_Hz, { kind: 'harmonic', load }).response?.atSpeeds[0]
      const z = at?.orders[0]?.points[0]?.[2]
      if (!at || !z) return NaN
      // the machine is linear: scaled to the velocity of the case
      const scale = (inputs.v_rms_mm_s * 1e-3) / (at.pointVelocity[0]?.[2] ?? NaN)
      return Math.hypot(z.re, z.im) * scale * 1e6
    },
  }
})

export const balanceChecks: readonly Check[] = [...grades, ...otherSpeeds, ...motion]
