/** The machine at rest on its mounts, as `evaluate(project)` returns it: SI units, machine axes. */
import type { Vec3, Vec6 } from './project/fields.ts'

export interface MountStatics {
  readonly id: string
  /** compression carried along machine z [N], positive downwards on the mount */
  readonly load: number
  /** static force of the mount on the machine, machine axes [N] */
  readonly force: Vec3
  /** displacement of the mount's top, machine axes [m] */
  readonly displacement: Vec3
  /** compression along the mount's own axis [m], positive when compressed */
  readonly deflection: number
  /** load as a share of the rated load; null where no rating is given */
  readonly ratedShare: number | null
  /** deflection as a share of the mount's own limit; null where none is given */
  readonly limitShare: number | null
  /** packing under the mount: as built, or as levelling asks for [m] */
  readonly shim: number
  /** load that levelling aims at [N]; null as built */
  readonly wishedLoad: number | null
  /** along the mount's own axis where it stands [N/m] */
  readonly staticStiffness: number
  /** stiffness of vibration along the local axes where it stands [N/m] */
  readonly dynamicStiffness: Vec3
  /** frequency that the static deflection alone suggests, √(g/δ) / 2π [Hz]; null when not pressed */
  readonly frequencyByDeflection: number | null
  /** frequency of the mount's load on its stiffness of vibration [Hz]; null when it carries none */
  readonly frequencyOnLoad: number | null
  /** whether the deflection lies beyond the points of the mount's curve */
  readonly beyondLaw: boolean
}

/** The machine under an equivalent static lateral load, all against its rest position. */
export interface LateralCase {
  /** unit vector of the load, machine axes */
  readonly direction: Vec3
  readonly bodyDisplacement: Vec6
  readonly mounts: readonly {
    readonly id: string
    /** compression carried along machine z, weight included [N] */
    readonly load: number
    /** of the mount on the machine, machine axes, weight included [N] */
    readonly force: Vec3
    /** tension that the mount or a restraint must hold [N]; 0 while it is pressed */
    readonly uplift: number
    /** horizontal way of the mount's top [m] */
    readonly sway: number
    /** sway over the free way to the snubber; null where none is given */
    readonly gapShare: number | null
    /** load as a share of the rated load; null where no rating is given */
    readonly ratedShare: number | null
  }[]
  readonly largestLoad: number
  readonly largestUplift: number
  readonly largestSway: number
  readonly largestGapShare: number | null
}

export interface LateralStatics {
  /** load over weight */
  readonly factor: number
  /** [N] */
  readonly load: number
  /** along the given direction and against it; null where the machine does not stand */
  readonly cases: readonly [LateralCase | null, LateralCase | null]
  /** to be shown wherever these figures are shown */
  readonly caution: string
}

export interface Statics {
  /** of the machine and of every absorber on it [N] */
  readonly weight: number
  /** of the absorbers alone, which hangs at their attachments [N] */
  readonly absorberWeight: number
  readonly bodyDisplacement: Vec6
  /** rotation about x and about y [rad] */
  readonly tilt: readonly [aboutX: number, aboutY: number]
  readonly mounts: readonly MountStatics[]
  /** sum of the vertical mount loads [N] and its relative distance from the weight */
  readonly loadSum: number
  readonly loadSumError: number
  /**
   * point through which a vertical static force shifts the machine without turning it (elastic centre) [m], or
   * null. Tilted mounts may ask for a twist about z besides, which no force through a point has: there it is
   * the point of the central axis.
   */
  readonly elasticCentre: Vec3 | null
  readonly setting: 'asBuilt' | 'levelled'
  /** steps that curved mounts took to their balance; 0 where every mount is linear */
  readonly iterations: number
  /** null where no lateral load is asked for */
  readonly lateral: LateralStatics | null
}
