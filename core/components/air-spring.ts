import { bracketedRoot } from '../numerics/bracketed-root.ts'
import type { AirDesign } from '../project/component-designs.ts'
import { emptyTravel, gasState, type GasColumn } from './gas-column.ts'
import { caution, invalid, missing, type ComponentProblem } from './problem.ts'
import type { Analysis } from './spring-analysis.ts'

/** Every figure at the design height and load; SI. */
export interface AirFigures {
  readonly component: 'airSpring'
  /** absolute and gauge [Pa] */
  readonly pressure: number
  readonly gaugePressure: number
  /** gas volume over effective area [m] */
  readonly effectiveHeight: number
  /** vertical stiffness of vibration and of slow changes [N/m] */
  readonly rate: number
  readonly slowRate: number
  /** slow rate to rate of vibration */
  readonly dynamicRatio: number
  /** vertical natural frequency of the load on the spring [Hz] */
  readonly frequency: number
  /** sideways, as its maker states [N/m] */
  readonly lateralRate: number | null
  /** compression when the load changes slowly to a share of the design load, without refilling [m] */
  readonly heightChange: readonly { readonly loadShare: number; readonly travel: number | null }[]
  /** load at the highest pressure [N]; null where none is given */
  readonly ratedLoad: number | null
}

const LOAD_SHARES = [0.75, 0.9, 1.1, 1.25]
/** Gauge pressure below which bellows lose their shape: common practice, no source. */
const LEAST_GAUGE = 1e5
/** How far the law is followed from the design height, over the effective height. */
const FOLLOWED = 0.5

/** The gas of a design as it fills the bellows at the design height; null where inputs lack. */
export function gasColumn(design: AirDesign): GasColumn | null {
  const { load, effectiveArea, bellowsVolume, auxiliaryVolume, atmosphericPressure, areaSlope } = design
  if (load === null || effectiveArea === null || bellowsVolume === null) return null
  return {
    pressure: atmosphericPressure + load / effectiveArea,
    atmosphere: atmosphericPressure,
    area: effectiveArea,
    areaSlope,
    volume: bellowsVolume + auxiliaryVolume,
  }
}

/**
 * Compressions between which the gas law is followed as a mount's static law [m]: half the effective
 * height up and down, less where the bellows alone would be empty before.
 */
export function followedTravel(column: GasColumn): readonly [up: number, down: number] {
  const way = FOLLOWED * Math.min(column.volume / column.area, emptyTravel(column))
  return [-way, way]
}

/**
 * What an air spring does at its design height, filled for its design load: k = n p A²/V + (p - p_atm) dA/dx.
 * Valid while the volumes communicate freely and the effective area changes evenly with height.
 * @param gravity [m/s²]
 */
export function analyseAir(design: AirDesign, gravity = 9.80665): Analysis<AirFigures> {
  const column = gasColumn(design)
  const { load } = design
  if (column === null || load === null) return { figures: null, problems: missingInputs(design) }
  const { stiffness } = gasState(column, 0, design.exponent)
  const slow = gasState(column, 0, design.slowExponent).stiffness
  if (!(stiffness > 0 && slow > 0)) {
    return {
      figures: null,
      problems: [
        invalid(
          'areaSlope',
          'The spring would fall: its effective area shrinks so fast under compression that its stiffness is negative.',
        ),
      ],
    }
  }
  const rate = stiffness * design.correction
  const gaugePressure = column.pressure - column.atmosphere
  const figures: AirFigures = {
    component: 'airSpring',
    pressure: column.pressure,
    gaugePressure,
    effectiveHeight: column.volume / column.area,
    rate,
    slowRate: slow * design.correction,
    dynamicRatio: stiffness / slow,
    frequency: Math.sqrt((rate * gravity) / load) / (2 * Math.PI),
    lateralRate: design.lateralStiffness === null ? null : design.lateralStiffness * design.correction,
    heightChange: LOAD_SHARES.map((loadShare) => ({
      loadShare,
      travel: travelUnder(column, loadShare * load, design.slowExponent),
    })),
    ratedLoad: design.highestPressure === null ? null : design.highestPressure * column.area,
  }
  return { figures, problems: remarks(design, figures) }
}

/** Compression from the design height at which the closed gas carries a load [m]; null when it cannot. */
export function travelUnder(column: GasColumn, load: number, exponent: number): number | null {
  const [up, down] = followedTravel(column)
  return bracketedRoot((travel) => gasState(column, travel, exponent).force - load, up, down)
}

function missingInputs(design: AirDesign): readonly ComponentProblem[] {
  const wanted = [
    ['load', 'Give the static load for which the spring is filled.'],
    ['effectiveArea', 'Give the effective area at the design height.'],
    ['bellowsVolume', 'Give the volume of the bellows at the design height.'],
  ] as const
  return wanted.flatMap(([field, message]) => (design[field] === null ? [missing(field, message)] : []))
}

function remarks(design: AirDesign, figures: AirFigures): readonly ComponentProblem[] {
  const problems: ComponentProblem[] = []
  if (figures.lateralRate === null) {
    problems.push(
      missing(
        'lateralStiffness',
        "Give the bellows' stiffness sideways: no formula knows it, its maker does.",
      ),
    )
  } else if (figures.lateralRate <= 0) {
    problems.push(
      invalid(
        'lateralStiffness',
        'The bellows give way sideways (their stiffness across is negative): guide them, or choose others.',
      ),
    )
  }
  if (design.highestPressure !== null && figures.gaugePressure > design.highestPressure) {
    problems.push(
      caution('load', 'The load asks for more pressure than the bellows may have: take a larger area.'),
    )
  }
  if (figures.gaugePressure < LEAST_GAUGE) {
    problems.push(
      caution('load', 'Under about 1 bar of gauge pressure bellows lose their shape: take a smaller area.'),
    )
  }
  const { bumpTravel, effectiveArea, bellowsVolume } = design
  if (bumpTravel !== null && bumpTravel * (effectiveArea ?? 0) >= (bellowsVolume ?? 0)) {
    problems.push(
      caution('bumpTravel', 'The way to the stop is longer than the bellows are high by their volume.'),
    )
  }
  return problems
}
