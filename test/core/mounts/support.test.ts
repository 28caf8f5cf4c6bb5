import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { CORNERS, sketchProject, type Sketch } from './machine-project.ts'

function messages(sketch: Sketch): string[] {
  return evaluate(sketchProject(sketch)).problems.map(
    ({ field, kind, message }) => `${kind} ${field}: ${message}`,
  )
}
const FREE = 'invalid mounting.placed: The mounts leave the machine free to '

describe('a support that does not hold the machine', () => {
  it.each<[string, Sketch, string]>([
    [
      'mounts without lateral stiffness',
      { places: CORNERS, type: { stiffness: [0, 0, 1e5] } },
      'slide along x, slide along y and turn about z',
    ],
    [
      'mounts stiff in two directions',
      { places: CORNERS, type: { stiffness: [0, 1e5, 1e5] } },
      'slide along x',
    ],
    [
      'two mounts',
      {
        places: [
          [0.6, 0, 0],
          [-0.6, 0, 0],
        ],
      },
      'rock about the line through mounts M1 and M2',
    ],
    [
      'a row of mounts on a slanting line',
      {
        places: [
          [0.6, 0.3, 0],
          [0, 0, 0],
          [-0.6, -0.3, 0],
        ],
      },
      'rock about the line through mounts M1, M2 and M3',
    ],
    [
      'two mounts one above the other',
      {
        places: [
          [0.1, 0, 0],
          [0.1, 0, 0.4],
        ],
      },
      'turn about the line through mounts M1 and M2',
    ],
    [
      'one mount',
      { places: [[0.2, 0, 0]] },
      'rock about x at mount M1, rock about y at mount M1 and turn about z at mount M1',
    ],
    [
      'mounts without any stiffness',
      { places: CORNERS, type: { stiffness: [0, 0, 0] } },
      'move in every way',
    ],
    [
      'rollers that all point to one vertical line',
      {
        places: [
          [1, 0, 0],
          [-1, 0, 0],
          [0, 1, 0],
          [0, -1, 0],
        ],
        type: { stiffness: [1e5, 0, 1e5] },
        mounts: {
          2: { tilt: { axis: [0, 0, 1], angle: Math.PI / 2 } },
          3: { tilt: { axis: [0, 0, 1], angle: Math.PI / 2 } },
        },
      },
      'turn about a line along z through (0, 0, 300) mm',
    ],
  ])('names the free motion of %s', (_, sketch, words) => {
    expect(messages(sketch)).toEqual([expect.stringContaining(`${FREE}${words}:`)])
  })

  it('gives neither statics nor modes nor response', () => {
    const result = evaluate(
      sketchProject({
        places: [
          [0.6, 0, 0],
          [-0.6, 0, 0],
        ],
      }),
    )
    expect([result.statics, result.modes, result.response]).toEqual([null, null, null])
    expect(result.massSummary?.mass).toBe(400)
  })

  it('does not mistake very soft mounts for none', () => {
    expect(
      messages({
        places: CORNERS,
        type: { stiffness: [1, 1, 3e5] },
        more: { analysis: { gravityStiffness: false } },
      }),
    ).toEqual([])
  })

  it('asks for mounts where there are none', () => {
    expect(messages({ places: [] })).toEqual(['missing mounting.placed: Place the mounts under the machine.'])
  })
})

describe('mounts at one point', () => {
  it('are said, with both names, and counted', () => {
    const twice = sketchProject({ places: [...CORNERS, [0.6, 0.4, 0]] })
    const { problems, statics } = evaluate(twice)
    expect(problems).toEqual([
      {
        field: 'mounting.placed[4].position',
        message: 'M5 stands at the same point as M1: both are counted; check the positions.',
        kind: 'caution',
      },
    ])
    expect(statics?.mounts).toHaveLength(5)
  })
})

describe('a machine that cannot stand upright', () => {
  it('is said to tip over, and its linear loads are shown', () => {
    const { problems, statics, modes } = evaluate(
      sketchProject({ centre: [0, 0, 2], places: CORNERS, type: { stiffness: [2e4, 2e4, 1e4] } }),
    )
    expect(problems.map(({ field, kind }) => `${kind} ${field}`)).toEqual(['invalid mounting.placed'])
    expect(problems[0]?.message).toContain('tip over')
    expect(statics).not.toBeNull()
    expect(modes).toBeNull()
  })

  it('stands when its weight is left out of account', () => {
    const sketch: Sketch = { centre: [0, 0, 2], places: CORNERS, type: { stiffness: [2e4, 2e4, 1e4] } }
    const { modes } = evaluate(sketchProject({ ...sketch, more: { analysis: { gravityStiffness: false } } }))
    expect(modes).toHaveLength(6)
  })
})

describe('a mount that the weight pulls upwards', () => {
  it('is named with a caution', () => {
    const { problems, statics } = evaluate(sketchProject({ centre: [1.1, 0, 0.3], places: CORNERS }))
    expect(problems.map(({ field, kind }) => `${kind} ${field}`)).toEqual([
      'caution mounting.placed[2].position',
      'caution mounting.placed[3].position',
    ])
    expect(statics?.mounts[2]?.load).toBeLessThan(0)
  })
})
