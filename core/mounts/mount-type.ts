import { assertNever } from '../errors.ts'
import { analyseComponent, type ComponentAnalysis } from '../components/analyse.ts'
import { scale } from '../numerics/vector3.ts'
import type { Vec3 } from '../project/fields.ts'
import type { MountType } from '../project/mounts.ts'
import type { Project } from '../project/project.ts'
import type { ComponentResult, Problem } from '../results.ts'
import { curveLaw, gasLaw, linearLaw, type AxialLaw } from './axial-law.ts'

/** A mount type with everything that follows from its design, its curve and the temperature. */
export interface EffectiveMountType {
  /** the type with computed stiffness, dynamic ratio, limits and height in their places */
  readonly type: MountType
  readonly law: AxialLaw
  /** stiffness of vibration along the local axes, axially before any load [N/m] */
  readonly dynamicStiffness: Vec3
  /** dynamic stiffness at the working temperature over that at the reference temperature */
  readonly temperatureFactor: number
  /** null for a type without design */
  readonly component: ComponentAnalysis | null
  /** whether it can carry a machine */
  readonly usable: boolean
  /** fields count from the mount type, such as `design.wireDiameter` */
  readonly problems: readonly Problem[]
}

export interface MountConditions {
  /** [m/s²] */
  readonly gravity: number
  /** [°C]; null: that for which the figures hold */
  readonly temperature: number | null
}

/**
 * What a mount type amounts to: stiffness, damping, rated load and limits, from its design or its
 * curve where it has one. A plain type comes back as it is.
 */
export function effectiveMountType(type: MountType, conditions: MountConditions): EffectiveMountType {
  const heat = temperatureFactor(type, conditions.temperature)
  if (type.design !== null) return designedType(type, conditions, heat)
  if (type.law.kind === 'linear') {
    return {
      type,
      law: linearLaw(type.stiffness[2], type.dynamicRatio * heat.factor),
      dynamicStiffness: scale(type.stiffness, type.dynamicRatio * heat.factor),
      temperatureFactor: heat.factor,
      component: null,
      usable: true,
      problems: heat.problems,
    }
  }
  const law = curveLaw(type.law.points, type.dynamicRatio * heat.factor)
  // the mean stiffness over the curve stands for it wherever one figure is asked for
  const [reach, load] = type.law.points.at(-1) ?? [0, 0]
  const mean = reach > 0 && load > 0 ? load / reach : law.at(0).tangent
  return {
    type: { ...type, stiffness: withAxial(type.stiffness, mean) },
    law,
    dynamicStiffness: withAxial(scale(type.stiffness, type.dynamicRatio * heat.factor), law.at(0).dynamic),
    temperatureFactor: heat.factor,
    component: null,
    usable: true,
    problems: heat.problems,
  }
}

type Heat = ReturnType<typeof temperatureFactor>

function designedType(type: MountType, { gravity }: MountConditions, heat: Heat): EffectiveMountType {
  const { design } = type
  if (design === null) throw new Error('a designed type has a design')
  const component = analyseComponent(design, gravity)
  const problems = [
    ...component.problems.map((problem) => ({ ...problem, field: `design.${problem.field}` })),
    ...heat.problems,
  ]
  const { mount } = component
  if (mount === null) {
    return {
      type: { ...type, stiffness: [0, 0, 0] },
      law: linearLaw(0, 1),
      dynamicStiffness: [0, 0, 0],
      temperatureFactor: heat.factor,
      component,
      usable: false,
      problems,
    }
  }
  const ratio = (mount.dynamicRatio ?? type.dynamicRatio) * heat.factor
  const law = mount.gas === null ? linearLaw(mount.stiffness[2], ratio) : gasLaw(mount.gas)
  // bellows are as stiff sideways at rest as in vibration: only their gas has two exponents
  const sideways = mount.gas === null ? ratio : type.dynamicRatio * heat.factor
  return {
    type: {
      ...type,
      stiffness: mount.stiffness,
      dynamicRatio: mount.dynamicRatio ?? type.dynamicRatio,
      ratedLoad: narrower(type.ratedLoad, mount.ratedLoad),
      deflectionLimit: narrower(type.deflectionLimit, mount.deflectionLimit),
      height: type.height ?? mount.height,
    },
    law,
    dynamicStiffness: withAxial(scale(mount.stiffness, sideways), law.at(0).dynamic),
    temperatureFactor: heat.factor,
    component,
    usable: true,
    problems,
  }
}

function withAxial(stiffness: Readonly<Vec3>, axial: number): Vec3 {
  return [stiffness[0], stiffness[1], axial]
}

/** Figures and remarks of every designed mount type, whether a mount of it is placed or not. */
export function designedComponents({ mounting, analysis }: Project): readonly ComponentResult[] {
  return mounting.types.flatMap((type, index) => {
    if (type.design === null) return []
    const { figures, mount, problems } = analyseComponent(type.design, analysis.gravity)
    return [
      {
        type: type.id,
        figures,
        usable: mount !== null,
        problems: problems.map((problem) => ({
          ...problem,
          field: `mounting.types[${index}].design.${problem.field}`,
        })),
      },
    ]
  })
}

/** The stricter of a typed and a computed limit. */
function narrower(typed: number | null, computed: number | null): number | null {
  if (typed === null || computed === null) return typed ?? computed
  return Math.min(typed, computed)
}

/** Straight between the points of the reference curve; its end beyond them, with a word. */
function temperatureFactor(
  { stiffnessAtTemperature: points }: MountType,
  temperature: number | null,
): { readonly factor: number; readonly problems: readonly Problem[] } {
  if (points === null || temperature === null) return { factor: 1, problems: [] }
  const above = points.findIndex(([at]) => at >= temperature)
  const high = points[above]
  const low = points[above - 1]
  if (high && low) {
    const share = (temperature - low[0]) / (high[0] - low[0])
    return { factor: low[1] + share * (high[1] - low[1]), problems: [] }
  }
  const end = high ?? points.at(-1)
  if (end === undefined || end[0] === temperature) return { factor: end?.[1] ?? 1, problems: [] }
  return {
    factor: end[1],
    problems: [
      {
        field: 'stiffnessAtTemperature',
        message:
          'The mounts work at a temperature beyond the points that are given: the nearest of them is taken.',
        kind: 'caution',
      },
    ],
  }
}

/**
 * The same type, stiffer by a factor in every direction and in every way in which it can be given:
 * for trials and tolerances.
 */
export function withStiffnessTimes(type: MountType, factor: number): MountType {
  const stiffness = scale(type.stiffness, factor)
  const { design, law } = type
  if (design !== null) {
    return { ...type, stiffness, design: { ...design, correction: design.correction * factor } }
  }
  switch (law.kind) {
    case 'linear':
      return { ...type, stiffness }
    case 'curve':
      return {
        ...type,
        stiffness,
        law: { kind: 'curve', points: law.points.map(([x, load]) => [x, load * factor]) },
      }
    default:
      return assertNever(law, 'static law')
  }
}
