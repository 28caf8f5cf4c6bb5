import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { ProjectInput } from '../../../core/project/project.ts'
import { CORNERS, sketchProject } from '../mounts/machine-project.ts'

type Absorber = NonNullable<ProjectInput['absorbers']>[number]

/** Heave of 400 kg on springs: the modal mass is 400 kg wherever it is met along z. */
const cautions = (size: Absorber['size']) =>
  evaluate(
    sketchProject({
      centre: [0, 0, 0],
      places: CORNERS,
      more: {
        absorbers: [
          {
            id: 'a',
            host: { kind: 'mode', mode: 3, position: [0, 0, 0], direction: [0, 0, 1] },
            size,
            tuning: { by: 'given', frequency: 8, dampingRatio: 0.1 },
          },
        ],
      },
    }),
  ).problems.filter(({ field }) => field.startsWith('absorbers[0].size'))

describe('an absorber beyond a quarter of the machine', () => {
  it('is cautioned at the field that sets its mass', () => {
    expect(cautions({ by: 'mass', mass: 101 })).toMatchObject([
      { field: 'absorbers[0].size.mass', kind: 'caution' },
    ])
    expect(cautions({ by: 'mass', mass: 160 })[0]?.message).toContain('40 % of the machine')
    expect(cautions({ by: 'mass', mass: 99 })).toEqual([])
  })

  it('is cautioned at its share of the host, which may weigh more than the machine', () => {
    const host = evaluate(sketchProject({ centre: [0, 0, 0], places: CORNERS })).modes?.[2]
    expect(host?.name).toBe('heave')
    expect(cautions({ by: 'ratio', ratio: 0.3 })).toMatchObject([
      { field: 'absorbers[0].size.ratio', kind: 'caution' },
    ])
    expect(cautions({ by: 'ratio', ratio: 0.05 })).toEqual([])
  })
})
