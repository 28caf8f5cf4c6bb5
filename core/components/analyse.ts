import { assertNever } from '../errors.ts'
import type { ComponentDesign } from '../project/component-designs.ts'
import type { Vec3 } from '../project/fields.ts'
import { analyseAir, gasColumn, type AirFigures } from './air-spring.ts'
import type { GasColumn } from './gas-column.ts'
import type { ComponentProblem } from './problem.ts'
import { analysePad, type PadFigures } from './rubber-pad.ts'
import { analyseSpring, type SpringFigures } from './spring-analysis.ts'

export type ComponentFigures = SpringFigures | PadFigures | AirFigures

/** A component as a mount sees it; SI. */
export interface ComponentMount {
  /** static, along the local axes [N/m] */
  readonly stiffness: Vec3
  /** dynamic over static stiffness; null: as given for the mount type */
  readonly dynamicRatio: number | null
  /** [N]; null where no limit is known */
  readonly ratedLoad: number | null
  /** [m] */
  readonly deflectionLimit: number | null
  /** free height, or the design height of an air spring [m] */
  readonly height: number | null
  /** the gas that carries the load instead of a spring that starts from nothing; null for solids */
  readonly gas: {
    readonly column: GasColumn
    readonly exponent: number
    readonly slowExponent: number
    /** stiffness as measured over as computed */
    readonly correction: number
  } | null
}

export interface ComponentAnalysis {
  readonly figures: ComponentFigures | null
  /** null when the component cannot serve as a mount; `problems` say why */
  readonly mount: ComponentMount | null
  readonly problems: readonly ComponentProblem[]
}

/**
 * Figures, remarks and mount values of a designed component, whatever its kind.
 * @param gravity [m/s²]
 */
export function analyseComponent(design: ComponentDesign, gravity = 9.80665): ComponentAnalysis {
  switch (design.component) {
    case 'helicalSpring': {
      const { figures, problems } = analyseSpring(design)
      return { figures, problems, mount: figures === null ? null : springMount(figures) }
    }
    case 'rubberPad': {
      const { figures, problems } = analysePad(design)
      return { figures, problems, mount: figures === null ? null : padMount(figures, design) }
    }
    case 'airSpring': {
      const { figures, problems } = analyseAir(design, gravity)
      const column = gasColumn(design)
      const mount = figures === null || column === null ? null : airMount(figures, design, column)
      return { figures, problems, mount }
    }
    default:
      return assertNever(design, 'component')
  }
}

function springMount(figures: SpringFigures): ComponentMount | null {
  if (figures.lateralRate === null || figures.deflection >= figures.solidTravel) return null
  if (figures.bucklingDeflection !== null && figures.deflection >= figures.bucklingDeflection) return null
  return {
    stiffness: [figures.lateralRate, figures.lateralRate, figures.rate],
    dynamicRatio: null,
    ratedLoad: figures.ratedLoad,
    deflectionLimit: figures.ratedLoad / figures.rate,
    height: figures.loadedLength + figures.deflection,
    gas: null,
  }
}

function padMount(
  figures: PadFigures,
  design: Extract<ComponentDesign, { component: 'rubberPad' }>,
): ComponentMount | null {
  const [alongX, alongY] = figures.lateralRate
  if (alongX === null || alongY === null) return null
  return {
    stiffness: [alongX, alongY, figures.rate],
    dynamicRatio: null,
    ratedLoad: figures.ratedLoad,
    deflectionLimit: figures.ratedLoad / figures.rate,
    height: (design.thickness ?? 0) * design.layers,
    gas: null,
  }
}

function airMount(
  figures: AirFigures,
  design: Extract<ComponentDesign, { component: 'airSpring' }>,
  column: GasColumn,
): ComponentMount | null {
  if (figures.lateralRate === null || figures.lateralRate <= 0) return null
  return {
    stiffness: [figures.lateralRate, figures.lateralRate, figures.slowRate],
    dynamicRatio: figures.dynamicRatio,
    ratedLoad: figures.ratedLoad,
    deflectionLimit: design.bumpTravel,
    height: design.height,
    gas: {
      column,
      exponent: design.exponent,
      slowExponent: design.slowExponent,
      correction: design.correction,
    },
  }
}
