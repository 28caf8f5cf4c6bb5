import { z } from 'zod'
import { direction, identifier, label, optionalQuantity, quantity, vector } from './fields.ts'

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
    .meta({ description: 'static stiffness in the three local directions' }),
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
})

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
  })
  .prefault({})
  .meta({ description: 'the mounts, their kinds and their places' })

export type MountType = z.infer<typeof mountTypeSchema>
export type PlacedMount = z.infer<typeof placedMount>
export type Mounting = z.infer<typeof mountingSchema>
