import { z } from 'zod'
import { direction, identifier, label, optionalQuantity, quantity, vector } from './fields.ts'

const host = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('mode'),
    mode: z
      .number()
      .int()
      .min(1)
      .max(60)
      .meta({ description: 'number of the mode of the machine on its mounts, 1 the lowest' }),
    position: vector('length', 'where the absorber is fixed to the machine, from the datum'),
    direction: direction('line along which the absorber moves'),
  }),
  z.strictObject({
    kind: z.literal('single'),
    mass: optionalQuantity('mass', 'modal mass of the host', { above: 0 }),
    frequency: optionalQuantity('frequency', 'natural frequency of the host without absorber', {
      above: 0,
      max: 1e5,
    }),
    dampingRatio: quantity('ratio', 'viscous damping ratio of the host', { min: 0, max: 5 }).default(0),
    force: optionalQuantity(
      'force',
      'amplitude of a harmonic force on the host; empty: results per unit force',
      { min: 0 },
    ),
  }),
])

const objective = z
  .strictObject({
    excitation: z
      .enum(['force', 'unbalance', 'supportAcceleration', 'supportDisplacement'])
      .default('force')
      .meta({ description: 'what shakes the host' }),
    response: z
      .enum(['displacement', 'velocity', 'acceleration', 'relativeDisplacement', 'transmittedForce'])
      .default('displacement')
      .meta({ description: 'what shall be least' }),
  })
  .prefault({})
  .meta({ description: 'which response of the host to which excitation shall be least at its worst' })

const tuning = z.discriminatedUnion('by', [
  z
    .strictObject({ by: z.literal('fixedPoints'), objective })
    .meta({ description: "Den Hartog's closed form: equal height at the fixed points of an undamped host" }),
  z
    .strictObject({ by: z.literal('minimax'), objective })
    .meta({ description: 'least worst peak of the damped single-freedom host, computed' }),
  z
    .strictObject({
      by: z.literal('networkMinimax'),
      lowest: optionalQuantity('frequency', 'lower end of the band', { above: 0, max: 1e5 }),
      highest: optionalQuantity('frequency', 'upper end of the band', { above: 0, max: 1e5 }),
    })
    .meta({ description: 'least worst receptance at the attachment over a band, on the full network' }),
  z
    .strictObject({
      by: z.literal('speed'),
      speed: optionalQuantity('shaftSpeed', 'speed to which it is tuned; empty: the running speed', {
        above: 0,
        max: 1e6,
      }),
      order: quantity('ratio', 'order of the excitation at that speed', { above: 0, max: 1000 }).default(1),
      dampingRatio: quantity(
        'ratio',
        "damping that the absorber's spring has anyway, over its own frequency",
        { min: 0, max: 5 },
      ).default(0),
    })
    .meta({ description: 'tuned to one running speed, as little damping as can be had' }),
  z
    .strictObject({
      by: z.literal('given'),
      frequency: optionalQuantity('frequency', "the absorber's own frequency on a fixed base", {
        above: 0,
        max: 1e5,
      }),
      dampingRatio: quantity('ratio', "damping ratio over the absorber's own frequency", {
        min: 0,
        max: 5,
      }).default(0),
    })
    .meta({ description: 'as it was measured or bought' }),
])

const size = z.discriminatedUnion('by', [
  z.strictObject({
    by: z.literal('ratio'),
    ratio: optionalQuantity('ratio', 'absorber mass over host modal mass', { above: 0, max: 10 }),
  }),
  z.strictObject({ by: z.literal('mass'), mass: optionalQuantity('mass', 'absorber mass', { above: 0 }) }),
  z.strictObject({ by: z.literal('stroke') }).meta({
    description:
      'the least mass whose travel at the tuned speed stays within strokeLimit; for a typed host with its force, tuned to one speed',
  }),
])

export const absorberSchema = z.strictObject({
  id: identifier,
  name: label('name of the absorber'),
  enabled: z.boolean().default(true).meta({ description: 'false: kept, but left out of the response' }),
  host: host.meta({ description: 'what carries the absorber' }),
  size: size
    .default({ by: 'ratio', ratio: 0.05 })
    .meta({ description: 'mass of the absorber, typed or as a share of its host' }),
  tuning: tuning.prefault({ by: 'minimax' }).meta({ description: 'how spring and damper are found' }),
  strokeLimit: optionalQuantity(
    'deflection',
    'largest travel allowed between absorber mass and machine, zero to peak',
    { above: 0 },
  ),
})

export type Absorber = z.infer<typeof absorberSchema>
export type AbsorberHost = Absorber['host']
export type AbsorberTuning = Absorber['tuning']
export type Objective = z.infer<typeof objective>
