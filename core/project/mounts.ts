import { z } from 'zod'
import { componentDesignSchema } from './component-designs.ts'
import { direction, identifier, label, optionalQuantity, quantity, temperature, vector } from './fields.ts'

/** Refuses points that do not rise in both columns, or a single one that does not rise from no load. */
function rising(context: z.core.ParsePayload<[number, number][]>): void {
  const [only, second] = context.value
  if (only !== undefined && second === undefined && !(only[0] > 0 && only[1] > 0)) {
    context.issues.push({
      code: 'custom',
      message: 'a single point needs a deflection and a load above 0',
      input: only,
      path: [0],
    })
    return
  }
  const at = context.value.findIndex(([x, y], index) => {
    const before = context.value[index - 1]
    return before !== undefined && !(x > before[0] && y > before[1])
  })
  if (at < 0) return
  context.issues.push({
    code: 'custom',
    message: 'deflection and load must both rise from point to point',
    input: context.value[at],
    path: [at],
  })
}

const staticLaw = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('linear') }),
    z.strictObject({
      kind: z.literal('curve'),
      points: z
        .array(
          z.tuple([
            quantity('deflection', 'compression along the local axis z'),
            quantity('force', 'static load at it'),
          ]),
        )
        .min(1)
        .max(200)
        .check(rising)
        .meta({
          description:
            'load against deflection as measured, both rising; no load at no deflection is understood',
        }),
    }),
  ])
  .default({ kind: 'linear' })
  .meta({ description: 'static law along local z: the stiffness, or a measured curve in its place' })

const temperatureCurve = z
  .array(
    z.tuple([
      temperature('temperature of the mount'),
      quantity('ratio', 'dynamic stiffness there over that at the reference temperature', {
        above: 0,
        max: 1000,
      }),
    ]),
  )
  .min(1)
  .max(50)
  .check((context) => {
    const at = context.value.findIndex(
      ([value], index) => index > 0 && !(value > (context.value[index - 1]?.[0] ?? -Infinity)),
    )
    if (at < 0) return
    context.issues.push({
      code: 'custom',
      message: 'temperatures must rise from point to point',
      input: context.value[at],
      path: [at],
    })
  })

/** Everything about a kind of mount; a project carries its own copy, so that it stands alone. */
export const mountTypeSchema = z.strictObject({
  id: identifier,
  name: label('part number or name'),
  kind: label('what it is: steel spring, elastomer, cable, ...'),
  stiffness: z
    .tuple([
      quantity('stiffness', 'static stiffness along local x', { min: 0 }),
      quantity('stiffness', 'static stiffness along local y', { min: 0 }),
      quantity('stiffness', 'static stiffness along local z (axial)', { min: 0 }),
    ])
    .default([0, 0, 0])
    .meta({
      description:
        'static stiffness in the three local directions; a design gives it by itself, a curve in its axial direction',
    }),
  law: staticLaw,
  design: componentDesignSchema.nullable().default(null).meta({
    description:
      'dimensions of a spring, pad or air spring; stiffness and limits are then computed and the ones typed here only narrow them',
  }),
  dynamicRatio: quantity(
    'ratio',
    'dynamic stiffness over static stiffness: 1 for steel springs, typically 1.1 to 3 for elastomers',
    { above: 0, max: 100 },
  ).default(1),
  lossFactor: quantity('ratio', 'loss factor eta of the complex stiffness k(1 + i eta)', {
    min: 0,
    max: 10,
  }).default(0),
  viscous: vector('damping', 'viscous damping coefficient in the three local directions', { min: 0 }).default(
    [0, 0, 0],
  ),
  ratedLoad: optionalQuantity('force', 'largest static load allowed on one mount', { above: 0 }),
  leastLoad: optionalQuantity('force', 'least static load for which the mount works as stated', { min: 0 }),
  deflectionLimit: optionalQuantity('deflection', 'largest static deflection allowed', { above: 0 }),
  snubberGap: optionalQuantity('deflection', 'free way sideways until a snubber is struck', { above: 0 }),
  stiffnessAtTemperature: temperatureCurve.nullable().default(null).meta({
    description: 'how the dynamic stiffness goes with temperature; empty: it does not',
  }),
  height: optionalQuantity('length', 'free height', { above: 0 }),
  price: z
    .number()
    .min(0)
    .max(1e9)
    .nullable()
    .default(null)
    .meta({ description: 'price of one', unit: "the catalogue's currency" }),
  note: label('where the figures come from'),
})

const tilt = z.strictObject({
  axis: direction('axis about which the mount is turned, right-hand rule'),
  angle: quantity('angle', 'angle turned', { min: -7, max: 7 }),
})

const placedMount = z.strictObject({
  id: identifier,
  name: label('mark on the plan, such as "M1"'),
  type: identifier.meta({ description: 'id of the mount type' }),
  position: vector('length', 'point where it holds the machine, from the datum'),
  tilt: tilt
    .nullable()
    .default(null)
    .meta({ description: 'inclination of the local axes; empty: local axes are the machine axes' }),
  shim: quantity('deflection', 'packing under the mount, set as built', { min: 0, max: 1 }).default(0),
  share: optionalQuantity('share', 'part of the weight that the mount shall carry when levelled', {
    above: 0,
    max: 1,
  }),
})

const setting = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('asBuilt') }).meta({ description: 'on the packing as it is' }),
    z
      .strictObject({
        kind: z.literal('levelled'),
        by: z
          .enum(['equalLoads', 'ratedLoads', 'equalDeflections', 'givenShares'])
          .default('equalLoads')
          .meta({
            description:
              'what is aimed at, as near as the place of the weight allows: equal loads, loads in proportion to the rated loads, equal deflections, or the share given for each mount',
          }),
      })
      .meta({ description: 'on packing chosen so that the machine stands level' }),
  ])
  .default({ kind: 'asBuilt' })

export const mountingSchema = z
  .strictObject({
    types: z
      .array(mountTypeSchema)
      .max(100)
      .default([])
      .meta({ description: 'kinds of mount that this project uses' }),
    placed: z
      .array(placedMount)
      .max(200)
      .default([])
      .meta({ description: 'every single mount under the machine' }),
    setting: setting.meta({ description: 'how the machine is set on its mounts' }),
  })
  .prefault({})
  .meta({ description: 'the mounts, their kinds and their places' })

export type MountType = z.infer<typeof mountTypeSchema>
export type PlacedMount = z.infer<typeof placedMount>
export type Mounting = z.infer<typeof mountingSchema>
