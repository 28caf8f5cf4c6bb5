import type { Clearance, DampingNeed } from '../../../core/feasibility/damping-need.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Requirement } from '../../../core/project/requirements.ts'
import type { Dimension, UnitSystem } from '../../../core/units/dimensions.ts'
import { formatPlain, formatQuantity } from '../../../core/units/format.ts'

export interface ClearanceChoice {
  readonly id: string
  readonly label: string
  readonly clearance: Clearance
}

type Motion = Extract<Requirement, { kind: 'runUpMotion' }>

/** The clearances that the requirements give, in words. */
export function clearanceChoices(project: Project): readonly ClearanceChoice[] {
  return project.requirements.flatMap((requirement) => {
    if (requirement.kind !== 'runUpMotion' || !requirement.enabled || requirement.limit === null) return []
    const { place, point, direction, during, limit } = requirement
    const where = placeWords(project, requirement)
    if (where === null) return []
    const along = direction === 'resultant' ? '' : `, ${direction}`
    return [
      {
        id: requirement.id,
        label: `${formatQuantity(limit, 'deflection', project.units)} ${where}${along}`,
        clearance: { place, point, direction, during, limit },
      },
    ]
  })
}

function placeWords(project: Project, { place, point }: Motion): string | null {
  if (place === 'mounts') return 'across the mounts'
  const at = project.machine.points.findIndex(({ id }) => id === point)
  return at < 0 ? null : `at ${project.machine.points[at]?.name || `point ${at + 1}`}`
}

/** What was found, in one sentence. */
export function dampingSentence(need: DampingNeed, units: UnitSystem): string {
  const { outcome, present, needed, referenceFrequency } = need
  if (outcome === 'none') return 'The clearance holds without any damping in the mounts.'
  if (outcome === 'outOfReach')
    return 'Not even critical damping keeps this clearance: pass more quickly, balance better, or give more room.'
  const ratio = formatQuantity(needed.dampingRatio, 'share', units, 3)
  const mode = formatQuantity(referenceFrequency, 'frequency', units, 3)
  const head = `The clearance needs a damping ratio of ${ratio} in the vertical motion at ${mode}`
  if (!(present.dampingRatio > 0)) return `${head}; the mounts have none.`
  return `${head}, ${formatPlain(needed.dampingRatio / present.dampingRatio, 3)} times what there is.`
}

export interface DampingRow {
  readonly label: string
  readonly dimension: Dimension
  readonly present: number | null
  readonly needed: number | null
}

/** The mounting as it is beside the one with the damping that is needed, and what that costs. */
export function dampingRows(project: Project, { present, needed }: DampingNeed): readonly DampingRow[] {
  const row = (
    label: string,
    dimension: Dimension,
    pick: (of: typeof present) => number | null,
  ): DampingRow => ({
    label,
    dimension,
    present: pick(present),
    needed: pick(needed),
  })
  const types = present.types.flatMap(({ id }): DampingRow[] => {
    const at = project.mounting.types.findIndex((type) => type.id === id)
    const name = project.mounting.types[at]?.name || `type ${at + 1}`
    const of = (mounting: typeof present) => mounting.types.find((type) => type.id === id)
    return [
      row(`${name}: loss factor`, 'ratio', (mounting) => of(mounting)?.lossFactor ?? null),
      row(
        `${name}: viscous, equal at that motion, z`,
        'damping',
        (mounting) => of(mounting)?.equivalentViscous[2] ?? null,
      ),
    ]
  })
  return [
    row('Damping ratio, vertical', 'share', (of) => of.dampingRatio),
    ...types,
    row('Largest displacement', 'deflection', (of) => of.peak),
    row('Isolation at running speed', 'share', (of) => of.isolationEfficiency),
    row('Force into the support there', 'force', (of) => of.supportForce),
  ]
}
