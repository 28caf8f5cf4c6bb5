import type { Absorber } from '../project/absorber.ts'
import type { Vec3 } from '../project/fields.ts'
import type { AbsorberResult, Mode, Problem } from '../results.ts'
import { hostCurves } from './curves.ts'
import { fixedPointTuning } from './fixed-points.ts'
import { hostOf, type Host } from './host.ts'
import { kindOf, travelShape, unboundedAt, type Kind, type Shape } from './kinds.ts'
import { barePeak, worstPeak, type Peak } from './peaks.ts'
import { caution, invalid } from './problems.ts'
import { shapeMagnitude, type HostAndAbsorber } from './response.ts'
import type { Receptance } from './receptance-panels.ts'
import { splitFrequencyRatios } from './running-speed.ts'
import { objectiveOf, PLAIN_OBJECTIVE, tune, type Tuning } from './tuning.ts'

/** What an absorber needs to know of the machine; null where it is not known. */
export interface AbsorberContext {
  /** of the machine on its mounts, without absorbers */
  readonly modes: readonly Mode[] | null
  /** from the datum [m] */
  readonly centreOfGravity: Vec3 | null
  /** displacement along the direction at the point per unit force there, without absorbers; [Hz] in, [m/N] out */
  readonly receptance:
    | ((
        point: Vec3,
        direction: Vec3,
        frequencies: Float64Array,
      ) => { readonly re: Float64Array; readonly im: Float64Array })
    | null
  /** [rad/s] */
  readonly runningSpeed: number | null
  /** [m/s²]; standard gravity when left out */
  readonly gravity?: number
  /** of the machine that carries it [kg]; null or left out: not known */
  readonly machineMass?: number | null
}

export interface AbsorberDesign {
  /** null when something that it needs is missing or cannot be used; `problems` says what */
  readonly result: AbsorberResult | null
  readonly problems: readonly Problem[]
}

const STANDARD_GRAVITY = 9.80665
const DETUNING = [-0.1, -0.05, 0, 0.05, 0.1] as const

/**
 * Tunes and sizes one absorber on its host and says how it will behave.
 * @param index of the absorber in the project, for the fields of problems
 */
export function designAbsorber(absorber: Absorber, index: number, context: AbsorberContext): AbsorberDesign {
  const field = `absorbers[${index}]`
  const finding = hostOf(absorber, field, context.modes, context.centreOfGravity)
  if ('problems' in finding) return { result: null, problems: finding.problems }
  const { host } = finding
  const receptance = receptanceAt(absorber, host, context)
  const { tuning, problems } = tune(absorber, host, field, receptance, context.runningSpeed)
  if (tuning === null) return { result: null, problems }
  const result = describe(absorber, host, tuning, context.gravity ?? STANDARD_GRAVITY)
  if (allFinite(result))
    return { result, problems: [...problems, ...tooHeavy(absorber, result, field, context)] }
  const message =
    'These numbers are too far apart to be computed with: check masses, frequencies and damping.'
  return { result: null, problems: [...problems, invalid(`${field}.tuning.by`, message)] }
}

/** Share of the machine's mass from which an absorber is hardly one any more: common practice, no source. */
const HEAVY_SHARE = 0.25

/** A mode that hardly moves at the attachment is a heavy host there, and a share of that is a heavy absorber. */
function tooHeavy(
  { host, size }: Absorber,
  { mass }: AbsorberResult,
  field: string,
  { machineMass }: AbsorberContext,
): readonly Problem[] {
  if (host.kind !== 'mode' || machineMass === null || machineMass === undefined) return []
  const share = mass / machineMass
  if (!(share > HEAVY_SHARE)) return []
  const message = `This absorber weighs ${Number((100 * share).toPrecision(3))} % of the machine. Where the mode hardly moves an absorber must be heavy: choose a point and direction that move more, or less mass.`
  return [caution(`${field}.size.${size.by === 'mass' ? 'mass' : 'ratio'}`, message)]
}

/** On the full network for a mode; of the single freedom itself for a typed host. */
function receptanceAt({ host: given }: Absorber, host: Host, context: AbsorberContext): Receptance | null {
  if (given.kind === 'mode') {
    const { receptance } = context
    return receptance === null
      ? null
      : (frequencies) => receptance(given.position, given.direction, frequencies)
  }
  return (frequencies) => {
    const re = new Float64Array(frequencies.length)
    const im = new Float64Array(frequencies.length)
    frequencies.forEach((frequency, k) => {
      const g = frequency / host.frequency
      const [a, b] = [(1 - g) * (1 + g), 2 * host.dampingRatio * g]
      const square = host.stiffness * (a * a + b * b)
      re[k] = a / square
      im[k] = -b / square
    })
    return { re, im }
  }
}

function describe(absorber: Absorber, host: Host, tuning: Tuning, gravity: number): AbsorberResult {
  const { mass, frequencyRatio, dampingRatio, network } = tuning
  const objective = objectiveOf(absorber)
  const kind = kindOf(objective, host.dampingRatio)
  const travel = travelShape(objective.excitation, host.dampingRatio)
  const massRatio = mass / host.mass
  const omega = frequencyRatio * host.omega
  const system: HostAndAbsorber = { massRatio, hostDamping: host.dampingRatio, frequencyRatio, dampingRatio }
  const worst = worstPeak(kind, system)
  const stroke = worstPeak(travel, system)
  const [lowSplit, highSplit] = splitFrequencyRatios(massRatio, frequencyRatio)
  return {
    id: absorber.id,
    host: {
      mass: host.mass,
      stiffness: host.stiffness,
      frequency: host.frequency,
      dampingRatio: host.dampingRatio,
    },
    massRatio,
    mass,
    stiffness: mass * omega * omega,
    damping: 2 * dampingRatio * mass * omega,
    frequency: omega / (2 * Math.PI),
    frequencyRatio,
    dampingRatio,
    dampingRatioOverHost: frequencyRatio * dampingRatio,
    staticSag: gravity / (omega * omega),
    peak: worst.height,
    peakAt: worst.peaks.map(({ at }) => at),
    peakWithout: barePeak(kind, host.dampingRatio)?.height ?? null,
    maxStrokeRatio: stroke.height,
    maxStrokeAt: highestAt(stroke.peaks),
    splitFrequencies: [lowSplit * host.frequency, highSplit * host.frequency],
    closedForm: closedForm(kind, massRatio),
    network,
    curve: hostCurves(kind, travel, system),
    detuning: detuning(kind, system),
    atTunedSpeed: absorber.tuning.by === 'speed' ? atTunedSpeed(host, system) : null,
  }
}

/**
 * Where the highest peak stands; of peaks level to rounding the faster one, which tires a spring sooner.
 * (At the classical optimum under a force both travel peaks are level.)
 */
function highestAt(peaks: readonly Peak[]): number | null {
  const highest = peaks.reduce((most, { height }) => Math.max(most, height), 0)
  return peaks.findLast(({ height }) => height >= highest * (1 - LEVEL))?.at ?? null
}

const LEVEL = 1e-9

function closedForm(kind: Kind, massRatio: number): AbsorberResult['closedForm'] {
  const found = fixedPointTuning(kind, massRatio)
  if (found === null) return null
  const { frequencyRatio, dampingRatio, height, fixedPointsAt } = found
  return { frequencyRatio, dampingRatio, peak: height, fixedPointsAt }
}

/** The absorber's spring is off while its mass and damper stay: c / (m_a omega_1) is what is kept. */
function detuning(kind: Kind, system: HostAndAbsorber): AbsorberResult['detuning'] {
  const bounded = unboundedAt(kind, system.hostDamping) === null
  return DETUNING.map((share) => {
    const off = {
      ...system,
      frequencyRatio: system.frequencyRatio * (1 + share),
      dampingRatio: system.dampingRatio / (1 + share),
    }
    return { share, peak: bounded ? worstPeak(kind, off).height : null }
  })
}

const AMPLITUDE: Shape = kindOf(PLAIN_OBJECTIVE, 0)

/** Amplitudes at the tuned frequency under the host's force. */
function atTunedSpeed(host: Host, system: HostAndAbsorber): AbsorberResult['atTunedSpeed'] {
  const g = system.frequencyRatio
  const sag = host.force / host.stiffness
  return {
    frequency: g * host.frequency,
    hostAmplitude: sag * shapeMagnitude(AMPLITUDE, system, g),
    stroke: sag * shapeMagnitude(travelShape('force', system.hostDamping), system, g),
  }
}

/** Whether every number in a plain result is finite; null is allowed. */
function allFinite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value)
  if (value instanceof Float64Array) return value.every(Number.isFinite)
  if (typeof value === 'object' && value !== null) return Object.values(value).every(allFinite)
  return true
}
