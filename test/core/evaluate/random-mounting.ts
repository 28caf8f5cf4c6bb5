import fc from 'fast-check'
import type { ProjectInput } from '../../../core/project/project.ts'
import { PROJECT_FORMAT, PROJECT_VERSION } from '../../../core/project/project.ts'

/** Evenly spread; `fc.double` spreads over exponents, so that most places would fall together. */
const between = (min: number, max: number) =>
  fc.integer({ min: 0, max: 1_000_000 }).map((step) => min + ((max - min) * step) / 1_000_000)
/** Sizes over many decades, as slips of the keyboard bring them. */
const wide = (low: number, high: number) => between(low, high).map((exponent) => 10 ** exponent)
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: null, freq: 12 })
const vector = (size: number): fc.Arbitrary<[number, number, number]> =>
  fc.tuple(between(-size, size), between(-size, size), between(-size, size))
const direction = vector(1).filter((v) => Math.hypot(...v) > 0.1)

const points = fc.array(fc.tuple(wide(-5, -1), wide(0, 5)), { minLength: 1, maxLength: 8 }).map((steps) => {
  let [x, load] = [0, 0]
  return steps.map(([dx, dy]): [number, number] => [(x += dx), (load += dy)])
})
const law = fc.oneof(
  fc.constant({ kind: 'linear' as const }),
  fc.record({ kind: fc.constant('curve' as const), points }),
)

const spring = fc.record({
  component: fc.constant('helicalSpring' as const),
  wireDiameter: maybe(wide(-4, -0.5)),
  coilDiameter: maybe(wide(-3, 0)),
  activeCoils: maybe(wide(-0.3, 2)),
  freeLength: maybe(wide(-2, 1)),
  load: maybe(wide(0, 5)),
  seating: between(0.5, 2),
  correction: wide(-1, 1),
  material: fc.record({ strength: maybe(wide(7, 10)) }),
})
const pad = fc.record({
  component: fc.constant('rubberPad' as const),
  shape: fc.oneof(
    fc.record({ kind: fc.constant('disc' as const), diameter: maybe(wide(-3, 0)), bore: wide(-4, -2) }),
    fc.record({
      kind: fc.constant('rectangle' as const),
      length: maybe(wide(-3, 0)),
      width: maybe(wide(-3, 0)),
    }),
  ),
  thickness: maybe(wide(-4, 0)),
  layers: fc.integer({ min: 1, max: 6 }),
  rubber: fc.oneof(
    fc.record({ from: fc.constant('hardness' as const), hardness: maybe(between(25, 80)) }),
    fc.record({
      from: fc.constant('typed' as const),
      youngsModulus: maybe(wide(5, 8)),
      shearModulus: maybe(wide(4, 7)),
    }),
  ),
  load: maybe(wide(0, 5)),
  creepPerDecade: maybe(between(0, 0.2)),
})
const air = fc.record({
  component: fc.constant('airSpring' as const),
  load: maybe(wide(1, 5)),
  effectiveArea: maybe(wide(-4, -1)),
  areaSlope: between(-0.1, 0.1),
  bellowsVolume: maybe(wide(-6, -1)),
  auxiliaryVolume: wide(-7, -1),
  lateralStiffness: maybe(between(-1e4, 1e6)),
  highestPressure: maybe(wide(4, 7)),
  bumpTravel: maybe(wide(-3, 0)),
  correction: wide(-1, 1),
})

const mountType = fc.record({
  stiffness: fc.tuple(wide(1, 8), wide(1, 8), wide(1, 8)),
  law,
  design: fc.option(fc.oneof(spring, pad, air), { nil: null, freq: 1 }),
  dynamicRatio: wide(-0.3, 0.6),
  lossFactor: between(0, 0.3),
  snubberGap: maybe(wide(-4, -1)),
  stiffnessAtTemperature: maybe(
    fc.constant<[number, number][]>([
      [0, 1.6],
      [20, 1],
      [60, 0.8],
    ]),
  ),
  ratedLoad: maybe(wide(1, 5)),
})
const mount = fc.record({
  kind: fc.nat(),
  position: vector(1),
  shim: fc.oneof(fc.constant(0), wide(-5, -2)),
  share: maybe(between(0.01, 0.3)),
  tilt: fc.option(fc.record({ axis: direction, angle: between(-1, 1) }), { nil: null }),
})
const setting = fc.oneof(
  fc.constant({ kind: 'asBuilt' as const }),
  fc.record({
    kind: fc.constant('levelled' as const),
    by: fc.constantFrom('equalLoads', 'ratedLoads', 'equalDeflections', 'givenShares'),
  }),
)

/** A machine on mounts of every kind that can be described, sound or not. */
export const anyMounting: fc.Arbitrary<ProjectInput> = fc
  .record({
    mass: wide(0, 4),
    centreOfGravity: vector(0.6),
    types: fc.array(mountType, { minLength: 1, maxLength: 3 }),
    mounts: fc.array(mount, { minLength: 3, maxLength: 7 }),
    setting,
    lateralLoad: maybe(fc.record({ factor: wide(-2, 0.9), direction })),
    temperature: maybe(between(-50, 100)),
    gravityStiffness: fc.boolean(),
  })
  .map(({ mass, centreOfGravity, types, mounts, setting: how, ...analysis }) => ({
    format: PROJECT_FORMAT,
    version: PROJECT_VERSION,
    machine: {
      massProperties: {
        from: 'typed',
        mass,
        centreOfGravity,
        inertia: { xx: 0.1 * mass, yy: 0.12 * mass, zz: 0.15 * mass },
      },
      duty: { runningSpeed: 150 },
    },
    sources: [{ kind: 'unbalance', id: 's', amount: { by: 'unbalance', unbalance: 0.01 } }],
    mounting: {
      types: types.map((type, k) => ({ id: `t${k}`, ...type })),
      placed: mounts.map(({ kind, ...rest }, k) => ({
        id: `m${k}`,
        type: `t${kind % types.length}`,
        ...rest,
      })),
      setting: how,
    },
    analysis,
  }))
