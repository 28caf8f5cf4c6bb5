import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { designAbsorber, type AbsorberContext } from '../../../core/absorber/design.ts'
import { absorberSchema, type Absorber } from '../../../core/project/absorber.ts'
import type { Mode } from '../../../core/results.ts'
import type { Vec6 } from '../../../core/project/fields.ts'

// one seed for all, so that a failure here is a change of the code
fc.configureGlobal({ seed: 1928 })

type Given = Parameters<typeof absorberSchema.parse>[0]
const absorber = (given: Partial<Record<keyof Absorber, unknown>> = {}): Absorber =>
  absorberSchema.parse({
    id: 'a',
    host: { kind: 'single', mass: 3000, frequency: 24, dampingRatio: 0.02, force: 200 },
    ...given,
  } as Given) // parsed here, whatever it is

const NOTHING: AbsorberContext = { modes: null, centreOfGravity: null, receptance: null, runningSpeed: null }
const mode = (number: number, frequency: number, shape: Vec6): Mode => ({
  number,
  frequency,
  dampedFrequency: frequency,
  dampingRatio: 0.03,
  shape,
  absorberShape: {},
  energyShare: [0, 0, 0, 0, 0, 0],
  name: 'coupled',
  crossings: [],
})
/** Heave of 400 kg, roll about x of 100 kg m² and a free yaw. */
const MACHINE: AbsorberContext = {
  ...NOTHING,
  modes: [
    mode(1, 0, [0, 0, 0, 0, 0, 0.1]),
    mode(2, 6, [0, 0, 0.05, 0, 0, 0]),
    mode(3, 9, [0, 0, 0, 0.1, 0, 0]),
  ],
  centreOfGravity: [1, 0, 0.5],
}
const onMode = (number: number, position: readonly number[], direction: readonly number[]) =>
  absorber({ host: { kind: 'mode', mode: number, position, direction } })

/** Every number in a result, wherever it stands. */
function numbers(value: unknown): number[] {
  if (typeof value === 'number') return [value]
  if (value instanceof Float64Array) return [...value]
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbers) : []
}

describe('an absorber design', () => {
  it('has figures that belong together', () => {
    const { result, problems } = designAbsorber(absorber(), 0, NOTHING)
    expect(problems).toEqual([])
    if (result === null) throw new Error('no result')
    const { mass, stiffness, damping, frequency } = result
    const omega = 2 * Math.PI * frequency
    expect(mass).toBeCloseTo(0.05 * 3000, 12)
    expect(stiffness / (mass * omega ** 2)).toBeCloseTo(1, 12)
    expect(damping / (2 * mass * omega * result.dampingRatio)).toBeCloseTo(1, 12)
    expect(damping / (2 * mass * 2 * Math.PI * 24 * result.dampingRatioOverHost)).toBeCloseTo(1, 12)
    expect(result.staticSag).toBeCloseTo((9.80665 * mass) / stiffness, 12)
    expect(result.detuning.map(({ share }) => share)).toEqual([-0.1, -0.05, 0, 0.05, 0.1])
    expect(result.detuning[2]?.peak).toBeCloseTo(result.peak ?? NaN, 12)
    for (const { share, peak } of result.detuning) {
      if (share !== 0) expect(peak).toBeGreaterThan(result.peak ?? NaN)
    }
    expect(result.peakWithout).toBeCloseTo(1 / (2 * 0.02 * Math.sqrt(1 - 0.0004)), 10)
  })

  it('detunes the spring alone: the damper and the mass stay', () => {
    const { result } = designAbsorber(absorber(), 0, NOTHING)
    if (result === null) throw new Error('no result')
    for (const { share, peak } of result.detuning) {
      const tuning = {
        by: 'given',
        frequency: result.frequency * (1 + share),
        dampingRatio: result.dampingRatio / (1 + share),
      }
      const off = designAbsorber(absorber({ tuning }), 0, NOTHING).result
      expect(off?.damping).toBeCloseTo(result.damping, 8)
      expect(off?.peak).toBeCloseTo(peak ?? NaN, 10)
    }
  })

  it('draws curves whose highest points are the peaks', () => {
    const { result } = designAbsorber(absorber(), 0, NOTHING)
    if (result === null) throw new Error('no result')
    const { g, without, with: damped, stroke } = result.curve
    expect([without.length, damped.length, stroke.length]).toEqual([g.length, g.length, g.length])
    expect(g.every((value, k) => k === 0 || value > (g[k - 1] ?? Infinity))).toBe(true)
    // drawn at points beside the peak: within a thousandth of its height
    expect(Math.max(...damped) / (result.peak ?? NaN)).toBeCloseTo(1, 3)
    expect(Math.max(...without) / (result.peakWithout ?? NaN)).toBeCloseTo(1, 3)
    expect(Math.max(...stroke) / (result.maxStrokeRatio ?? NaN)).toBeCloseTo(1, 3)
  })

  it('takes gravity from the project for the sag', () => {
    const moon = designAbsorber(absorber(), 0, { ...NOTHING, gravity: 1.62 }).result
    const earth = designAbsorber(absorber(), 0, NOTHING).result
    expect((moon?.staticSag ?? 0) / (earth?.staticSag ?? 1)).toBeCloseTo(1.62 / 9.80665, 12)
  })

  it('gives the closed form where the minimax has none, and says why at the field', () => {
    const objective = { excitation: 'unbalance', response: 'velocity' }
    const none = designAbsorber(absorber({ tuning: { by: 'minimax', objective } }), 3, NOTHING)
    expect(none.result).toBeNull()
    expect(none.problems).toEqual([
      expect.objectContaining({ field: 'absorbers[3].tuning.objective', kind: 'invalid' }),
    ])
    const closed = designAbsorber(absorber({ tuning: { by: 'fixedPoints', objective } }), 3, NOTHING)
    expect(closed.result?.frequencyRatio).toBeCloseTo(1 / Math.sqrt(1 + 0.05 / 2), 12)
    expect(closed.result?.peak).toBeNull()
  })

  it('warns when the closed form leaves much on the table', () => {
    const host = { kind: 'single', mass: 100, frequency: 10, dampingRatio: 0.1 }
    const { problems } = designAbsorber(
      absorber({ host, tuning: { by: 'fixedPoints', objective: {} } }),
      0,
      NOTHING,
    )
    expect(problems).toEqual([expect.objectContaining({ field: 'absorbers[0].tuning.by', kind: 'caution' })])
  })

  it('warns when nothing is left to gain', () => {
    const host = { kind: 'single', mass: 100, frequency: 10, dampingRatio: 2 }
    const { result, problems } = designAbsorber(absorber({ host }), 0, NOTHING)
    expect(result?.peak).toBe(1)
    expect(problems[0]).toMatchObject({ kind: 'caution', field: 'absorbers[0].tuning.by' })
  })

  it.each([
    ['host.mass', { host: { kind: 'single', frequency: 10 } }],
    ['host.frequency', { host: { kind: 'single', mass: 10 } }],
    ['size.ratio', { size: { by: 'ratio', ratio: null } }],
    ['size.mass', { size: { by: 'mass', mass: null } }],
    ['tuning.frequency', { tuning: { by: 'given', frequency: null } }],
    ['tuning.speed', { tuning: { by: 'speed', speed: null } }],
    ['tuning.lowest', { tuning: { by: 'networkMinimax', lowest: null, highest: 20 } }],
    ['tuning.highest', { tuning: { by: 'networkMinimax', lowest: 20, highest: null } }],
    ['tuning.highest', { tuning: { by: 'networkMinimax', lowest: 20, highest: 20 } }],
    ['strokeLimit', { size: { by: 'stroke' }, tuning: { by: 'speed', speed: 100 } }],
    ['size.by', { size: { by: 'stroke' }, strokeLimit: 0.01 }],
    ['host.mode', { host: { kind: 'mode', mode: 1, position: [0, 0, 0], direction: [0, 0, 1] } }],
  ])('names %s when it is missing or wrong', (field, given) => {
    const { result, problems } = designAbsorber(absorber(given), 2, NOTHING)
    expect(result).toBeNull()
    expect(problems[0]?.field).toBe(`absorbers[2].${field}`)
  })

  it('tunes to the running speed of the machine when no other is given', () => {
    const own = absorber({ tuning: { by: 'speed', order: 2 } })
    const { result } = designAbsorber(own, 0, { ...NOTHING, runningSpeed: 100 })
    expect((result?.frequency ?? 0) * 2 * Math.PI).toBeCloseTo(200, 10)
  })
})

describe('a mode as host', () => {
  it('weighs 1 / phi² at the attachment, turned and away from the centre of gravity', () => {
    const heave = designAbsorber(onMode(2, [1, 3, 0.5], [0, 0, 2]), 0, MACHINE)
    expect(heave.result?.host).toMatchObject({
      mass: expect.closeTo(400, 9),
      frequency: 6,
      dampingRatio: 0.03,
    })
    // roll: at 2 m beside the axis the point moves by 0.1 x 2 along z
    const roll = designAbsorber(onMode(3, [1, 2, 0.5], [0, 0, -1]), 0, MACHINE)
    expect(roll.result?.host.mass).toBeCloseTo(25, 9)
    // and along a slanted line by its share
    const slanted = designAbsorber(onMode(3, [1, 2, 0.5], [1, 0, 1]), 0, MACHINE)
    expect(slanted.result?.host.mass).toBeCloseTo(50, 9)
  })

  it('moves as a rigid body does: translation and rotation add with their signs', () => {
    const shape: Vec6 = [0.03, 0.02, 0.05, 0.1, -0.08, 0.06]
    const context = { ...MACHINE, modes: [mode(1, 5, shape)] }
    const r = [0.4, -0.5, 0.9] as const
    // u + theta x r, component by component
    const at = [
      0.03 + -0.08 * r[2] - 0.06 * r[1],
      0.02 + 0.06 * r[0] - 0.1 * r[2],
      0.05 + 0.1 * r[1] - -0.08 * r[0],
    ]
    const position = [1 + r[0], r[1], 0.5 + r[2]]
    ;[
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ].forEach((direction, axis) => {
      const { result } = designAbsorber(onMode(1, position, direction), 0, context)
      expect((result?.host.mass ?? NaN) * (at[axis] ?? NaN) ** 2).toBeCloseTo(1, 12)
    })
  })

  it('does not exist', () => {
    const { result, problems } = designAbsorber(onMode(9, [0, 0, 0], [0, 0, 1]), 0, MACHINE)
    expect(result).toBeNull()
    expect(problems).toEqual([expect.objectContaining({ field: 'absorbers[0].host.mode', kind: 'invalid' })])
  })

  it('does not move at its node, nor across its motion', () => {
    for (const still of [onMode(3, [1, 0, 0.5], [0, 0, 1]), onMode(2, [1, 2, 0.5], [1, 0, 0])]) {
      const { result, problems } = designAbsorber(still, 0, MACHINE)
      expect(result).toBeNull()
      expect(problems).toEqual([
        expect.objectContaining({ field: 'absorbers[0].host.direction', kind: 'invalid' }),
      ])
    }
  })

  it('is no host when it is a free motion', () => {
    const { problems } = designAbsorber(onMode(1, [1, 2, 0.5], [1, 0, 0]), 0, MACHINE)
    expect(problems).toEqual([expect.objectContaining({ field: 'absorbers[0].host.mode', kind: 'invalid' })])
  })

  it('wants the network for a band', () => {
    const own = {
      ...onMode(2, [1, 0, 0.5], [0, 0, 1]),
      tuning: { by: 'networkMinimax', lowest: 3, highest: 12 } as const,
    }
    const { problems } = designAbsorber(own, 0, MACHINE)
    expect(problems).toEqual([expect.objectContaining({ field: 'absorbers[0].tuning.by', kind: 'missing' })])
  })
})

it('is finite or explained, whatever is typed', () => {
  const extreme = fc.oneof(
    fc.constantFrom(1e-12, 1e-6, 1, 1e6, 1e12),
    fc.double({ min: -12, max: 12, noNaN: true }).map((power) => 10 ** power),
  )
  const hz = extreme.map((value) => Math.min(1e5, value))
  const ratio = fc.oneof(
    fc.constant(0),
    extreme.map((value) => Math.min(5, value)),
  )
  const objective = fc.record({
    excitation: fc.constantFrom('force', 'unbalance', 'supportAcceleration', 'supportDisplacement'),
    response: fc.constantFrom(
      'displacement',
      'velocity',
      'acceleration',
      'relativeDisplacement',
      'transmittedForce',
    ),
  })
  const hostile = fc.record({
    host: fc.record({
      kind: fc.constant('single'),
      mass: extreme,
      frequency: hz,
      dampingRatio: ratio,
      force: extreme,
    }),
    size: fc.oneof(
      fc.record({ by: fc.constant('ratio'), ratio: extreme.map((value) => Math.min(10, value)) }),
      fc.record({ by: fc.constant('mass'), mass: extreme }),
      fc.record({ by: fc.constant('stroke') }),
    ),
    tuning: fc.oneof(
      fc.record({ by: fc.constantFrom('fixedPoints', 'minimax'), objective }),
      fc.record({ by: fc.constant('speed'), speed: hz, dampingRatio: ratio }),
      fc.record({ by: fc.constant('given'), frequency: hz, dampingRatio: ratio }),
      fc.record({ by: fc.constant('networkMinimax'), lowest: hz, highest: hz }),
    ),
    strokeLimit: extreme,
  })
  fc.assert(
    fc.property(hostile, (given) => {
      const { result, problems } = designAbsorber(absorber(given), 0, NOTHING)
      if (result === null) expect(problems.length).toBeGreaterThan(0)
      expect(numbers(result).every(Number.isFinite)).toBe(true)
      for (const { field } of problems) expect(field.startsWith('absorbers[0].')).toBe(true)
    }),
    { numRuns: 400 },
  )
})
