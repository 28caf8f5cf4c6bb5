import type { PadFigures } from '../components/rubber-pad.ts'
import type { SpringFigures } from '../components/spring-analysis.ts'
import type { AirFigures } from '../components/air-spring.ts'
import type { ComponentFigures } from '../components/analyse.ts'
import { assertNever } from '../errors.ts'
import type { ComponentDesign } from '../project/component-designs.ts'
import type { Dimension, UnitSystem } from '../units/dimensions.ts'
import { formatQuantity } from '../units/format.ts'

/** One computed figure of a component, as it is read. */
export interface FigureLine {
  readonly label: string
  readonly text: string
  /** beyond what is allowed */
  readonly refused?: boolean
}

const RATED_BY = {
  travel: 'by travel',
  stress: 'by stress',
  stability: 'by stability',
  compression: 'by compression',
} as const

/** The figures of a designed component in the order in which one asks for them. */
export function figureLines(
  design: ComponentDesign,
  figures: ComponentFigures,
  units: UnitSystem,
): readonly FigureLine[] {
  const write: Write = (value, dimension, digits = 4) => formatQuantity(value, dimension, units, digits)
  switch (figures.component) {
    case 'helicalSpring':
      return springLines(figures, write)
    case 'rubberPad':
      return design.component === 'rubberPad' ? padLines(figures, design.compressionLimit, write) : []
    case 'airSpring':
      return airLines(figures, write)
    default:
      return assertNever(figures, 'component')
  }
}

type Write = (value: number | null, dimension: Dimension, digits?: number) => string

function springLines(figures: SpringFigures, write: Write): readonly FigureLine[] {
  const { permissibleStress: permissible, bucklingDeflection: buckling } = figures
  return [
    {
      label: 'Rate along, across',
      text: `${write(figures.rate, 'stiffness')}, ${orUnstable(figures.lateralRate, write)}`,
    },
    { label: 'Deflection under the load', text: write(figures.deflection, 'deflection') },
    {
      label: 'Travel with clearance, to solid',
      text: `${write(figures.workingTravel, 'deflection')}, ${write(figures.solidTravel, 'deflection')}`,
      refused: figures.deflection > figures.workingTravel,
    },
    {
      label: 'Shear stress, corrected (Wahl)',
      text: `${write(figures.wahlStress, 'stress')} of ${permissible === null ? 'a limit not given' : write(permissible, 'stress')}`,
      refused: permissible !== null && figures.wahlStress > permissible,
    },
    { label: 'The same after Bergsträsser', text: write(figures.bergstraesserStress, 'stress') },
    { label: 'Pressed solid, uncorrected', text: write(figures.solidStress, 'stress') },
    {
      label: 'Buckles at a deflection of',
      text: buckling === null ? 'none' : write(buckling, 'deflection'),
      refused: buckling !== null && figures.deflection >= buckling,
    },
    { label: 'First surge of the coils', text: write(figures.surgeFrequency, 'frequency') },
    { label: 'Coil over wire diameter', text: write(figures.index, 'ratio') },
    {
      label: 'Length under the load, solid',
      text: `${write(figures.loadedLength, 'length')}, ${write(figures.solidLength, 'length')}`,
    },
    { label: 'Mass of the wire', text: write(figures.mass, 'mass') },
    { label: 'Rated load', text: `${write(figures.ratedLoad, 'force')} ${RATED_BY[figures.ratedBy]}` },
  ]
}

function padLines(figures: PadFigures, limit: number, write: Write): readonly FigureLine[] {
  const [alongX, alongY] = figures.lateralRate
  return [
    { label: 'Rate, vertical', text: write(figures.rate, 'stiffness') },
    { label: 'Rate sideways, x, y', text: `${orUnstable(alongX, write)}, ${orUnstable(alongY, write)}` },
    { label: 'In pure shear', text: write(figures.shearRate, 'stiffness') },
    { label: 'Deflection under the load', text: write(figures.deflection, 'deflection') },
    {
      label: 'Compression',
      text: `${write(figures.strain, 'share', 3)} of at most ${write(limit, 'share', 3)}`,
      refused: figures.strain > limit,
    },
    { label: 'Stress on the loaded area', text: write(figures.stress, 'stress') },
    { label: 'Shape factor', text: write(figures.shapeFactor, 'ratio', 3) },
    { label: 'Compression modulus', text: write(figures.compressionModulus, 'stress') },
    {
      label: "Young's modulus, shear modulus",
      text: `${write(figures.moduli.youngsModulus, 'stress', 3)}, ${write(figures.moduli.shearModulus, 'stress', 3)}`,
    },
    ...(figures.modulusByGent === null
      ? []
      : [{ label: "Young's modulus after Gent", text: write(figures.modulusByGent, 'stress', 3) }]),
    { label: 'Shift sideways at the shear limit', text: write(figures.shearTravel, 'deflection') },
    { label: 'Gives way sideways under', text: write(figures.bucklingLoad, 'force') },
    ...(figures.creep === null
      ? []
      : [{ label: 'Creep, one minute to ten years', text: write(figures.creep, 'deflection', 3) }]),
    { label: 'Rated load', text: `${write(figures.ratedLoad, 'force')} ${RATED_BY[figures.ratedBy]}` },
  ]
}

function airLines(figures: AirFigures, write: Write): readonly FigureLine[] {
  return [
    {
      label: 'Rate of vibration, slow',
      text: `${write(figures.rate, 'stiffness')}, ${write(figures.slowRate, 'stiffness')}`,
    },
    { label: 'Rate sideways', text: write(figures.lateralRate, 'stiffness') },
    { label: 'Vertical frequency under the load', text: write(figures.frequency, 'frequency') },
    { label: 'Gauge pressure', text: write(figures.gaugePressure, 'pressure') },
    { label: 'Volume over effective area', text: write(figures.effectiveHeight, 'length') },
    ...figures.heightChange.map(({ loadShare, travel }) => ({
      label: `At ${write(loadShare, 'share', 3)} of the load, not refilled`,
      text:
        travel === null
          ? 'beyond what is followed'
          : `${travel < 0 ? 'rises' : 'sinks'} by ${write(Math.abs(travel), 'deflection', 3)}`,
    })),
    { label: 'Load at the highest pressure', text: write(figures.ratedLoad, 'force') },
  ]
}

function orUnstable(rate: number | null, write: Write): string {
  return rate === null ? 'gives way' : write(rate, 'stiffness')
}
