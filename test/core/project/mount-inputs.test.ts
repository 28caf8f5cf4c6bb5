import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'

function project(type: object, more: { placed?: object; setting?: object; analysis?: object } = {}) {
  return readProject({
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    mounting: {
      types: [{ id: 't', ...type }],
      placed: [{ id: 'm', type: 't', position: [0, 0, 0], ...more.placed }],
      ...(more.setting ? { setting: more.setting } : {}),
    },
    analysis: more.analysis ?? {},
  })
}

describe('mounts in a project file', () => {
  it('need neither design nor curve nor packing', () => {
    const { mounting, analysis } = project({ stiffness: [1, 1, 1] })
    expect(mounting.types[0]).toMatchObject({
      law: { kind: 'linear' },
      design: null,
      stiffnessAtTemperature: null,
    })
    expect(mounting.placed[0]).toMatchObject({ shim: 0, share: null })
    expect(mounting.setting).toEqual({ kind: 'asBuilt' })
    expect(analysis).toMatchObject({ temperature: null, lateralLoad: null })
  })

  it('are written by hand with units and kept in SI', () => {
    const { mounting, analysis } = project(
      {
        design: {
          component: 'helicalSpring',
          wireDiameter: '1/2 in',
          coilDiameter: '80 mm',
          activeCoils: 5,
          freeLength: '6 in',
          load: '200 lbf',
          material: { strength: '1400 MPa', shearModulus: '79.3 GPa' },
        },
        stiffnessAtTemperature: [
          ['-4 °F', 1.8],
          ['20 °C', 1],
        ],
        snubberGap: '4 mm',
      },
      {
        placed: { shim: '0.5 mm', share: '30 %' },
        setting: { kind: 'levelled', by: 'givenShares' },
        analysis: { temperature: '95 °F', lateralLoad: { factor: '25 %', direction: [1, 1, 0] } },
      },
    )
    const [type] = mounting.types
    expect(type?.design).toMatchObject({
      wireDiameter: 0.0127,
      coilDiameter: 0.08,
      endCoils: 2,
      correction: 1,
    })
    expect(type?.stiffnessAtTemperature?.[0]?.[0]).toBeCloseTo(-20, 10)
    expect(type?.snubberGap).toBeCloseTo(0.004, 12)
    expect(mounting.placed[0]).toMatchObject({ shim: 0.0005, share: 0.3 })
    expect(analysis.temperature).toBeCloseTo(35, 10)
    expect(analysis.lateralLoad?.factor).toBe(0.25)
  })

  it.each<[string, object]>([
    ['a spring', { component: 'helicalSpring', wireDiameter: 0.01 }],
    [
      'a pad',
      { component: 'rubberPad', shape: { kind: 'rectangle', length: 0.1 }, rubber: { from: 'typed' } },
    ],
    ['an air spring', { component: 'airSpring', lateralStiffness: -5, areaSlope: -0.01 }],
  ])('keep %s to the last digit through a file', (_, design) => {
    const first = project({ design, law: { kind: 'curve', points: [[1 / 3, 1 / 7]] } })
    expect(readProject(JSON.parse(JSON.stringify(first)))).toEqual(first)
  })

  it.each<[string, object, string]>([
    ['a component that nobody knows', { design: { component: 'leafSpring' } }, 'mounting.types[0].design'],
    ['a wire without thickness', { design: { component: 'helicalSpring', wireDiameter: 0 } }, 'wireDiameter'],
    ['half a layer', { design: { component: 'rubberPad', layers: 0.5 } }, 'layers'],
    ['a key that is misspelt', { design: { component: 'airSpring', efectiveArea: 1 } }, 'design'],
    [
      'a curve that falls',
      {
        law: {
          kind: 'curve',
          points: [
            [1, 2],
            [2, 1],
          ],
        },
      },
      'law.points[1]',
    ],
    [
      'a temperature below zero kelvin',
      { stiffnessAtTemperature: [[-300, 1]] },
      'stiffnessAtTemperature[0][0]',
    ],
    ['a temperature in words', { stiffnessAtTemperature: [['warm', 1]] }, 'stiffnessAtTemperature[0][0]'],
  ])('are refused with %s, at the field', (_, type, field) => {
    const reading = () => project(type)
    expect(reading).toThrow(InputError)
    expect(reading).toThrow(field)
  })
})
