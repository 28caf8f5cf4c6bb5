import { z } from 'zod'
import { direction, identifier, label, optionalQuantity, quantity, vector } from './fields.ts'

const place = vector('length', 'where it acts, from the datum; empty: the point on the shaft')
  .nullable()
  .default(null)
  .meta({ description: 'where it acts, from the datum; empty: the point on the shaft', unit: 'm' })
const phase = quantity('angle', 'phase lead', { min: -1000, max: 1000 }).default(0)
const order = quantity('ratio', 'order: times the shaft speed, fractions allowed', {
  above: 0,
  max: 1000,
}).default(1)
const enabled = z.boolean().default(true).meta({ description: 'false: kept, but left out of every result' })

const unbalanceAmount = z.discriminatedUnion('by', [
  z.strictObject({
    by: z.literal('unbalance'),
    unbalance: optionalQuantity('unbalance', 'residual unbalance U', { min: 0 }),
  }),
  z.strictObject({
    by: z.literal('eccentricity'),
    rotorMass: optionalQuantity('mass', 'mass of the rotor', { above: 0 }),
    eccentricity: optionalQuantity(
      'displacement',
      "distance of the rotor's centre of gravity from the shaft axis",
      { min: 0 },
    ),
  }),
  z.strictObject({
    by: z.literal('grade'),
    rotorMass: optionalQuantity('mass', 'mass of the rotor', { above: 0 }),
    grade: optionalQuantity('balanceGrade', 'balance quality grade of ISO 21940-11: G 6.3 is 0.0063 m/s', {
      min: 0,
    }),
    serviceSpeed: optionalQuantity(
      'shaftSpeed',
      'speed for which the grade holds; empty: the running speed',
      { above: 0, max: 1e6 },
    ),
  }),
])

const unbalanceSource = z.strictObject({
  kind: z.literal('unbalance'),
  id: identifier,
  name: label('what is out of balance'),
  enabled,
  position: place,
  amount: unbalanceAmount.meta({ description: 'how much, in one of three ways to say it' }),
  phase,
})

const load = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('force'),
    direction: direction('direction of the force'),
    amplitude: optionalQuantity('force', 'peak amplitude of the force', { min: 0 }),
  }),
  z.strictObject({
    kind: z.literal('moment'),
    direction: direction('axis of the moment, right-hand rule'),
    amplitude: optionalQuantity('moment', 'peak amplitude of the moment', { min: 0 }),
  }),
])

const harmonicSource = z.strictObject({
  kind: z.literal('harmonic'),
  id: identifier,
  name: label('what pushes'),
  enabled,
  position: place,
  load: load.meta({ description: 'force or moment' }),
  order,
  dependence: z
    .discriminatedUnion('on', [
      z.strictObject({ on: z.literal('constant') }),
      z.strictObject({
        on: z.literal('speedSquared'),
        referenceSpeed: optionalQuantity(
          'shaftSpeed',
          'speed at which the amplitude holds; empty: the running speed',
          { above: 0, max: 1e6 },
        ),
      }),
    ])
    .default({ on: 'constant' })
    .meta({ description: 'how the amplitude goes with the speed' }),
  phase,
})

export const sourceSchema = z.discriminatedUnion('kind', [unbalanceSource, harmonicSource])
export type Source = z.infer<typeof sourceSchema>
export type UnbalanceSource = z.infer<typeof unbalanceSource>
export type HarmonicSource = z.infer<typeof harmonicSource>
