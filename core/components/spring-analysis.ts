import type { SpringDesign } from '../project/component-designs.ts'
import {
  activeMass,
  bergstraesserFactor,
  bucklingDeflection,
  leastClearance,
  shearStress,
  solidLength,
  springLateralRate,
  springRate,
  surgeFrequency,
  wahlFactor,
  type SpringGeometry,
} from './helical-spring.ts'
import { caution, invalid, missing, type ComponentProblem } from './problem.ts'

/** Every figure at the design load; SI. */
export interface SpringFigures {
  readonly component: 'helicalSpring'
  /** axial [N/m] */
  readonly rate: number
  /** D/d */
  readonly index: number
  readonly wahlFactor: number
  readonly bergstraesserFactor: number
  /** at the design load [Pa]: uncorrected, and with each factor */
  readonly shearStress: number
  readonly wahlStress: number
  readonly bergstraesserStress: number
  /** uncorrected, with all coils touching [Pa] */
  readonly solidStress: number
  /** permissible shear stress [Pa]; null where the strength of the wire is not given */
  readonly permissibleStress: number | null
  /** [m] */
  readonly deflection: number
  readonly loadedLength: number
  readonly totalCoils: number
  readonly solidLength: number
  /** clearance that must be left between the coils, in all [m] */
  readonly clearance: number
  /** deflection that leaves the clearance, and until the coils touch [m] */
  readonly workingTravel: number
  readonly solidTravel: number
  /** across the axis [N/m]; null where the spring gives way sideways */
  readonly lateralRate: number | null
  /** lateralRate over rate */
  readonly lateralRatio: number | null
  /** [m]; null when it buckles at no deflection */
  readonly bucklingDeflection: number | null
  /** first surge of the coils between two still ends [Hz] */
  readonly surgeFrequency: number
  /** of the wire [m], [kg] */
  readonly wireLength: number
  readonly mass: number
  /** of the free coils against the plane across the axis [rad] */
  readonly pitchAngle: number
  /** largest static load by travel, stress and stability [N] */
  readonly ratedLoad: number
  /** which of them governs */
  readonly ratedBy: 'travel' | 'stress' | 'stability'
}

export interface Analysis<Figures> {
  /** null where inputs are missing or contradict each other */
  readonly figures: Figures | null
  readonly problems: readonly ComponentProblem[]
}

/** Buckling is kept away from by this share of its deflection: common practice, no source. */
const STABLE_SHARE = 0.8
/** Steepest coil for which the rate formula is used without remark: common practice, no source. */
const STEEP = (12 * Math.PI) / 180

/** A spring design as geometry, with the measured correction in its moduli; null where inputs lack. */
export function springGeometry(design: SpringDesign): SpringGeometry | null {
  const { wireDiameter, coilDiameter, activeCoils, material, correction } = design
  if (wireDiameter === null || coilDiameter === null || activeCoils === null) return null
  return {
    wireDiameter,
    coilDiameter,
    activeCoils,
    shearModulus: material.shearModulus * correction,
    youngsModulus: material.youngsModulus * correction,
  }
}

/** What a helical spring does at its design load, within its limits of stress, travel and stability. */
export function analyseSpring(design: SpringDesign): Analysis<SpringFigures> {
  const geometry = springGeometry(design)
  const { freeLength, load } = design
  if (geometry === null || freeLength === null || load === null) {
    return { figures: null, problems: missingInputs(design) }
  }
  const index = geometry.coilDiameter / geometry.wireDiameter
  const totalCoils = geometry.activeCoils + design.endCoils
  const solid = solidLength(geometry.wireDiameter, totalCoils, design.ends)
  const clearance = leastClearance(geometry, design.forming)
  const impossible = impossibilities(index, freeLength, solid, clearance)
  if (impossible.length > 0) return { figures: null, problems: impossible }
  const rate = springRate(geometry)
  const deflection = load / rate
  const stress = (force: number) => shearStress(geometry.wireDiameter, geometry.coilDiameter, force)
  const { strength, permissibleShare } = design.material
  const permissibleStress = strength === null ? null : permissibleShare * strength
  const lateralRate = springLateralRate(geometry, freeLength, deflection)
  const buckling = bucklingDeflection(geometry, freeLength, design.seating)
  const solidTravel = freeLength - solid
  const wireLength = Math.PI * geometry.coilDiameter * totalCoils
  const { density } = design.material
  const perActive = activeMass(geometry, density)
  const figures: SpringFigures = {
    component: 'helicalSpring',
    rate,
    index,
    wahlFactor: wahlFactor(index),
    bergstraesserFactor: bergstraesserFactor(index),
    shearStress: stress(load),
    wahlStress: wahlFactor(index) * stress(load),
    bergstraesserStress: bergstraesserFactor(index) * stress(load),
    solidStress: stress(rate * solidTravel),
    permissibleStress,
    deflection,
    loadedLength: freeLength - deflection,
    totalCoils,
    solidLength: solid,
    clearance,
    workingTravel: solidTravel - clearance,
    solidTravel,
    lateralRate,
    lateralRatio: lateralRate === null ? null : lateralRate / rate,
    bucklingDeflection: buckling,
    surgeFrequency: surgeFrequency(geometry, density),
    wireLength,
    mass: (perActive * totalCoils) / geometry.activeCoils,
    pitchAngle: Math.atan(
      (geometry.wireDiameter + (freeLength - solid) / geometry.activeCoils) /
        (Math.PI * geometry.coilDiameter),
    ),
    ...ratedLoad(rate, solidTravel - clearance, buckling, permissibleStress, wahlFactor(index) * stress(1)),
  }
  return { figures, problems: remarks(design, figures) }
}

function ratedLoad(
  rate: number,
  travel: number,
  buckling: number | null,
  permissible: number | null,
  stressPerNewton: number,
): Pick<SpringFigures, 'ratedLoad' | 'ratedBy'> {
  const limits: { ratedLoad: number; ratedBy: SpringFigures['ratedBy'] }[] = [
    { ratedLoad: rate * travel, ratedBy: 'travel' },
  ]
  if (permissible !== null) limits.push({ ratedLoad: permissible / stressPerNewton, ratedBy: 'stress' })
  if (buckling !== null) {
    limits.push({ ratedLoad: STABLE_SHARE * rate * buckling, ratedBy: 'stability' })
  }
  return limits.reduce((least, limit) => (limit.ratedLoad < least.ratedLoad ? limit : least))
}

function missingInputs(design: SpringDesign): readonly ComponentProblem[] {
  const wanted = [
    ['wireDiameter', 'Give the diameter of the wire.'],
    ['coilDiameter', 'Give the mean diameter of the coils.'],
    ['activeCoils', 'Give the number of active coils.'],
    ['freeLength', 'Give the length of the spring without load.'],
    ['load', 'Give the static load for which the spring is designed.'],
  ] as const
  return wanted.flatMap(([field, message]) => (design[field] === null ? [missing(field, message)] : []))
}

function impossibilities(
  index: number,
  freeLength: number,
  solid: number,
  clearance: number,
): readonly ComponentProblem[] {
  if (!(index > 1.2)) {
    return [invalid('coilDiameter', 'The coils are no wider than their wire: give the mean coil diameter.')]
  }
  if (!(freeLength > solid + clearance)) {
    return [
      invalid(
        'freeLength',
        'The spring has no travel: its free length must exceed the coils lying on each other and the clearance between them.',
      ),
    ]
  }
  return []
}

function remarks(design: SpringDesign, figures: SpringFigures): readonly ComponentProblem[] {
  const problems: ComponentProblem[] = []
  const { deflection, solidTravel, workingTravel, lateralRatio, bucklingDeflection: buckling } = figures
  if (deflection >= solidTravel) {
    problems.push(invalid('load', 'The load presses the coils solid: the spring no longer isolates.'))
  } else if (deflection > workingTravel) {
    problems.push(
      caution('load', 'Under the load the coils come closer than the clearance that should be left.'),
    )
  }
  if (lateralRatio === null || (buckling !== null && deflection >= buckling)) {
    problems.push(
      invalid(
        'freeLength',
        'The spring gives way sideways under the load (its stiffness across the axis is negative): make it shorter or wider.',
      ),
    )
  } else if (buckling !== null && deflection > STABLE_SHARE * buckling) {
    problems.push(
      caution(
        'freeLength',
        `The load is ${percent(deflection / buckling)} of that which buckles the spring.`,
      ),
    )
  }
  if (figures.permissibleStress === null) {
    problems.push(
      caution('material.strength', 'The stress is not judged: give the tensile strength of the wire.'),
    )
  } else {
    stressRemarks(problems, figures, figures.permissibleStress)
  }
  if (figures.index < 4 || figures.index > 20) {
    problems.push(
      caution(
        'coilDiameter',
        'The ratio of coil to wire diameter lies outside 4 to 20, for which the formulas are meant.',
      ),
    )
  }
  if ((design.activeCoils ?? 0) < 2) {
    problems.push(caution('activeCoils', 'The formulas are meant for two active coils and more.'))
  }
  if (figures.pitchAngle > STEEP) {
    problems.push(
      caution(
        'freeLength',
        'The coils are steep (above 12°): the rate formula is meant for coils of small pitch.',
      ),
    )
  }
  return problems
}

function stressRemarks(problems: ComponentProblem[], figures: SpringFigures, permissible: number): void {
  if (figures.wahlStress > permissible) {
    problems.push(
      caution(
        'material.strength',
        `Under the load the wire is stressed to ${percent(figures.wahlStress / permissible)} of what is permissible.`,
      ),
    )
  } else if (figures.solidStress > permissible) {
    problems.push(
      caution(
        'material.strength',
        `Pressed solid, the wire would be stressed to ${percent(figures.solidStress / permissible)} of what is permissible: a stop must keep it from that.`,
      ),
    )
  }
}

function percent(share: number): string {
  return `${(100 * share).toFixed(0)} %`
}
