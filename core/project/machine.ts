import { z } from 'zod'
import { identifier, label, optionalQuantity, quantity, vector } from './fields.ts'

const size = (what: string) => quantity('length', what, { above: 0, max: 1000 })

/** Inertia tensor about the centre of gravity; `xy` is the integral of x·y dm, so the tensor carries -xy. */
const inertia = z
  .strictObject({
    xx: optionalQuantity('inertia', 'moment of inertia about x through the centre of gravity', { above: 0 }),
    yy: optionalQuantity('inertia', 'moment of inertia about y through the centre of gravity', { above: 0 }),
    zz: optionalQuantity('inertia', 'moment of inertia about z through the centre of gravity', { above: 0 }),
    xy: quantity('inertia', 'product of inertia, integral of x·y dm').default(0),
    xz: quantity('inertia', 'product of inertia, integral of x·z dm').default(0),
    yz: quantity('inertia', 'product of inertia, integral of y·z dm').default(0),
  })
  .prefault({})
  .meta({ description: 'inertia about the centre of gravity, axes as the machine' })

const part = z.discriminatedUnion('shape', [
  z.strictObject({
    shape: z.literal('box'),
    id: identifier,
    name: label('what this part is'),
    mass: quantity('mass', 'mass of the part', { above: 0 }),
    centre: vector('length', 'centre of the part in machine axes'),
    size: z
      .tuple([size('length along x'), size('length along y'), size('length along z')])
      .meta({ description: 'outer lengths of the box' }),
  }),
  z.strictObject({
    shape: z.literal('cylinder'),
    id: identifier,
    name: label('what this part is'),
    mass: quantity('mass', 'mass of the part', { above: 0 }),
    centre: vector('length', 'centre of the part in machine axes'),
    axis: z.enum(['x', 'y', 'z']).meta({ description: 'axis of the cylinder' }),
    diameter: size('outer diameter'),
    length: size('length along the axis'),
  }),
])

const massProperties = z
  .discriminatedUnion('from', [
    z.strictObject({
      from: z.literal('typed'),
      mass: optionalQuantity('mass', 'total mass on the mounts', { above: 0 }),
      centreOfGravity: vector('length', 'centre of gravity from the datum').default([0, 0, 0]),
      inertia,
    }),
    z.strictObject({
      from: z.literal('parts'),
      parts: z.array(part).max(200).meta({ description: 'uniform solids whose sum is the machine' }),
    }),
  ])
  .meta({
    description: 'mass, centre of gravity and inertia of all that moves on the mounts as one rigid body',
  })

const shaft = z
  .strictObject({
    axis: z.enum(['x', 'y', 'z']).default('x').meta({ description: 'axis along which the shaft lies' }),
    position: vector(
      'length',
      'a point on the shaft, from the datum; where unbalance acts unless it says otherwise',
    ).default([0, 0, 0]),
    sense: z
      .enum(['positive', 'negative'])
      .default('positive')
      .meta({ description: 'rotation about the axis by the right-hand rule, or against it' }),
  })
  .prefault({})
  .meta({ description: 'where the shaft lies and how it turns' })

const duty = z
  .strictObject({
    runningSpeed: optionalQuantity('shaftSpeed', 'speed at which the machine runs', { above: 0, max: 1e6 }),
    lowestSpeed: optionalQuantity('shaftSpeed', 'lowest operating speed; empty: the running speed', {
      above: 0,
      max: 1e6,
    }),
    highestSpeed: optionalQuantity('shaftSpeed', 'highest operating speed; empty: the running speed', {
      above: 0,
      max: 1e6,
    }),
    chartSpeed: optionalQuantity(
      'shaftSpeed',
      'highest speed on the charts; empty: 1.25 times the highest operating speed',
      { above: 0, max: 1e6 },
    ),
    furtherSpeeds: z
      .array(quantity('shaftSpeed', 'a speed', { above: 0, max: 1e6 }))
      .max(2000)
      .default([])
      .meta({
        description: 'speeds besides the running speed at which the full complex response is reported',
      }),
  })
  .prefault({})
  .meta({ description: 'speeds at which the machine runs' })

const point = z.strictObject({
  id: identifier,
  name: label('name of the point, such as "drive-end bearing"'),
  position: vector('length', 'position on the machine, from the datum'),
})

export const machineSchema = z
  .strictObject({
    description: label('nameplate: what the machine is'),
    massProperties: massProperties.prefault({ from: 'typed' }),
    shaft,
    duty,
    points: z
      .array(point)
      .max(50)
      .default([])
      .meta({ description: 'points on the machine whose motion is judged or reported' }),
  })
  .prefault({})
  .meta({ description: 'the machine as one rigid body with a shaft' })

export type Machine = z.infer<typeof machineSchema>
export type MassProperties = Machine['massProperties']
export type MachinePart = z.infer<typeof part>
export type Inertia = z.infer<typeof inertia>
export type ObservedPoint = z.infer<typeof point>
