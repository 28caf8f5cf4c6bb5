import fc from 'fast-check'
import type { ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'

/** Evenly spread; `fc.double` spreads over exponents, so that most places would fall together. */
const between = (min: number, max: number) =>
  fc.integer({ min: 0, max: 1_000_000 }).map((step) => min + ((max - min) * step) / 1_000_000)
const vector = (size: number): fc.Arbitrary<[number, number, number]> =>
  fc.tuple(between(-size, size), between(-size, size), between(-size, size))
const direction = vector(1).filter((v) => Math.hypot(...v) > 1e-3)
/** Sizes over many decades, as slips of the keyboard bring them. */
const wide = (low: number, high: number) => between(low, high).map((exponent) => 10 ** exponent)
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: null, freq: 8 })

const massProperties = fc.oneof(
  fc.record({
    from: fc.constant('typed' as const),
    mass: maybe(wide(-2, 6)),
    centreOfGravity: vector(2),
    inertia: fc.record({
      xx: maybe(wide(1, 1.25)),
      yy: maybe(wide(1, 1.25)),
      zz: maybe(wide(1, 1.25)),
      xy: between(-5, 5),
    }),
  }),
  fc.record({
    from: fc.constant('parts' as const),
    parts: fc
      .array(
        fc.record({
          mass: wide(-1, 4),
          centre: vector(2),
          size: fc.tuple(wide(-2, 1), wide(-2, 1), wide(-2, 1)),
        }),
        { maxLength: 4 },
      )
      .map((parts) => parts.map((part, k) => ({ shape: 'box' as const, id: `p${k}`, ...part }))),
  }),
)
const source = fc.oneof(
  fc.record({
    kind: fc.constant('unbalance' as const),
    enabled: fc.boolean(),
    amount: fc.record({ by: fc.constant('unbalance' as const), unbalance: maybe(wide(-9, 2)) }),
    phase: between(-4, 4),
  }),
  fc.record({
    kind: fc.constant('harmonic' as const),
    order: fc.constantFrom(0.5, 1, 2, 6, 42.5),
    load: fc.record({
      kind: fc.constantFrom('force' as const, 'moment' as const),
      direction,
      amplitude: maybe(fc.oneof(fc.constant(0), wide(-3, 6))),
    }),
    dependence: fc.constantFrom({ on: 'constant' as const }, { on: 'speedSquared' as const }),
  }),
)
const mountType = fc.record({
  stiffness: fc.tuple(
    ...[0, 1, 2].map(() =>
      fc.oneof({ weight: 1, arbitrary: fc.constant(0) }, { weight: 20, arbitrary: wide(1, 9) }),
    ),
  ) as unknown as fc.Arbitrary<
    [number, number, number] // a tuple of three, which the mapping hides
  >,
  dynamicRatio: between(0.5, 4),
  lossFactor: fc.oneof(fc.constant(0), wide(-4, 0.5)),
  viscous: fc.constantFrom<[number, number, number]>([0, 0, 0], [100, 0, 5], [1e7, 1e7, 1e7]),
})
const absorber = fc.record({
  host: fc.record({
    kind: fc.constant('mode' as const),
    mode: fc.integer({ min: 1, max: 8 }),
    position: vector(1),
    direction,
  }),
  size: fc.oneof(
    fc.record({ by: fc.constant('ratio' as const), ratio: maybe(wide(-4, 0.9)) }),
    fc.record({ by: fc.constant('mass' as const), mass: maybe(wide(-3, 4)) }),
  ),
  tuning: fc.constantFrom(
    { by: 'fixedPoints' as const },
    { by: 'minimax' as const },
    { by: 'speed' as const },
    { by: 'given' as const, frequency: 12, dampingRatio: 0.1 },
  ),
})

const place = fc.record({ position: vector(1.5), tilt: fc.option(direction, { nil: null }) })

/** Any project that the schema takes: unfinished, badly founded or absurd ones among them. */
export const anyProject: fc.Arbitrary<ProjectInput> = fc
  .record({
    massProperties,
    duty: fc.record({
      runningSpeed: maybe(wide(-2, 5.9)),
      highestSpeed: maybe(wide(-2, 5.9)),
      lowestSpeed: maybe(wide(-2, 5.9)),
    }),
    axis: fc.constantFrom('x' as const, 'y' as const, 'z' as const),
    points: fc.array(vector(2), { maxLength: 2 }),
    sources: fc.array(source, { maxLength: 3, size: 'max' }),
    types: fc.array(mountType, { minLength: 1, maxLength: 2 }),
    places: fc.oneof(
      { weight: 1, arbitrary: fc.array(place, { maxLength: 2 }) },
      { weight: 6, arbitrary: fc.array(place, { minLength: 3, maxLength: 8 }) },
    ),
    absorbers: fc.array(absorber, { maxLength: 2 }),
    gravityStiffness: fc.boolean(),
  })
  .map(({ massProperties, duty, axis, points, sources, types, places, absorbers, gravityStiffness }) => ({
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties,
      duty,
      shaft: { axis },
      points: points.map((position, k) => ({ id: `point ${k}`, position })),
    },
    sources: sources.map((one, k) => ({ id: `source ${k}`, ...one })),
    mounting: {
      types: types.map((type, k) => ({ id: `type ${k}`, ...type })),
      placed: places.map(({ position, tilt }, k) => ({
        id: `M${k}`,
        type: `type ${k % types.length}`,
        position,
        tilt: tilt === null ? null : { axis: tilt, angle: 0.5 },
      })),
    },
    absorbers: absorbers.map((one, k) => ({ id: `absorber ${k}`, ...one })),
    requirements: [
      { kind: 'isolation' as const, id: 'isolation', limit: 0.8, speeds: 'operating' as const },
      { kind: 'transmittedForce' as const, id: 'force', limit: 100, place: 'worstMount' as const },
      { kind: 'modeSeparation' as const, id: 'separation', limit: 0.2 },
      { kind: 'mountLoad' as const, id: 'load' },
      { kind: 'absorberStroke' as const, id: 'stroke', limit: 0.01, speeds: 'chart' as const },
    ],
    analysis: { gravityStiffness },
  }))
