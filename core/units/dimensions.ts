/**
 * The quantities that Stillbed knows, each with the unit in which a person reads it.
 * Inside the core every value is SI (rad/s for shaft speed); these units exist at the edges only.
 */
export const UNIT_SYSTEMS = ['SI', 'US'] as const
export type UnitSystem = (typeof UNIT_SYSTEMS)[number]

interface DimensionSpec {
  /** unit of the stored value, in mathjs spelling; empty for a pure number */
  readonly base: string
  readonly baseLabel: string
  /** unit shown in each system: mathjs spelling, label on screen */
  readonly SI: readonly [unit: string, label: string]
  readonly US: readonly [unit: string, label: string]
}

export const DIMENSIONS = {
  mass: { base: 'kg', baseLabel: 'kg', SI: ['kg', 'kg'], US: ['lb', 'lb'] },
  length: { base: 'm', baseLabel: 'm', SI: ['mm', 'mm'], US: ['inch', 'in'] },
  deflection: { base: 'm', baseLabel: 'm', SI: ['mm', 'mm'], US: ['inch', 'in'] },
  displacement: { base: 'm', baseLabel: 'm', SI: ['um', 'µm'], US: ['mil', 'mil'] },
  inertia: {
    base: 'kg m^2',
    baseLabel: 'kg m²',
    SI: ['kg m^2', 'kg m²'],
    US: ['lb ft^2', 'lb ft²'],
  },
  stiffness: { base: 'N/m', baseLabel: 'N/m', SI: ['N/mm', 'N/mm'], US: ['lbf/inch', 'lbf/in'] },
  damping: {
    base: 'N s/m',
    baseLabel: 'N s/m',
    SI: ['N s/m', 'N s/m'],
    US: ['lbf s/inch', 'lbf s/in'],
  },
  force: { base: 'N', baseLabel: 'N', SI: ['N', 'N'], US: ['lbf', 'lbf'] },
  moment: { base: 'N m', baseLabel: 'N m', SI: ['N m', 'N m'], US: ['lbf ft', 'lbf ft'] },
  /** stress in a material, and its moduli */
  stress: { base: 'Pa', baseLabel: 'Pa', SI: ['MPa', 'MPa'], US: ['psi', 'psi'] },
  /** of a gas */
  pressure: { base: 'Pa', baseLabel: 'Pa', SI: ['bar', 'bar'], US: ['psi', 'psi'] },
  area: { base: 'm^2', baseLabel: 'm²', SI: ['mm^2', 'mm²'], US: ['inch^2', 'in²'] },
  volume: { base: 'm^3', baseLabel: 'm³', SI: ['litre', 'L'], US: ['inch^3', 'in³'] },
  density: { base: 'kg/m^3', baseLabel: 'kg/m³', SI: ['kg/m^3', 'kg/m³'], US: ['lb/ft^3', 'lb/ft³'] },
  unbalance: { base: 'kg m', baseLabel: 'kg m', SI: ['g mm', 'g mm'], US: ['oz inch', 'oz in'] },
  shaftSpeed: { base: 'rad/s', baseLabel: 'rad/s', SI: ['rpm', 'rpm'], US: ['rpm', 'rpm'] },
  frequency: { base: 'Hz', baseLabel: 'Hz', SI: ['Hz', 'Hz'], US: ['Hz', 'Hz'] },
  velocity: { base: 'm/s', baseLabel: 'm/s', SI: ['mm/s', 'mm/s'], US: ['inch/s', 'in/s'] },
  acceleration: { base: 'm/s^2', baseLabel: 'm/s²', SI: ['m/s^2', 'm/s²'], US: ['ft/s^2', 'ft/s²'] },
  /** balance quality grade, e·omega: the same figure in both systems */
  balanceGrade: { base: 'm/s', baseLabel: 'm/s', SI: ['mm/s', 'mm/s'], US: ['mm/s', 'mm/s'] },
  time: { base: 's', baseLabel: 's', SI: ['s', 's'], US: ['s', 's'] },
  angle: { base: 'rad', baseLabel: 'rad', SI: ['deg', '°'], US: ['deg', '°'] },
  ratio: { base: '', baseLabel: '', SI: ['', ''], US: ['', ''] },
  /** a share shown in percent and stored as a fraction */
  share: { base: '', baseLabel: '', SI: ['percent', '%'], US: ['percent', '%'] },
} as const satisfies Record<string, DimensionSpec>

export type Dimension = keyof typeof DIMENSIONS
