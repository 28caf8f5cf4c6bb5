import { describe, expect, it } from 'vitest'
import { DIMENSIONS, UNIT_SYSTEMS, type Dimension, type UnitSystem } from '../../../core/units/dimensions.ts'
import { factorOf, parseQuantity } from '../../../core/units/parse.ts'

// SOURCE  International yard and pound agreement, 1959: 1 in = 25.4 mm and 1 lb = 0.453 592 37 kg, exact.
//         NIST SP 811 (2008), App. B: 1 lbf = 4.448 221 615 260 5 N, exact, from the standard
//         acceleration of gravity 9.806 65 m/s² (3rd CGPM, 1901); 1 oz = 1/16 lb, 1 ft = 12 in, 1 mil = 0.001 in.
//         Figures derived from these are written as products, so that each can be checked by eye.
const INCH = 0.0254
const FOOT = 12 * INCH
const POUND = 0.45359237
const POUND_FORCE = 4.4482216152605

// TOLERANCE  a product of a few binary numbers: some units in the last place, 1e-15 relative each.
const ROUNDING = 4e-15

const PUBLISHED: Record<Dimension, Record<UnitSystem, number>> = {
  mass: { SI: 1, US: POUND },
  length: { SI: 1e-3, US: INCH },
  deflection: { SI: 1e-3, US: INCH },
  displacement: { SI: 1e-6, US: 1e-3 * INCH },
  inertia: { SI: 1, US: POUND * FOOT ** 2 },
  stiffness: { SI: 1e3, US: POUND_FORCE / INCH },
  damping: { SI: 1, US: POUND_FORCE / INCH },
  force: { SI: 1, US: POUND_FORCE },
  moment: { SI: 1, US: POUND_FORCE * FOOT },
  stress: { SI: 1e6, US: POUND_FORCE / INCH ** 2 },
  pressure: { SI: 1e5, US: POUND_FORCE / INCH ** 2 },
  area: { SI: 1e-6, US: INCH ** 2 },
  volume: { SI: 1e-3, US: INCH ** 3 },
  density: { SI: 1, US: POUND / FOOT ** 3 },
  unbalance: { SI: 1e-6, US: (POUND / 16) * INCH },
  shaftSpeed: { SI: (2 * Math.PI) / 60, US: (2 * Math.PI) / 60 },
  frequency: { SI: 1, US: 1 },
  velocity: { SI: 1e-3, US: INCH },
  acceleration: { SI: 1, US: FOOT },
  balanceGrade: { SI: 1e-3, US: 1e-3 },
  time: { SI: 1, US: 1 },
  angle: { SI: Math.PI / 180, US: Math.PI / 180 },
  ratio: { SI: 1, US: 1 },
  share: { SI: 0.01, US: 0.01 },
}
const CASES = UNIT_SYSTEMS.flatMap(
  (system) => (Object.keys(PUBLISHED) as Dimension[]).map((dimension) => ({ dimension, system })), // keys of a Record
)

describe('size of the display units', () => {
  it.each(CASES)('is the published one: $dimension in $system', ({ dimension, system }) => {
    const expected = PUBLISHED[dimension][system]
    expect(Math.abs(factorOf(dimension, system) / expected - 1)).toBeLessThan(ROUNDING)
  })

  it.each(CASES)('is what the label reads as: $dimension in $system', ({ dimension, system }) => {
    const label = DIMENSIONS[dimension][system][1]
    const read = parseQuantity(`1 ${label}`, dimension, system)
    expect(Math.abs(read / factorOf(dimension, system) - 1)).toBeLessThan(ROUNDING)
  })
})

describe('units that a person may type', () => {
  // SOURCE  as above; kgf and slug follow from standard gravity and from lbf s²/ft.
  it.each<[string, Dimension, number]>([
    ['1 lb', 'mass', POUND],
    ['1 slug', 'mass', POUND_FORCE / FOOT],
    ['1 tonne', 'mass', 1000],
    ['1 slug ft^2', 'inertia', POUND_FORCE * FOOT],
    ['1 lbf in s^2', 'inertia', POUND_FORCE * INCH],
    ['1 kgf', 'force', 9.80665],
    ['1 kip', 'force', 1000 * POUND_FORCE],
    ['1 lb', 'force', POUND_FORCE],
    ['1 lb/in', 'stiffness', POUND_FORCE / INCH],
    ['1 kN/m', 'stiffness', 1000],
    ['1 ft-lb', 'moment', POUND_FORCE * FOOT],
    ['1 lbf ft', 'moment', POUND_FORCE * FOOT],
    ['1 lbf s/in', 'damping', POUND_FORCE / INCH],
    ['1 oz-in', 'unbalance', (POUND / 16) * INCH],
    ['1 g·mm', 'unbalance', 1e-6],
    ['1 ips', 'velocity', INCH],
    ['1 g', 'acceleration', 9.80665],
    ['1 µm', 'displacement', 1e-6],
    ['1 micron', 'displacement', 1e-6],
    ['1 mil', 'displacement', 1e-3 * INCH],
    ['1 Hz', 'shaftSpeed', 2 * Math.PI],
    ['1 rad/s', 'frequency', 1 / (2 * Math.PI)],
    ['60 rpm', 'frequency', 1],
    ['60 CPM', 'frequency', 1],
    ['60 min⁻¹', 'shaftSpeed', 2 * Math.PI],
    ['60 rev/min', 'shaftSpeed', 2 * Math.PI],
    ['60 1/min', 'shaftSpeed', 2 * Math.PI],
    ['G 6.3', 'balanceGrade', 0.0063],
    ['180°', 'angle', Math.PI],
    ['25 %', 'share', 0.25],
    ['5 %', 'ratio', 0.05],
  ])('reads %s of %s', (text, dimension, expected) => {
    expect(Math.abs(parseQuantity(text, dimension) / expected - 1)).toBeLessThan(ROUNDING)
  })
})
