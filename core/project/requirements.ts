import { z } from 'zod'
import { identifier, label, optionalQuantity, quantity } from './fields.ts'

const common = {
  id: identifier,
  enabled: z.boolean().default(true).meta({ description: 'false: kept, but not judged' }),
  source: label('where the limit comes from: a contract, a standard, a maker'),
}
const speeds = z.enum(['running', 'operating', 'chart']).default('running').meta({
  description: 'judged at the running speed, over the operating range, or over every speed of the chart',
})

const during = z
  .enum(['both', 'up', 'down'])
  .default('both')
  .meta({ description: 'judged during run-up, coast-down, or whichever of them is switched on' })

export const SEVERITY_SCALES = ['iso10816-1', 'iso20816-3', 'iso14694', 'own'] as const

export const requirementSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    ...common,
    kind: z.literal('isolation'),
    speeds,
    limit: optionalQuantity('share', 'least isolation efficiency, 1 - force ratio', { max: 1 }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('transmittedForce'),
    speeds,
    place: z
      .enum(['support', 'worstMount'])
      .default('support')
      .meta({ description: 'the resultant into the support, or the hardest loaded mount' }),
    limit: optionalQuantity('force', 'largest dynamic force, peak', { above: 0 }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('vibrationVelocity'),
    speeds,
    point: identifier.nullable().default(null).meta({ description: 'id of the point on the machine' }),
    direction: z
      .enum(['worst', 'x', 'y', 'z'])
      .default('worst')
      .meta({ description: 'direction that is judged; worst: the largest of the three' }),
    scale: z
      .enum(SEVERITY_SCALES)
      .default('own')
      .meta({ description: 'severity scale that gives the limit, or "own" for a typed limit' }),
    machineClass: label('class, group or category within the scale'),
    zone: label('the best zone that must be kept: its upper boundary is the limit'),
    limit: optionalQuantity('velocity', 'largest RMS velocity, with scale "own"', { above: 0 }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('modeSeparation'),
    orders: z
      .array(quantity('ratio', 'order', { above: 0, max: 1000 }))
      .max(50)
      .default([1])
      .meta({ description: 'orders that the natural frequencies must keep away from' }),
    speeds,
    limit: optionalQuantity(
      'share',
      'least distance of every natural frequency from every order, as a share of the exciting frequency',
      { above: 0, max: 1 },
    ),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('mountLoad'),
    limit: optionalQuantity('share', 'largest static load as a share of the rated load', {
      above: 0,
      max: 10,
    }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('mountDeflection'),
    limit: optionalQuantity('deflection', "largest static deflection; empty: each mount's own limit", {
      above: 0,
    }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('absorberStroke'),
    speeds,
    absorber: identifier
      .nullable()
      .default(null)
      .meta({ description: 'id of the absorber; empty: all of them' }),
    limit: optionalQuantity('deflection', "largest travel, zero to peak; empty: each absorber's own limit", {
      above: 0,
    }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('runUpMotion'),
    place: z
      .enum(['mounts', 'point'])
      .default('mounts')
      .meta({ description: 'displacement across the mounts, or of a point of the machine' }),
    point: identifier.nullable().default(null).meta({ description: 'id of the point, with place "point"' }),
    direction: z
      .enum(['resultant', 'x', 'y', 'z'])
      .default('resultant')
      .meta({ description: 'direction that is judged, or the resultant of the three' }),
    during,
    limit: optionalQuantity('deflection', 'clearance: largest dynamic displacement, zero to peak', {
      above: 0,
    }),
  }),
  z.strictObject({
    ...common,
    kind: z.literal('runUpForce'),
    during,
    limit: optionalQuantity('force', 'largest dynamic force of one mount on its support, peak', {
      above: 0,
    }),
  }),
])

export type Requirement = z.infer<typeof requirementSchema>
export type RequirementKind = Requirement['kind']
export type SpeedSpan = 'running' | 'operating' | 'chart'
