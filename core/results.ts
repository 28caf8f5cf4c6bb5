/**
 * What `evaluate(project)` returns: plain data, SI units, complex amplitudes are peak values
 * with time dependence exp(+i omega t). A part that cannot be computed is null and the reason
 * stands in `problems`; nothing here is ever NaN or infinite.
 */
import type { ComponentFigures } from './components/analyse.ts'
import type { Problem } from './errors.ts'
import type { Vec3, Vec6 } from './project/fields.ts'
import type { Statics } from './statics-results.ts'
import type { RequirementKind } from './project/requirements.ts'
import type { Dimension } from './units/dimensions.ts'

export type { Problem }

export interface Complex {
  readonly re: number
  readonly im: number
}
export type ComplexVec3 = readonly [Complex, Complex, Complex]
export type ComplexVec6 = readonly [Complex, Complex, Complex, Complex, Complex, Complex]

export interface MassSummary {
  /** [kg] */
  readonly mass: number
  /** from the datum [m] */
  readonly centreOfGravity: Vec3
  /** tensor about the centre of gravity, rows, products with their minus sign [kg m²] */
  readonly inertia: readonly [Vec3, Vec3, Vec3]
}

/** A designed component by itself, whether it stands under the machine or not. */
export interface ComponentResult {
  /** id of its mount type */
  readonly type: string
  /** null where inputs are missing or contradict each other */
  readonly figures: ComponentFigures | null
  /** whether it can carry a machine */
  readonly usable: boolean
  /** fields as in the project, such as `mounting.types[0].design.wireDiameter` */
  readonly problems: readonly Problem[]
}

export interface Mode {
  /** 1 is the lowest */
  readonly number: number
  /** undamped natural frequency [Hz] */
  readonly frequency: number
  /** of the damped mode [Hz]; null when it does not oscillate */
  readonly dampedFrequency: number | null
  readonly dampingRatio: number
  /** mass-normalised displacement of the machine at its centre of gravity */
  readonly shape: Vec6
  /** mass-normalised displacement of each absorber mass along its line, by absorber id */
  readonly absorberShape: Readonly<Record<string, number>>
  /** share of kinetic energy in [ux uy uz rx ry rz]; sums to 1 without absorbers */
  readonly energyShare: Vec6
  /** dominant motion: heave, sway, surge, roll, pitch, yaw, absorber or coupled */
  readonly name: string
  /** speed at which each order meets this mode [rad/s] */
  readonly crossings: readonly { readonly order: number; readonly speed: number }[]
}

/** Response of one order (all sources of that order together, with their phases) at one speed. */
export interface OrderResponse {
  readonly order: number
  /** exciting frequency [Hz] */
  readonly frequency: number
  /** resultant exciting force and moment about the centre of gravity [N, N m] */
  readonly excitation: ComplexVec6
  readonly body: ComplexVec6
  /** force of each mount on the support, in the order of `mounting.placed` [N] */
  readonly mountForces: readonly ComplexVec3[]
  /** displacement of each observed point, in the order of `machine.points` [m] */
  readonly points: readonly ComplexVec3[]
  /** displacement of each enabled absorber's mass along its line, and relative to its attachment [m] */
  readonly absorbers: readonly { readonly id: string; readonly mass: Complex; readonly stroke: Complex }[]
  /** resultant force into the support [N] */
  readonly support: ComplexVec3
}

export interface SpeedResponse {
  /** [rad/s] */
  readonly speed: number
  readonly orders: readonly OrderResponse[]
  /** resultant into the support / the same when bolted to rigid ground; null without excitation */
  readonly forceRatio: number | null
  /** 1 - forceRatio */
  readonly isolationEfficiency: number | null
  /** peak resultant force into the support, root of the sum of squares over orders [N] */
  readonly supportForce: number
  /** the same for each mount [N] */
  readonly mountForces: readonly number[]
  /** overall RMS velocity of each point: x, y, z [m/s] */
  readonly pointVelocity: readonly Vec3[]
  /** stroke of each enabled absorber, zero to peak, summed over orders [m] */
  readonly strokes: readonly number[]
}

/** Curves against shaft speed, all of one length. Null members: there is nothing to draw. */
export interface Sweep {
  /** [rad/s], rising; denser near resonances */
  readonly speed: Float64Array
  readonly forceRatio: Float64Array | null
  readonly supportForce: Float64Array
  /** by mount [N] */
  readonly mountForces: readonly Float64Array[]
  /** by point, then x, y, z: overall RMS velocity [m/s] */
  readonly pointVelocity: readonly (readonly [Float64Array, Float64Array, Float64Array])[]
  /** by enabled absorber [m] */
  readonly strokes: readonly Float64Array[]
}

export interface ResponseResult {
  /** full complex response at the running speed and each further speed */
  readonly atSpeeds: readonly SpeedResponse[]
  readonly sweep: Sweep
  /** the same machine without its absorbers; null when there are none in place */
  readonly sweepWithoutAbsorbers: Sweep | null
  /** overall transfer at the running speed without absorbers, for comparison; null as above */
  readonly runningWithoutAbsorbers: SpeedResponse | null
}

export interface HostSummary {
  /** modal mass seen at the attachment [kg] */
  readonly mass: number
  /** [N/m] */
  readonly stiffness: number
  /** [Hz] */
  readonly frequency: number
  readonly dampingRatio: number
}

export interface AbsorberResult {
  readonly id: string
  readonly host: HostSummary
  readonly massRatio: number
  /** [kg] */
  readonly mass: number
  /** [N/m] */
  readonly stiffness: number
  /** [N s/m] */
  readonly damping: number
  /** own frequency on a fixed base [Hz] */
  readonly frequency: number
  /** own frequency over host frequency */
  readonly frequencyRatio: number
  /** c / (2 m_a omega_a) */
  readonly dampingRatio: number
  /** c / (2 m_a Omega_host), as Den Hartog writes it */
  readonly dampingRatioOverHost: number
  /** static sag under the absorber's own weight when it hangs vertically [m] */
  readonly staticSag: number
  /** worst peak of the objective on the single-freedom host, dimensionless; null without optimum */
  readonly peak: number | null
  /** frequency ratios g at which the peaks stand */
  readonly peakAt: readonly number[]
  /** the same peak without the absorber; null when it is unbounded (undamped host) */
  readonly peakWithout: number | null
  /** largest stroke over the static deflection of the host under the same force, single-freedom host */
  readonly maxStrokeRatio: number | null
  readonly maxStrokeAt: number | null
  /** natural frequencies of host and absorber, both undamped [Hz] */
  readonly splitFrequencies: readonly [number, number]
  /** peaks at the fixed points in closed form, where the objective has one */
  readonly closedForm: {
    readonly frequencyRatio: number
    readonly dampingRatio: number
    readonly peak: number
    readonly fixedPointsAt: readonly [number, number]
  } | null
  /** least worst receptance at the attachment over the band, with and without [m/N] */
  readonly network: {
    readonly band: readonly [number, number]
    readonly peak: number
    /** [Hz] */
    readonly peakAt: number
    /** null when a resonance in the band is not damped at all */
    readonly peakWithout: number | null
  } | null
  /** single-freedom curves against frequency ratio g: objective without and with the absorber */
  readonly curve: {
    readonly g: Float64Array
    readonly without: Float64Array
    readonly with: Float64Array
    readonly stroke: Float64Array
  }
  /** worst peak when the absorber's own frequency is off by the given share */
  readonly detuning: readonly { readonly share: number; readonly peak: number | null }[]
  /** amplitude of the host at the tuned frequency, and of the absorber, per the host's force [m]; fixed-speed tuning only */
  readonly atTunedSpeed: {
    readonly frequency: number
    readonly hostAmplitude: number
    readonly stroke: number
  } | null
}

/** A largest value while the speed changes, and the same in the steady state for comparison. */
export interface RunUpPeak {
  /** zero to peak, the highest that any shaft angle at the start would give; orders added up */
  readonly value: number
  /** since the start of the run-up or coast-down [s] */
  readonly time: number
  /** shaft speed at that time [rad/s] */
  readonly speed: number
  /** largest steady value over the same speeds; null where a resonance is not damped at all */
  readonly steady: number | null
  /** value over steady; null without it, or where nothing moves */
  readonly ratio: number | null
}

/** Machine axes, and the peak of the resultant. */
export interface RunUpPeaks {
  readonly x: RunUpPeak
  readonly y: RunUpPeak
  readonly z: RunUpPeak
  readonly resultant: RunUpPeak
}

/** Resultant displacement of the place that moves most, against time; thinned, peaks kept. */
export interface RunUpEnvelope {
  /** id of the point, or of the mount where no point is observed */
  readonly place: string
  readonly of: 'point' | 'mount'
  /** [s], rising */
  readonly time: Float64Array
  /** [rad/s] */
  readonly speed: Float64Array
  /** [m] */
  readonly displacement: Float64Array
}

/** One passage through the speeds. */
export interface RunUpPass {
  /** first and last speed [rad/s] */
  readonly from: number
  readonly to: number
  /** time until the last speed is reached, and that at it which is still looked at [s] */
  readonly duration: number
  readonly hold: number
  /** whether every peak has been found to the stated error */
  readonly converged: boolean
  /** what a peak may differ from the exact one, as a share of it */
  readonly errorEstimate: number
  /** displacement of each observed point [m] */
  readonly points: readonly { readonly id: string; readonly peaks: RunUpPeaks }[]
  readonly mounts: readonly {
    readonly id: string
    /** dynamic force on the support [N] */
    readonly force: RunUpPeaks
    /** displacement of its top against its foot [m] */
    readonly travel: RunUpPeaks
  }[]
  /** resultant force into the support [N] */
  readonly support: RunUpPeaks
  /** travel of each enabled absorber's mass against its attachment [m] */
  readonly absorbers: readonly { readonly id: string; readonly stroke: RunUpPeak }[]
  /** null where only peaks were asked for */
  readonly envelope: RunUpEnvelope | null
}

export interface RunUpResult {
  readonly up: RunUpPass | null
  readonly down: RunUpPass | null
}

export type VerdictStatus = 'pass' | 'near' | 'fail' | 'unknown'

export interface Verdict {
  readonly requirement: string
  readonly kind: RequirementKind
  readonly title: string
  readonly status: VerdictStatus
  /** the judged value and its limit, in the base unit of `dimension`; null when not known */
  readonly value: number | null
  readonly limit: number | null
  readonly dimension: Dimension
  /** whether the value must stay below or above the limit */
  readonly keep: 'below' | 'above'
  /** distance from the limit as a share of the limit, negative when it fails */
  readonly margin: number | null
  /** speed that governs [rad/s]; null where speed plays no part */
  readonly governingSpeed: number | null
  /** mount, point, mode or absorber that governs, in words */
  readonly governingPlace: string
  /** why it is not known, or what would help most */
  readonly advice: string
  /** where the limit comes from */
  readonly source: string
}

export interface Evaluation {
  readonly problems: readonly Problem[]
  readonly massSummary: MassSummary | null
  /** plain words for each source at the running speed */
  readonly sourceSummaries: readonly {
    readonly id: string
    readonly text: string
    readonly amplitude: number | null
  }[]
  readonly statics: Statics | null
  /** every mount type that is designed, in the order of the types */
  readonly components: readonly ComponentResult[]
  /** machine on its mounts, without absorbers */
  readonly modes: readonly Mode[] | null
  /** with every enabled absorber; null when there is none in place */
  readonly modesWithAbsorbers: readonly Mode[] | null
  readonly response: ResponseResult | null
  /** null unless the project switches it on */
  readonly runUp: RunUpResult | null
  readonly absorbers: readonly AbsorberResult[]
  readonly verdicts: readonly Verdict[]
}
