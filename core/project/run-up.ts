import { z } from 'zod'
import { optionalQuantity, quantity } from './fields.ts'

const LIMITS = { min: 0, max: 1e6 }
const MOST_TIME = 1e6

const speed = (meaning: string) => optionalQuantity('shaftSpeed', meaning, LIMITS)
const time = (meaning: string) => optionalQuantity('time', meaning, { above: 0, max: MOST_TIME })

const table = z
  .strictObject({
    by: z.literal('table'),
    entries: z
      .array(
        z.strictObject({
          time: quantity('time', 'time since the start', { min: 0, max: MOST_TIME }),
          speed: quantity('shaftSpeed', 'speed at that time', LIMITS),
        }),
      )
      .max(2000)
      .default([])
      .meta({ description: 'at least two entries with rising times; straight lines between them' }),
  })
  .meta({ description: 'speed against time as recorded or as programmed' })

const load = {
  inertia: optionalQuantity('inertia', 'inertia of the rotor and all that turns with it, about the shaft', {
    above: 0,
  }),
  loadTorque: quantity('moment', 'torque of a load that grows with the square of speed, at loadSpeed', {
    min: 0,
  }).default(0),
  loadSpeed: optionalQuantity('shaftSpeed', 'speed at which loadTorque holds; empty: the running speed', {
    above: 0,
    max: 1e6,
  }),
}

const riseLaw = z.discriminatedUnion('by', [
  z
    .strictObject({
      by: z.literal('ramp'),
      from: quantity('shaftSpeed', 'speed at which it starts; 0: from rest', LIMITS).default(0),
      to: speed('speed at which it ends; empty: the running speed'),
      time: time('time that the run-up takes'),
    })
    .meta({ description: 'the same acceleration throughout' }),
  z
    .strictObject({
      by: z.literal('torque'),
      from: quantity('shaftSpeed', 'speed at which it starts; 0: from rest', LIMITS).default(0),
      to: speed('speed at which it ends; empty: the running speed'),
      torque: optionalQuantity('moment', 'driving torque, the same at every speed', { above: 0 }),
      ...load,
    })
    .meta({ description: 'inertia times acceleration is driving torque less load torque' }),
  table,
])

const fallLaw = z.discriminatedUnion('by', [
  z
    .strictObject({
      by: z.literal('ramp'),
      from: speed('speed at which it starts; empty: the running speed'),
      to: quantity('shaftSpeed', 'speed at which it ends; 0: at rest', LIMITS).default(0),
      time: time('time that the coast-down takes'),
    })
    .meta({ description: 'the same deceleration throughout' }),
  z
    .strictObject({
      by: z.literal('torque'),
      from: speed('speed at which it starts; empty: the running speed'),
      to: quantity('shaftSpeed', 'speed at which it ends; 0: at rest', LIMITS).default(0),
      torque: quantity('moment', 'torque of friction and brake, the same at every speed', { min: 0 }).default(
        0,
      ),
      ...load,
    })
    .meta({ description: 'inertia times deceleration is braking torque plus load torque' }),
  table,
])

const hold = (seconds: number) =>
  quantity('time', 'time at the last speed that is still looked at', { min: 0, max: MOST_TIME }).default(
    seconds,
  )

/**
 * How the shaft comes up to speed and down again. Left out of every result until `enabled`.
 * The machine starts from rest where the first speed is zero, otherwise from the steady state there.
 */
export const runUpSchema = z
  .strictObject({
    enabled: z
      .boolean()
      .default(false)
      .meta({ description: 'false: run-up and coast-down are not computed' }),
    up: z
      .strictObject({
        enabled: z.boolean().default(true).meta({ description: 'false: the run-up is left out' }),
        law: riseLaw.prefault({ by: 'ramp' }).meta({ description: 'how the speed rises' }),
        hold: hold(10),
      })
      .prefault({})
      .meta({ description: 'from rest, or from some speed, to the running speed' }),
    down: z
      .strictObject({
        enabled: z.boolean().default(true).meta({ description: 'false: the coast-down is left out' }),
        law: fallLaw.prefault({ by: 'ramp' }).meta({ description: 'how the speed falls' }),
        hold: hold(0),
      })
      .prefault({})
      .meta({ description: 'from the running speed to rest, or to some speed' }),
  })
  .prefault({})
  .meta({ description: 'run-up to speed and coast-down through the resonances' })

export type RunUp = z.infer<typeof runUpSchema>
export type RiseLaw = RunUp['up']['law']
export type FallLaw = RunUp['down']['law']
