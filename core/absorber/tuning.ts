/** From what the user chose to the absorber's frequency and damping, or to the reason why not. */
import type { Absorber, Objective } from '../project/absorber.ts'
import type { AbsorberResult, Problem } from '../results.ts'
import { fixedPointTuning } from './fixed-points.ts'
import type { Host } from './host.ts'
import { kindOf, unboundedAt, type Kind } from './kinds.ts'
import { networkOptimum } from './network-optimum.ts'
import { hostOptimum } from './optimum.ts'
import { worstPeak } from './peaks.ts'
import { caution, invalid, missing } from './problems.ts'
import type { Receptance } from './receptance-panels.ts'
import { massForStroke } from './running-speed.ts'

export interface Tuning {
  /** [kg] */
  readonly mass: number
  /** f = omega_a / omega_1 [-] */
  readonly frequencyRatio: number
  /** zeta_a = c / (2 m_a omega_a) [-] */
  readonly dampingRatio: number
  readonly network: AbsorberResult['network']
}

export interface TuningFinding {
  readonly tuning: Tuning | null
  readonly problems: readonly Problem[]
}

/** What an absorber tuned without an objective of its own is judged by. */
export const PLAIN_OBJECTIVE: Objective = { excitation: 'force', response: 'displacement' }

export function objectiveOf({ tuning }: Absorber): Objective {
  return tuning.by === 'fixedPoints' || tuning.by === 'minimax' ? tuning.objective : PLAIN_OBJECTIVE
}

/**
 * @param field path of the absorber in the project
 * @param receptance at the attachment; null when it is not known
 * @param runningSpeed [rad/s]
 */
export function tune(
  absorber: Absorber,
  host: Host,
  field: string,
  receptance: Receptance | null,
  runningSpeed: number | null,
): TuningFinding {
  const { tuning } = absorber
  const kind = kindOf(objectiveOf(absorber), host.dampingRatio)
  const own = ownFrequency(absorber, host, field, runningSpeed)
  if (own.problems.length > 0) return { tuning: null, problems: own.problems }
  const mass = massOf(absorber, host, field, own.omega)
  if (typeof mass !== 'number') return { tuning: null, problems: [mass] }
  const massRatio = mass / host.mass
  switch (tuning.by) {
    case 'fixedPoints':
      return byFixedPoints(kind, host, mass, massRatio, field)
    case 'minimax':
      return byMinimax(kind, host, mass, massRatio, field)
    case 'networkMinimax':
      return byNetwork(tuning.lowest, tuning.highest, receptance, host, mass, field)
    case 'speed':
    case 'given':
      return {
        tuning: {
          mass,
          frequencyRatio: own.omega / host.omega,
          dampingRatio: tuning.dampingRatio,
          network: null,
        },
        problems: [],
      }
  }
}

/** omega_a where the user sets it [rad/s]; NaN where it is still to be found. */
function ownFrequency(
  { tuning }: Absorber,
  host: Host,
  field: string,
  runningSpeed: number | null,
): { omega: number; problems: readonly Problem[] } {
  if (tuning.by === 'speed') {
    const speed = tuning.speed ?? runningSpeed
    if (speed !== null) return { omega: speed * tuning.order, problems: [] }
    const message = 'Give the speed to which it is tuned, or the running speed of the machine.'
    return { omega: host.omega, problems: [missing(`${field}.tuning.speed`, message)] }
  }
  if (tuning.by === 'given') {
    if (tuning.frequency !== null) return { omega: 2 * Math.PI * tuning.frequency, problems: [] }
    return {
      omega: host.omega,
      problems: [missing(`${field}.tuning.frequency`, "Give the absorber's own frequency on a fixed base.")],
    }
  }
  return { omega: host.omega, problems: [] }
}

function massOf(absorber: Absorber, host: Host, field: string, omega: number): number | Problem {
  const { size, tuning, strokeLimit } = absorber
  switch (size.by) {
    case 'ratio':
      if (size.ratio === null)
        return missing(`${field}.size.ratio`, 'Give the absorber mass over the host mass.')
      return size.ratio * host.mass
    case 'mass':
      return size.mass ?? missing(`${field}.size.mass`, 'Give the absorber mass.')
    case 'stroke': {
      if (tuning.by !== 'speed') {
        return invalid(
          `${field}.size.by`,
          'The travel at one speed sets the mass only when it is tuned to a speed.',
        )
      }
      if (absorber.host.kind !== 'single') {
        return invalid(
          `${field}.size.by`,
          'The travel sets the mass only for a typed host whose force is known.',
        )
      }
      if (strokeLimit === null) return missing(`${field}.strokeLimit`, 'Give the largest travel allowed.')
      if (absorber.host.force === null || absorber.host.force === 0) {
        return missing(`${field}.host.force`, 'Give the harmonic force on the host at the tuned speed.')
      }
      const stiffness = host.mass * (host.omega - omega) * (host.omega + omega)
      const damping = 2 * host.dampingRatio * host.mass * host.omega * omega
      const { dampingRatio } = tuning
      const mass = massForStroke(absorber.host.force, strokeLimit, omega, [stiffness, damping], dampingRatio)
      if (mass > 0) return mass
      return invalid(
        `${field}.strokeLimit`,
        'The damping alone keeps the travel within this limit: no mass follows.',
      )
    }
  }
}

/** Excess of the closed form's peak over the least possible one from which it is worth a word. */
const WORTH_A_WORD = 0.01

/** Within a thousandth of the value that no absorber lowers there is nothing left to tune. */
const AT_FLOOR = 1.001

function byFixedPoints(
  kind: Kind,
  host: Host,
  mass: number,
  massRatio: number,
  field: string,
): TuningFinding {
  const closed = fixedPointTuning(kind, massRatio)
  if (closed === null) {
    const message = `No closed form exists for this objective at a mass ratio of ${short(massRatio)}: choose a smaller mass or the computed optimum.`
    return { tuning: null, problems: [invalid(`${field}.tuning.objective`, message)] }
  }
  const { frequencyRatio, dampingRatio } = closed
  const problems: Problem[] = []
  if (host.dampingRatio > 0 && unboundedAt(kind, host.dampingRatio) === null) {
    const system = { massRatio, hostDamping: host.dampingRatio, frequencyRatio, dampingRatio }
    const excess =
      (worstPeak(kind, system).height ?? 0) / hostOptimum(kind, massRatio, host.dampingRatio).peak - 1
    if (excess > WORTH_A_WORD) {
      const message = `The closed form takes the host as undamped; its peak is ${short(100 * excess)} % above the least possible, which the computed optimum reaches.`
      problems.push(caution(`${field}.tuning.by`, message))
    }
  }
  return { tuning: { mass, frequencyRatio, dampingRatio, network: null }, problems }
}

function byMinimax(kind: Kind, host: Host, mass: number, massRatio: number, field: string): TuningFinding {
  const unbounded = unboundedAt(kind, host.dampingRatio)
  if (unbounded !== null) {
    const where = unbounded === 'zero' ? 'as the speed falls to zero' : 'with rising speed'
    const message = `This response to this excitation grows without limit ${where}, so it has no least worst peak: choose another response or the closed form.`
    return { tuning: null, problems: [invalid(`${field}.tuning.objective`, message)] }
  }
  const found = hostOptimum(kind, massRatio, host.dampingRatio)
  const problems: Problem[] = []
  if (found.peak <= found.floor * AT_FLOOR) {
    const message =
      'The largest value is the one far below or far above resonance, which no absorber lowers: this absorber does little here.'
    problems.push(caution(`${field}.tuning.by`, message))
  } else if (!found.converged) {
    const message = `The search for the least worst peak did not settle (after ${found.iterations} steps): look at the curve before using it.`
    problems.push(caution(`${field}.tuning.by`, message))
  }
  const { frequencyRatio, dampingRatio } = found
  return { tuning: { mass, frequencyRatio, dampingRatio, network: null }, problems }
}

function byNetwork(
  lowest: number | null,
  highest: number | null,
  receptance: Receptance | null,
  host: Host,
  mass: number,
  field: string,
): TuningFinding {
  const problems: Problem[] = []
  if (lowest === null) problems.push(missing(`${field}.tuning.lowest`, 'Give the lower end of the band.'))
  if (highest === null) problems.push(missing(`${field}.tuning.highest`, 'Give the upper end of the band.'))
  if (lowest === null || highest === null) return { tuning: null, problems }
  if (!(highest > lowest)) {
    const message = 'The upper end of the band must lie above its lower end.'
    return { tuning: null, problems: [invalid(`${field}.tuning.highest`, message)] }
  }
  if (receptance === null) {
    const message = 'The machine on its mounts is not known yet, so there is nothing to compute the band on.'
    return { tuning: null, problems: [missing(`${field}.tuning.by`, message)] }
  }
  const found = networkOptimum(receptance, mass, [lowest, highest])
  if (found === null) {
    const message = 'The attachment does not move along this direction in this band.'
    return { tuning: null, problems: [invalid(`${field}.host.direction`, message)] }
  }
  if (!found.converged) {
    const message =
      'The search for the least worst receptance did not settle: the band may hold no resonance that this absorber can lower.'
    problems.push(caution(`${field}.tuning.by`, message))
  }
  const { omega, dampingRatio, peak, peakAt, peakWithout } = found
  return {
    tuning: {
      mass,
      frequencyRatio: omega / host.omega,
      dampingRatio,
      network: { band: [lowest, highest], peak, peakAt, peakWithout },
    },
    problems,
  }
}

function short(value: number): string {
  return String(Number(value.toPrecision(3)))
}
