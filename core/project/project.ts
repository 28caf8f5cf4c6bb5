import { z } from 'zod'
import { UNIT_SYSTEMS } from '../units/dimensions.ts'
import { absorberSchema } from './absorber.ts'
import { direction, label, quantity, temperature } from './fields.ts'
import { machineSchema } from './machine.ts'
import { mountingSchema } from './mounts.ts'
import { requirementSchema } from './requirements.ts'
import { runUpSchema } from './run-up.ts'
import { sourceSchema } from './sources.ts'

export const PROJECT_FORMAT = 'stillbed-project'
/** Raised when the shape of a project changes; `upgrade.ts` brings older files up to it. */
export const PROJECT_VERSION = 1

const job = z
  .strictObject({
    name: label('name of the project'),
    reference: label('job or order number'),
    site: label('where the machine stands'),
    preparedBy: label('who answers for the calculation'),
    notes: z.string().max(20_000).default('').meta({ description: 'anything worth keeping' }),
    tags: z
      .array(z.string().min(1).max(60))
      .max(50)
      .default([])
      .meta({ description: 'words to find the project by' }),
  })
  .prefault({})
  .meta({ description: 'what the project is called and whom it serves' })

const analysis = z
  .strictObject({
    gravityStiffness: z
      .boolean()
      .default(true)
      .meta({ description: 'include the overturning effect of the weight above the mounts' }),
    gravity: z
      .number()
      .positive()
      .max(100)
      .default(9.80665)
      .meta({ description: 'acceleration of gravity [m/s²]', unit: 'm/s²' }),
    temperature: temperature('temperature at which the mounts work; empty: that of their figures')
      .nullable()
      .default(null)
      .meta({
        description: 'temperature at which the mounts work; empty: that of their figures',
        unit: '°C',
      }),
    lateralLoad: z
      .strictObject({
        factor: quantity('ratio', 'load over the weight', { above: 0, max: 10 }),
        direction: direction('direction of the load; the opposite one is computed too'),
      })
      .nullable()
      .default(null)
      .meta({
        description:
          'equivalent static load through the centre of gravity, as for transport, belts or earthquake',
      }),
  })
  .prefault({})
  .meta({ description: 'how the results are computed' })

/** The project as data: what a file, a row of the library, the interface and the batch door share. */
export const projectSchema = z
  .strictObject({
    format: z.literal(PROJECT_FORMAT),
    version: z.literal(PROJECT_VERSION),
    job,
    units: z.enum(UNIT_SYSTEMS).default('SI').meta({
      description:
        'units in which a person reads the project; values in the file are SI unless they carry a unit',
    }),
    machine: machineSchema,
    sources: z.array(sourceSchema).max(100).default([]).meta({ description: 'exciting forces' }),
    footing: z
      .discriminatedUnion('kind', [z.strictObject({ kind: z.literal('rigid') })])
      .default({ kind: 'rigid' })
      .meta({ description: 'what the mounts stand on' }),
    mounting: mountingSchema,
    runUp: runUpSchema,
    absorbers: z
      .array(absorberSchema)
      .max(10)
      .default([])
      .meta({ description: 'tuned masses on the machine, or on a host of one freedom' }),
    requirements: z
      .array(requirementSchema)
      .max(100)
      .default([])
      .meta({ description: 'limits that the machine on its mounts must keep' }),
    analysis,
  })
  .meta({
    title: 'Stillbed project',
    description:
      'A machine, its mounting, absorbers and requirements. Numbers are SI (rad/s for shaft speed); text carries its unit, such as "1480 rpm".',
  })

export type Project = z.infer<typeof projectSchema>
/** What may be written by hand: quantities as text, everything with a default left out. */
export type ProjectInput = z.input<typeof projectSchema>
