import { evaluate } from '../../../core/evaluate.ts'
import type { ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import type { Evaluation } from '../../../core/results.ts'
import { missing } from '../checks/parts.ts'

type MountTypeInput = NonNullable<NonNullable<ProjectInput['mounting']>['types']>[number]
export type DesignInput = NonNullable<MountTypeInput['design']>
type Kind = DesignInput['component']
type AnyFigures = NonNullable<Evaluation['components'][number]['figures']>
type FiguresOf<K extends Kind> = Extract<AnyFigures, { component: K }>

/** Figures of a component by itself, through the door that users have. */
export function figuresOf<K extends Kind>(design: DesignInput & { component: K }): FiguresOf<K> {
  const { components } = evaluate(
    readProject({
      format: PROJECT_FORMAT,
      version: PROJECT_VERSION,
      mounting: { types: [{ id: 't', design }] },
    }),
  )
  const figures = components[0]?.figures ?? missing()
  if (figures.component !== design.component) return missing()
  return figures as FiguresOf<K> // compared just above
}

/** A mass that loads four designed mounts at the corners of a square alike, its centre between them. */
export function onFourMounts(
  design: DesignInput,
  load: number,
  more: Partial<MountTypeInput> = {},
): Evaluation {
  const mass = (4 * load) / 9.80665
  return evaluate(
    readProject({
      format: PROJECT_FORMAT,
      version: PROJECT_VERSION,
      machine: { massProperties: { from: 'typed', mass, inertia: { xx: mass, yy: 2 * mass, zz: 3 * mass } } },
      mounting: {
        types: [{ id: 't', design, ...more }],
        placed: [-1, 1].flatMap((x) =>
          [-1, 1].map((y) => ({
            id: `${x} ${y}`,
            type: 't',
            position: [x, y, 0] as [number, number, number],
          })),
        ),
      },
      analysis: { gravityStiffness: false },
    }),
  )
}
