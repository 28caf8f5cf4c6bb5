/**
 * Bonded rubber pad in compression and shear.
 * [1] P. B. Lindley, Engineering Design with Natural Rubber (from memory); A. N. Gent and P. B. Lindley,
 *     The compression of bonded rubber blocks, Proc. IMechE 173, 1959: E_c = E0 (1 + 2 k S²).
 * [2] bending of a bonded block, E_b = E0 (1 + 2/3 k S²): the pressure part is a third of that in
 *     compression (A. N. Gent and E. A. Meinecke, Polymer Engineering and Science 10, 1970, from memory).
 * [3] haringx-column.ts for shear with bending under a compressive load.
 * Validity: compression up to about 15 %, shear up to about 30 % of the thickness, layers that shear
 * rather than bend, natural rubber in its ordinary range of temperature.
 */
import type { PadDesign } from '../project/component-designs.ts'
import { bucklingForce, transverseStiffness } from './haringx-column.ts'
import { idealPressureCoefficient, padSection, shapeFactor, type PadSection } from './pad-geometry.ts'
import { caution, invalid, missing, type ComponentProblem } from './problem.ts'
import { rubberModuli, youngsModulusFromShore, type RubberModuli } from './rubber.ts'
import type { Analysis } from './spring-analysis.ts'

/** Every figure at the design load; SI. */
export interface PadFigures {
  readonly component: 'rubberPad'
  readonly moduli: RubberModuli
  /** Young's modulus by Gent's relation at the same hardness, for comparison [Pa]; null without hardness */
  readonly modulusByGent: number | null
  /** loaded area [m²] */
  readonly area: number
  readonly shapeFactor: number
  /** E_c, with the compressibility where it is counted [Pa] */
  readonly compressionModulus: number
  /** vertical, all layers [N/m] */
  readonly rate: number
  /** pure shear G A / t, all layers [N/m] */
  readonly shearRate: number
  /** sideways along local x and y with bending and the load [N/m]; null where the pad gives way */
  readonly lateralRate: readonly [alongX: number | null, alongY: number | null]
  /** stress over the loaded area [Pa] */
  readonly stress: number
  /** [m], and as a share of the thickness */
  readonly deflection: number
  readonly strain: number
  /** load at the compression limit and at a fifth under buckling, whichever is less [N] */
  readonly ratedLoad: number
  readonly ratedBy: 'compression' | 'stability'
  /** sideways shift at the shear limit [m] */
  readonly shearTravel: number
  /** compressive load at which the pad gives way sideways [N] */
  readonly bucklingLoad: number
  /** further sinking between one minute and ten years under load [m]; null without a creep figure */
  readonly creep: number | null
  /** C of the ideal pressure part C G S²; null for a disc */
  readonly pressureCoefficient: number | null
}

/** From one minute to ten years in tenfolds of time. */
const CREEP_DECADES = Math.log10(10 * 365.25 * 24 * 60)
/** Shape factors beyond these are outside common use and the formula's fit: common practice, no source. */
const SHAPE_FACTORS = [0.1, 6] as const
/** A layer thicker than this share of its width bends as much as it shears: common practice, no source. */
const TALL = 0.5
/** Sideways rate over pure shear below which the load's part is worth a word. */
const SOFTENED = 0.7
const STABLE_SHARE = 0.8
/** Ideal pressure coefficient that the block formula stands for, and how far off is worth a word. */
const DISC_COEFFICIENT = 6
const COEFFICIENT_OFF = 0.15

/** Compression modulus of a bonded layer [Pa]: [1], and in series with the bulk modulus where counted. */
export function compressionModulus(moduli: RubberModuli, shape: number, compressible: boolean): number {
  const incompressible = moduli.youngsModulus * (1 + 2 * moduli.compressionFactor * shape ** 2)
  return compressible ? 1 / (1 / incompressible + 1 / moduli.bulkModulus) : incompressible
}

/** Moduli of a design with its measured correction; null outside the table or where not given. */
export function padModuli({ rubber, correction }: PadDesign): RubberModuli | null {
  const plain = rubber.from === 'hardness' ? ofHardness(rubber.hardness) : ofTyped(rubber)
  if (plain === null) return null
  return {
    youngsModulus: plain.youngsModulus * correction,
    shearModulus: plain.shearModulus * correction,
    compressionFactor: plain.compressionFactor,
    bulkModulus: plain.bulkModulus * correction,
  }
}

function ofHardness(hardness: number | null): RubberModuli | null {
  return hardness === null ? null : rubberModuli(hardness)
}

function ofTyped(rubber: Extract<PadDesign['rubber'], { from: 'typed' }>): RubberModuli | null {
  const { youngsModulus, shearModulus, compressionFactor, bulkModulus } = rubber
  if (youngsModulus === null || shearModulus === null) return null
  return { youngsModulus, shearModulus, compressionFactor, bulkModulus }
}

/** What a rubber pad does at its design load, within its limits of strain and stability. */
export function analysePad(design: PadDesign): Analysis<PadFigures> {
  const moduli = padModuli(design)
  const section = padSection(design.shape)
  const { thickness, layers, load } = design
  if (moduli === null || section === null || thickness === null || load === null) {
    return { figures: null, problems: unusableInputs(design, section) }
  }
  const shape = shapeFactor(section, thickness)
  const modulus = compressionModulus(moduli, shape, design.volumeCompressibility)
  const rate = (modulus * section.area) / (thickness * layers)
  const height = thickness * layers
  const column = (direction: 0 | 1) => ({
    length: height,
    shearRigidity: moduli.shearModulus * section.area,
    bendingRigidity: bendingModulus(moduli, shape) * section.secondMoment[direction],
  })
  const bucklingLoad = Math.min(bucklingForce(column(0), 1), bucklingForce(column(1), 1))
  const byCompression = rate * design.compressionLimit * height
  const deflection = load / rate
  const stable = STABLE_SHARE * bucklingLoad
  const { rubber } = design
  const figures: PadFigures = {
    component: 'rubberPad',
    moduli,
    modulusByGent:
      rubber.from === 'hardness' && rubber.hardness !== null ? youngsModulusFromShore(rubber.hardness) : null,
    area: section.area,
    shapeFactor: shape,
    compressionModulus: modulus,
    rate,
    shearRate: (moduli.shearModulus * section.area) / height,
    lateralRate: [transverseStiffness(column(0), load), transverseStiffness(column(1), load)],
    stress: load / section.area,
    deflection,
    strain: deflection / height,
    ratedLoad: Math.min(byCompression, stable),
    ratedBy: byCompression <= stable ? 'compression' : 'stability',
    shearTravel: design.shearLimit * height,
    bucklingLoad,
    creep: design.creepPerDecade === null ? null : design.creepPerDecade * CREEP_DECADES * deflection,
    pressureCoefficient: design.shape.kind === 'rectangle' ? idealPressureCoefficient(section.aspect) : null,
  }
  return { figures, problems: remarks(design, section, figures) }
}

function bendingModulus(moduli: RubberModuli, shape: number): number {
  return moduli.youngsModulus * (1 + (2 / 3) * moduli.compressionFactor * shape ** 2)
}

function unusableInputs(design: PadDesign, section: PadSection | null): readonly ComponentProblem[] {
  const problems: ComponentProblem[] = []
  const { shape, rubber } = design
  if (section === null) {
    const wide = shape.kind === 'disc' && shape.diameter !== null
    problems.push(
      wide
        ? invalid('shape.bore', 'The hole is as wide as the disc.')
        : missing(
            shape.kind === 'disc' ? 'shape.diameter' : shape.length === null ? 'shape.length' : 'shape.width',
            'Give the size of the pad.',
          ),
    )
  }
  if (design.thickness === null) problems.push(missing('thickness', 'Give the thickness of the rubber.'))
  if (design.load === null) {
    problems.push(missing('load', 'Give the static load for which the pad is designed.'))
  }
  if (padModuli(design) === null) {
    if (rubber.from === 'hardness' && rubber.hardness !== null) {
      problems.push(
        invalid(
          'rubber.hardness',
          'The table of rubber goes from 30 to 75 IRHD: type measured moduli instead.',
        ),
      )
    } else {
      const field = rubber.from === 'hardness' ? 'rubber.hardness' : 'rubber.youngsModulus'
      problems.push(missing(field, 'Give the hardness of the rubber, or its moduli.'))
    }
  }
  return problems
}

function remarks(design: PadDesign, section: PadSection, figures: PadFigures): readonly ComponentProblem[] {
  const problems: ComponentProblem[] = []
  const softest = figures.lateralRate.reduce((a, b) => (a === null || b === null ? null : Math.min(a, b)))
  if (softest === null) {
    problems.push(
      invalid(
        'thickness',
        'The pad gives way sideways under the load (its stiffness across is negative): make it thinner or wider.',
      ),
    )
  } else if (figures.bucklingLoad * STABLE_SHARE < (design.load ?? 0)) {
    problems.push(caution('thickness', 'The load comes within a fifth of that under which the pad buckles.'))
  } else if (softest < SOFTENED * figures.shearRate) {
    problems.push(
      caution(
        'thickness',
        `Bending and the load leave ${percent(softest / figures.shearRate)} of the stiffness in pure shear.`,
      ),
    )
  }
  if (figures.strain > design.compressionLimit) {
    problems.push(
      caution(
        'load',
        `The load compresses the rubber by ${percent(figures.strain)} of its thickness, beyond the limit of ${percent(design.compressionLimit)}.`,
      ),
    )
  }
  if (figures.shapeFactor < SHAPE_FACTORS[0] || figures.shapeFactor > SHAPE_FACTORS[1]) {
    problems.push(
      caution('thickness', 'The shape factor lies outside 0.1 to 6, for which the block formula is meant.'),
    )
  }
  if (design.thickness !== null && design.thickness > TALL * section.width) {
    problems.push(
      caution('thickness', 'The layer is more than half as thick as wide: it bends as much as it shears.'),
    )
  }
  const { pressureCoefficient: ideal } = figures
  if (ideal !== null && Math.abs(ideal / DISC_COEFFICIENT - 1) > COEFFICIENT_OFF) {
    problems.push(
      caution(
        'shape',
        `For so long a rectangle the part of its stiffness that comes from pressure is ${percent(ideal / DISC_COEFFICIENT)} of what the block formula takes.`,
      ),
    )
  }
  if (design.creepPerDecade === null) {
    problems.push(
      caution(
        'creepPerDecade',
        'Rubber goes on sinking under load: allow for creep in heights, pipes and couplings, or give its rate.',
      ),
    )
  }
  return problems
}

function percent(share: number): string {
  return `${(100 * share).toFixed(0)} %`
}
