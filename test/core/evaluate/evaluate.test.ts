import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { blankProject } from '../../../core/project/create.ts'
import { readProject } from '../../../core/project/read.ts'
import type { Evaluation } from '../../../core/results.ts'
import { CORNERS, sketchProject, type Sketch } from '../mounts/machine-project.ts'
import { anyProject } from './random-project.ts'

const up: [number, number, number] = [0, 0, 1]
const absorber = (more: object = {}) => ({
  id: 'a',
  host: {
    kind: 'mode' as const,
    mode: 3,
    position: [0.6, 0.4, 0.2] as [number, number, number],
    direction: up,
  },
  size: { by: 'mass' as const, mass: 12 },
  tuning: { by: 'given' as const, frequency: 8, dampingRatio: 0.1 },
  ...more,
})
const run = (sketch: Sketch): Evaluation => evaluate(sketchProject(sketch))
const fields = ({ problems }: Evaluation) => problems.map(({ field, kind }) => `${kind} ${field}`)

/** Path of the first number that is not finite, or null. */
function notFinite(value: unknown, path = 'evaluation'): string | null {
  if (typeof value === 'number') return Number.isFinite(value) ? null : path
  if (value instanceof Float64Array) {
    const at = value.findIndex((one) => !Number.isFinite(one))
    return at < 0 ? null : `${path}[${at}]`
  }
  if (typeof value !== 'object' || value === null) return null
  for (const [key, part] of Object.entries(value)) {
    const found = notFinite(part, `${path}.${key}`)
    if (found !== null) return found
  }
  return null
}

describe('evaluate', () => {
  it('computes whatever the schema takes, without throwing and without a number that is not finite', () => {
    fc.assert(
      fc.property(anyProject, (input) => {
        const result = evaluate(readProject(input), { sweepPoints: 150 })
        expect(notFinite(result)).toBeNull()
        if (result.statics !== null) expect(result.statics.loadSumError).toBeLessThan(1e-9)
      }),
      { numRuns: 150, endOnFailure: true },
    )
  })

  it('leaves the project as it was and answers the same again', () => {
    const project = sketchProject({ places: CORNERS, more: { absorbers: [absorber()] } })
    const before = structuredClone(project)
    const first = evaluate(project)
    expect(project).toEqual(before)
    expect(evaluate(project)).toEqual(first)
  })

  it('says of a blank project what is missing, and nothing else', () => {
    const result = evaluate(blankProject())
    expect(fields(result)).toEqual([
      'missing machine.massProperties.mass',
      'missing machine.massProperties.inertia.xx',
      'missing machine.massProperties.inertia.yy',
      'missing machine.massProperties.inertia.zz',
      'missing machine.duty.runningSpeed',
      'missing sources',
    ])
    expect([result.massSummary, result.statics, result.modes, result.response]).toEqual([
      null,
      null,
      null,
      null,
    ])
  })

  it('designs an absorber for a typed host without any machine', () => {
    const single = { kind: 'single' as const, mass: 100, frequency: 10 }
    const result = evaluate({
      ...blankProject(),
      absorbers: sketchProject({
        places: [],
        more: { absorbers: [absorber({ host: single, tuning: { by: 'fixedPoints' } })] },
      }).absorbers,
    })
    expect(result.absorbers).toHaveLength(1)
    expect(result.modesWithAbsorbers).toBeNull()
  })

  it('keeps a typed host out of the machine', () => {
    const single = { kind: 'single' as const, mass: 100, frequency: 10 }
    const result = run({ places: CORNERS, more: { absorbers: [absorber({ host: single })] } })
    expect(result.absorbers).toHaveLength(1)
    expect(result.modesWithAbsorbers).toBeNull()
    expect(result.response?.sweepWithoutAbsorbers).toBeNull()
  })

  it('leaves out an absorber that is switched off or not yet known, and shows the machine without', () => {
    const alone = run({ places: CORNERS })
    for (const more of [{ enabled: false }, { size: { by: 'mass' as const, mass: null } }]) {
      const result = run({ places: CORNERS, more: { absorbers: [absorber(more)] } })
      expect(result.modesWithAbsorbers).toBeNull()
      expect(result.response?.sweep.supportForce).toEqual(alone.response?.sweep.supportForce)
    }
  })

  it('compares with and without absorbers at the same speeds', () => {
    const { response } = run({ places: CORNERS, more: { absorbers: [absorber()] } })
    expect(response?.sweepWithoutAbsorbers?.speed).toEqual(response?.sweep.speed)
    const alone = run({ places: CORNERS })
    expect(response?.runningWithoutAbsorbers).toEqual(alone.response?.atSpeeds[0])
    expect(response?.sweep.strokes).toHaveLength(1)
    expect(response?.atSpeeds[0]?.orders[0]?.absorbers[0]?.id).toBe('a')
  })

  it('gives modes and statics while the speeds are still missing', () => {
    const project = sketchProject({ places: CORNERS })
    const result = evaluate({
      ...project,
      machine: { ...project.machine, duty: { ...project.machine.duty, runningSpeed: null } },
    })
    expect(fields(result)).toEqual(['missing machine.duty.runningSpeed'])
    expect(result.modes).toHaveLength(6)
    expect(result.response).toBeNull()
  })

  it('does not show a response as long as one enabled source is not known', () => {
    const half = { kind: 'unbalance' as const, id: 'half', amount: { by: 'unbalance' as const } }
    const given = {
      kind: 'unbalance' as const,
      id: 'full',
      amount: { by: 'unbalance' as const, unbalance: 0.01 },
    }
    const result = run({ places: CORNERS, more: { sources: [given, half] } })
    expect(fields(result)).toEqual(['missing sources[1].amount.unbalance'])
    expect(result.response).toBeNull()
    const off = run({ places: CORNERS, more: { sources: [given, { ...half, enabled: false }] } })
    expect(off.response).not.toBeNull()
  })

  it('says so where speeds contradict each other', () => {
    const duty = (values: object) => {
      const project = sketchProject({ places: CORNERS })
      return fields(
        evaluate({
          ...project,
          machine: { ...project.machine, duty: { ...project.machine.duty, ...values } },
        }),
      )
    }
    expect(duty({ lowestSpeed: 200, highestSpeed: 150 })).toEqual(['caution machine.duty.lowestSpeed'])
    expect(duty({ lowestSpeed: 120, highestSpeed: 150 })).toEqual(['caution machine.duty.runningSpeed'])
    expect(duty({ lowestSpeed: 80, highestSpeed: 150 })).toEqual([])
  })
})

describe('overall values', () => {
  const push = (order: number, amplitude: number, direction: [number, number, number]) => ({
    kind: 'harmonic' as const,
    id: `push ${order} ${direction.join('')}`,
    order,
    position: [0, 0, 0.3] as [number, number, number],
    load: { kind: 'force' as const, direction, amplitude },
  })

  it('combine orders as the root of the sum of squares, at speeds and in the sweep alike', () => {
    const one = run({ places: CORNERS, more: { sources: [push(1, 80, up)] } }).response
    const two = run({ places: CORNERS, more: { sources: [push(2, 50, [1, 0, 0])] } }).response
    const both = run({
      places: CORNERS,
      more: { sources: [push(1, 80, up), push(2, 50, [1, 0, 0])] },
    }).response
    const [a, b, sum] = [one, two, both].map((response) => response?.atSpeeds[0]?.supportForce ?? NaN)
    expect(sum).toBeCloseTo(Math.hypot(a ?? NaN, b ?? NaN), 10)
    const at = both?.sweep.speed.indexOf(100) ?? -1
    expect(both?.sweep.supportForce[at]).toBeCloseTo(sum ?? NaN, 10)
    expect(both?.sweep.forceRatio?.[at]).toBeCloseTo(both?.atSpeeds[0]?.forceRatio ?? NaN, 12)
    const excited = Math.hypot(80, 50)
    expect(both?.atSpeeds[0]?.forceRatio).toBeCloseTo(
      Math.hypot((a ?? NaN) / excited, (b ?? NaN) / excited),
      10,
    )
  })

  it('are the same in the sweep as in the full response at that speed', () => {
    const project = sketchProject({
      places: CORNERS,
      more: { sources: [push(1, 80, [0, 1, 1]), push(2, 50, [1, 0, 0])], absorbers: [absorber()] },
    })
    const points = [{ id: 'p', name: '', position: [0.4, -0.3, 0.6] as [number, number, number] }]
    const { response } = evaluate({ ...project, machine: { ...project.machine, points } })
    const [sweep, full] = [response?.sweep, response?.atSpeeds[0]]
    const at = sweep?.speed.indexOf(100) ?? -1
    const shown = [
      sweep?.supportForce,
      ...(sweep?.mountForces ?? []),
      ...(sweep?.pointVelocity.flat() ?? []),
      ...(sweep?.strokes ?? []),
    ].map((curve) => curve?.[at])
    const expected = [
      full?.supportForce,
      ...(full?.mountForces ?? []),
      ...(full?.pointVelocity.flat() ?? []),
      ...(full?.strokes ?? []),
    ]
    expect(shown).toHaveLength(9)
    shown.forEach((value, i) => {
      // both ways add the same terms in another order
      expect((value ?? NaN) / (expected[i] ?? NaN)).toBeCloseTo(1, 12)
    })
  })

  it('add sources of one order with their phases', () => {
    const against = { ...push(1, 80, up), id: 'against', phase: Math.PI }
    const { response } = run({ places: CORNERS, more: { sources: [push(1, 80, up), against] } })
    expect(response?.atSpeeds[0]?.supportForce).toBeLessThan(1e-10)
  })

  it('report the largest length of a turning force, and of a swinging one', () => {
    // equal stiffness in y and z and the centre of gravity level with the mounts: the turning force
    // of unbalance passes as a turning force, whose length does not change in a cycle
    const round: Sketch = { centre: [0, 0, 0], places: CORNERS, type: { stiffness: [3e5, 3e5, 3e5] } }
    const turning = run(round).response?.atSpeeds[0]
    const { support } = turning?.orders[0] ?? {}
    const [y, z] = [support?.[1], support?.[2]]
    expect(turning?.supportForce).toBeCloseTo(Math.hypot(y?.re ?? NaN, y?.im ?? NaN), 10)
    expect(turning?.supportForce).toBeCloseTo(Math.hypot(z?.re ?? NaN, z?.im ?? NaN), 10)
    const swinging = run({ ...round, more: { sources: [push(1, 80, [0, 1, 1])] } }).response?.atSpeeds[0]
    const along = swinging?.orders[0]?.support.map(({ re, im }) => Math.hypot(re, im)) ?? []
    expect(swinging?.supportForce).toBeCloseTo(Math.hypot(...along), 10)
  })

  it('have no force ratio where only moments act, and still a response', () => {
    const moment = {
      kind: 'harmonic' as const,
      id: 'torque',
      load: { kind: 'moment' as const, direction: [1, 0, 0] as [number, number, number], amplitude: 20 },
    }
    const { response } = run({ places: CORNERS, more: { sources: [moment] } })
    expect([response?.sweep.forceRatio, response?.atSpeeds[0]?.forceRatio]).toEqual([null, null])
    expect(response?.atSpeeds[0]?.supportForce).toBeGreaterThan(0)
  })

  it('leave out the very speed at which a mode without damping is driven, and say why', () => {
    const undamped: Sketch = { centre: [0, 0, 0], places: CORNERS, type: { lossFactor: 0 } }
    const project = sketchProject({ ...undamped, more: { sources: [push(1, 80, up)] } })
    const resonance = Math.sqrt(12e5 / 400)
    const at = (duty: object) =>
      evaluate({ ...project, machine: { ...project.machine, duty: { ...project.machine.duty, ...duty } } })
    const further = at({ furtherSpeeds: [50, resonance] })
    expect(further.response?.atSpeeds.map(({ speed }) => speed)).toEqual([100, 50])
    expect(fields(further)).toEqual(['caution machine.duty.furtherSpeeds[1]'])
    const running = at({ runningSpeed: resonance, furtherSpeeds: [50] })
    expect(running.response?.atSpeeds).toEqual([])
    expect(running.response?.sweep.speed).not.toContain(resonance)
    expect(fields(running)).toEqual(['caution machine.duty.runningSpeed'])
  })
})
