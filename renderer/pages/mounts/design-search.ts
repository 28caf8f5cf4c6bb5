import { searchAir } from '../../../core/components/air-search.ts'
import { searchPad } from '../../../core/components/pad-search.ts'
import { searchSpring } from '../../../core/components/spring-search.ts'
import { assertNever, InputError } from '../../../core/errors.ts'
import type { ComponentDesign, PadDesign, SpringDesign } from '../../../core/project/component-designs.ts'
import type { UnitSystem } from '../../../core/units/dimensions.ts'
import { formatNumber, formatQuantity } from '../../../core/units/format.ts'

/** What a component shall reach: a rate, or for an air spring a frequency. */
export interface Wish {
  /** [N/m], or [Hz] for an air spring */
  readonly value: number
  /** gauge pressure to work at [Pa]; null: the area decides */
  readonly pressure: number | null
}

export interface Found {
  readonly choices: readonly { readonly design: ComponentDesign; readonly text: string }[]
  /** why there is none, as a sentence; empty where there are some */
  readonly reason: string
}

/** Choices that are offered; the search orders them. */
const OFFERED = 5
/** Wire is looked for in these steps [m] up to a thickness beyond which coils are forged. */
export const WIRE_STEPS: Readonly<Record<UnitSystem, number>> = { SI: 0.5e-3, US: 25.4e-3 / 32 }
const THICKEST = 0.08

/** Components like the present one that reach the wish under its load. */
export function findDesigns(design: ComponentDesign, wish: Wish, gravity: number, units: UnitSystem): Found {
  if (design.load === null) return none('Give the load for which it is designed first.')
  try {
    return find(design, design.load, wish, gravity, units)
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    const words = error.allowed
    return none(`${words.charAt(0).toUpperCase()}${words.slice(1)}.`)
  }
}

function find(design: ComponentDesign, load: number, wish: Wish, gravity: number, units: UnitSystem): Found {
  switch (design.component) {
    case 'helicalSpring': {
      const step = WIRE_STEPS[units]
      const wireDiameters = Array.from({ length: Math.floor(THICKEST / step) }, (_, index) =>
        tidy((index + 1) * step),
      )
      const { candidates, reason } = searchSpring({ rate: wish.value, load, like: design, wireDiameters })
      return offered(
        candidates.map((candidate) => ({
          design: tidySpring(candidate.design),
          text: `${springWords(candidate.design, units)}, ${formatQuantity(candidate.figures.mass, 'mass', units, 3)}`,
        })),
        reason,
      )
    }
    case 'rubberPad': {
      const { candidates, reason } = searchPad({ rate: wish.value, load, like: design })
      return offered(
        candidates.map((candidate) => ({
          design: candidate.design,
          text: padWords(candidate.design, units),
        })),
        reason,
      )
    }
    case 'airSpring': {
      const found = searchAir({
        frequency: wish.value,
        load,
        like: design,
        gravity,
        ...(wish.pressure === null ? {} : { gaugePressure: wish.pressure }),
      })
      if (found.design === null) return none(found.reason)
      const { effectiveArea, bellowsVolume, auxiliaryVolume } = found.design
      const write = (value: number | null, dimension: 'area' | 'volume') =>
        formatQuantity(value, dimension, units)
      const text = `area ${write(effectiveArea, 'area')}, bellows ${write(bellowsVolume, 'volume')}, joined ${write(auxiliaryVolume, 'volume')}`
      return offered([{ design: found.design, text }], '')
    }
    default:
      return assertNever(design, 'component')
  }
}

const none = (reason: string): Found => ({ choices: [], reason })

function offered(choices: Found['choices'], reason: string): Found {
  return { choices: choices.slice(0, OFFERED), reason }
}

function springWords(design: SpringDesign, units: UnitSystem): string {
  const { wireDiameter, coilDiameter, activeCoils, freeLength } = design
  const coils = formatNumber(activeCoils, 'ratio', units, 3)
  return `wire ${formatQuantity(wireDiameter, 'length', units)}, coil ${formatQuantity(coilDiameter, 'length', units)}, ${coils} coils, ${formatQuantity(freeLength, 'length', units)} free`
}

function padWords({ shape, thickness, layers, rubber }: PadDesign, units: UnitSystem): string {
  const size = (value: number | null) => formatQuantity(value, 'length', units, 3)
  const outline =
    shape.kind === 'disc' ? `disc ${size(shape.diameter)}` : `${size(shape.length)} × ${size(shape.width)}`
  const height = layers === 1 ? `${size(thickness)} thick` : `${layers} layers of ${size(thickness)}`
  return `${rubber.from === 'hardness' ? `${formatNumber(rubber.hardness, 'ratio', units, 3)} IRHD, ` : ''}${outline}, ${height}`
}

/** Sizes that come out of a division, without the digits that nobody winds: rate within 1e-5. */
function tidySpring(design: SpringDesign): SpringDesign {
  const round = (value: number | null) => (value === null ? null : Number(value.toPrecision(6)))
  return { ...design, activeCoils: round(design.activeCoils), freeLength: round(design.freeLength) }
}

function tidy(value: number): number {
  return Number(value.toPrecision(12))
}
