import { describe, expect, it } from 'vitest'
import { describeSource } from '../../../core/excitation/describe.ts'
import {
  groupByOrder,
  orderVector,
  sourceLoad,
  type SourceLoad,
} from '../../../core/excitation/order-loads.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import { machineSchema, type Machine } from '../../../core/project/machine.ts'
import { sourceSchema, type Source } from '../../../core/project/sources.ts'

const machine = (input: unknown = {}): Machine => machineSchema.parse(input)
const running = (rpm: number): Machine => machine({ duty: { runningSpeed: `${rpm} rpm` } })
const source = (input: object): Source => sourceSchema.parse({ id: 's', ...input })
const unbalance = (amount: object, more: object = {}): Source =>
  source({ kind: 'unbalance', amount, ...more })
const direct = (more: object = {}): Source => unbalance({ by: 'unbalance', unbalance: 2 }, more)

function loadOf(given: Source, on: Machine, centre: Vec3 = [0, 0, 0]): SourceLoad {
  const { load } = sourceLoad(given, on, centre, 'sources[0]')
  if (load === null) throw new Error('no load')
  return load
}

/** The vector at the instant t = angle / omega. */
function at({ re, im }: SourceLoad['force'], angle: number): Vec3 {
  const part = (i: 0 | 1 | 2) => re[i] * Math.cos(angle) - im[i] * Math.sin(angle)
  return [part(0), part(1), part(2)]
}

describe('rotating unbalance', () => {
  // SOURCE F = U omega² along the heavy spot, which turns with the shaft by the right-hand rule;
  // S. S. Rao, Mechanical Vibrations (rotating unbalance)
  it.each([
    ['x', [0, 1, 0], [0, 0, 1]],
    ['y', [0, 0, 1], [1, 0, 0]],
    ['z', [1, 0, 0], [0, 1, 0]],
  ] as const)('turns about %s by the right-hand rule', (axis, first, quarter) => {
    const { force, order, law } = loadOf(direct(), machine({ shaft: { axis } }))
    expect([order, law]).toEqual([1, 'squared'])
    close(at(force, 0), [...first], 2)
    close(at(force, Math.PI / 2), [...quarter], 2)
  })

  it('turns the other way with the opposite sense', () => {
    const { force } = loadOf(direct(), machine({ shaft: { axis: 'x', sense: 'negative' } }))
    close(at(force, 0), [0, 1, 0], 2)
    close(at(force, Math.PI / 2), [0, 0, -1], 2)
  })

  it('leads by its phase, in the sense of rotation', () => {
    const phase = 0.7
    const plain = loadOf(direct(), machine({ shaft: { axis: 'y', sense: 'negative' } })).force
    const ahead = loadOf(direct({ phase }), machine({ shaft: { axis: 'y', sense: 'negative' } })).force
    for (const angle of [0, 1, 4]) close(at(ahead, angle), at(plain, angle + phase), 1)
  })

  it('acts on the shaft unless it has a place of its own, with its moment about the centre of gravity', () => {
    const on = machine({ shaft: { axis: 'x', position: [0, 0, 3] } })
    const centred = loadOf(direct(), on, [0, 0, 1])
    // r x F = (0,0,2) x (0,2,0) = (-4,0,0)
    expect(centred.moment.re).toEqual([-4, 0, 0])
    const placed = loadOf(direct({ position: [5, 0, 1] }), on, [0, 0, 1])
    // (5,0,0) x (0,2,0) = (0,0,10)
    expect(placed.moment.re[2]).toBe(10)
  })

  // SOURCE ISO 21940-11: G = e omega; G 6.3 means 6.3 mm/s at the service speed
  it('follows from eccentricity or balance quality grade', () => {
    const eccentric = loadOf(unbalance({ by: 'eccentricity', rotorMass: 40, eccentricity: 5e-5 }), machine())
    expect(eccentric.force.re[1]).toBeCloseTo(2e-3, 15)
    const graded = unbalance({ by: 'grade', rotorMass: 40, grade: 0.0063, serviceSpeed: 100 })
    expect(loadOf(graded, machine()).force.re[1]).toBeCloseTo((40 * 0.0063) / 100, 15)
    const atRunning = unbalance({ by: 'grade', rotorMass: 40, grade: 0.0063 })
    expect(loadOf(atRunning, machine({ duty: { runningSpeed: 200 } })).force.re[1]).toBeCloseTo(
      (40 * 0.0063) / 200,
      15,
    )
  })

  it.each([
    [{ by: 'unbalance' }, ['unbalance']],
    [{ by: 'eccentricity' }, ['rotorMass', 'eccentricity']],
    [{ by: 'grade' }, ['rotorMass', 'grade', 'serviceSpeed']],
  ])('names what is missing of %o', (amount, fields) => {
    const { load, problems } = sourceLoad(unbalance(amount), machine(), [0, 0, 0], 'sources[3]')
    expect(load).toBeNull()
    expect(problems.map(({ field }) => field)).toEqual(fields.map((field) => `sources[3].amount.${field}`))
  })
})

describe('harmonic loads', () => {
  const push = (more: object = {}, load: object = {}): Source =>
    source({
      kind: 'harmonic',
      order: 2,
      load: { kind: 'force', direction: [0, 3, 4], amplitude: 10, ...load },
      ...more,
    })

  it('push along the unit vector of their direction, at their phase', () => {
    const { force, law, order } = loadOf(push({ phase: Math.PI / 2 }), machine())
    expect([law, order]).toEqual(['constant', 2])
    close(force.im, [0, 0.6, 0.8], 10)
    close(force.re, [0, 0, 0], 1)
  })

  it('grow with the square of the speed from the speed at which they are given', () => {
    const given = push({ dependence: { on: 'speedSquared', referenceSpeed: 50 } })
    const { re } = orderVector([loadOf(given, machine())], 2 * 50)
    expect(Math.hypot(...re.subarray(0, 3))).toBeCloseTo(10, 12)
    const twice = orderVector([loadOf(given, machine())], 2 * 100)
    expect(Math.hypot(...twice.re.subarray(0, 3))).toBeCloseTo(40, 12)
  })

  it('turn without pushing when they are moments, wherever they stand', () => {
    const given = push({ position: [9, 9, 9] }, { kind: 'moment', direction: [0, 0, 2] })
    const { force, moment } = loadOf(given, machine())
    expect([force.re, moment.re]).toEqual([
      [0, 0, 0],
      [0, 0, 10],
    ])
  })

  it('name what is missing', () => {
    const given = push({ dependence: { on: 'speedSquared' } }, { amplitude: null })
    const { problems } = sourceLoad(given, machine(), [0, 0, 0], 'sources[1]')
    expect(problems.map(({ field }) => field)).toEqual([
      'sources[1].load.amplitude',
      'sources[1].dependence.referenceSpeed',
    ])
  })
})

describe('groupByOrder', () => {
  it('puts sources of one order together, lowest first, and adds them with their phases', () => {
    const plus = loadOf(direct(), machine())
    const minus = loadOf(direct({ phase: Math.PI }), machine())
    const half = loadOf(
      source({ kind: 'harmonic', order: 0.5, load: { kind: 'force', direction: [1, 0, 0], amplitude: 1 } }),
      machine(),
    )
    const groups = groupByOrder([plus, half, minus])
    expect(groups.map(({ order, loads }) => [order, loads.length])).toEqual([
      [0.5, 1],
      [1, 2],
    ])
    const { re, im } = orderVector(groups[1]?.loads ?? [], 10)
    for (const value of [...re, ...im]) expect(Math.abs(value)).toBeLessThan(1e-12)
  })
})

describe('describeSource', () => {
  it('says order, speed, size and kind in plain words', () => {
    // by hand: 0.0089 kg m · (1480 · 2 pi / 60)² = 213.8 N
    const text = describeSource(unbalance({ by: 'unbalance', unbalance: 0.0089 }), running(1480), 'SI').text
    expect(text).toBe('1× at 1480 rpm: 214 N rotating')
  })

  it('speaks US customary units to those who read them', () => {
    const given = unbalance({ by: 'unbalance', unbalance: 0.0089 })
    expect(describeSource(given, running(1480), 'US').text).toBe('1× at 1480 rpm: 48.1 lbf rotating')
  })

  it('says along what a force and about what a moment acts', () => {
    const force = source({
      kind: 'harmonic',
      order: 2,
      load: { kind: 'force', direction: [0, 0, -2], amplitude: 60 },
    })
    expect(describeSource(force, running(1480), 'SI').text).toBe('2× at 1480 rpm: 60 N along -z')
    const moment = source({
      kind: 'harmonic',
      order: 0.5,
      load: { kind: 'moment', direction: [1, 1, 0], amplitude: 8 },
    })
    expect(describeSource(moment, running(600), 'SI').text).toBe(
      '0.5× at 600 rpm: 8 N m about (0.71, 0.71, 0)',
    )
  })

  it('does not make up what nobody has given', () => {
    expect(describeSource(unbalance({ by: 'unbalance' }), running(1480), 'SI')).toEqual({
      id: 's',
      text: '1× at 1480 rpm: size not given yet',
      amplitude: null,
    })
    expect(describeSource(direct(), machine(), 'SI').text).toBe('1×: size depends on the running speed')
  })

  it('marks what is switched off', () => {
    expect(describeSource(direct({ enabled: false }), running(60), 'SI').text).toMatch(/ \(switched off\)$/)
  })
})

function close(actual: readonly number[], expected: readonly number[], size: number): void {
  actual.forEach((value, i) => {
    expect(value).toBeCloseTo(size * (expected[i] ?? NaN), 12)
  })
}
