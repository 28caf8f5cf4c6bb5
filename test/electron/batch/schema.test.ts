import { spawnSync } from 'node:child_process'
import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'

const ROOT = join(import.meta.dirname, '../../..')

interface Schema {
  readonly description?: string
  readonly unit?: string
  readonly const?: unknown
  readonly type?: string | readonly string[]
  readonly properties?: Readonly<Record<string, Schema>>
  readonly required?: readonly string[]
  readonly items?: Schema | false
  readonly prefixItems?: readonly Schema[]
  readonly anyOf?: readonly Schema[]
  readonly oneOf?: readonly Schema[]
}

interface Field {
  readonly path: string
  readonly schema: Schema
}

/** Every named field, through lists and alternatives. */
function fieldsOf(schema: Schema, path = ''): Field[] {
  const below = [...(schema.anyOf ?? []), ...(schema.oneOf ?? [])].flatMap((option) => fieldsOf(option, path))
  const items = schema.items ? fieldsOf(schema.items, `${path}[]`) : []
  const places = (schema.prefixItems ?? []).flatMap((place, index) => [
    { path: `${path}[${index}]`, schema: place },
    ...fieldsOf(place, `${path}[${index}]`),
  ])
  const named = Object.entries(schema.properties ?? {}).flatMap(([name, field]) => {
    const at = path === '' ? name : `${path}.${name}`
    return [{ path: at, schema: field }, ...fieldsOf(field, at)]
  })
  return [...below, ...items, ...places, ...named]
}

/** A number of any size, not a count. */
function isQuantity({ type, anyOf }: Schema): boolean {
  const types = [type ?? []].flat()
  return types.includes('number') || (anyOf ?? []).some(isQuantity)
}

describe('the schema that --schema prints', () => {
  let schema: Schema
  beforeAll(() => {
    const door = join(ROOT, 'electron/batch/evaluate.ts')
    const { stdout, status } = spawnSync(process.execPath, [door, '--schema'], { encoding: 'utf8' })
    expect(status).toBe(0)
    schema = JSON.parse(stdout) as Schema
  }, 60_000)

  it('asks for format and version and nothing else', () => {
    expect(schema.required).toEqual(['format', 'version'])
  })

  it('says the meaning of every field', () => {
    // a constant says all about itself
    const silent = fieldsOf(schema).filter(
      (field) => !field.schema.description && field.schema.const === undefined,
    )
    expect(silent.map(({ path }) => path)).toEqual([])
    expect(fieldsOf(schema).length).toBeGreaterThan(150)
  })

  it('says the unit of every number', () => {
    const bare = fieldsOf(schema).filter(
      (field) => isQuantity(field.schema) && !field.schema.unit && field.schema.const === undefined,
    )
    expect(bare.map(({ path }) => path)).toEqual([])
  })

  it('lets a quantity be written as text with its unit', () => {
    const mass = fieldsOf(schema).find(({ path }) => path === 'machine.massProperties.mass')
    expect(mass?.schema).toMatchObject({
      unit: 'kg',
      anyOf: [{ type: ['number', 'string'] }, { type: 'null' }],
    })
  })

  it('knows every key that the demo projects use', () => {
    const known = new Set(fieldsOf(schema).map(({ path }) => path))
    const folder = join(ROOT, 'resources/demo')
    for (const name of readdirSync(folder)) {
      const project: unknown = JSON.parse(readFileSync(join(folder, name), 'utf8'))
      expect(keysOf(project).filter((key) => !known.has(key))).toEqual([])
    }
  })
})

function keysOf(value: unknown, path = ''): string[] {
  if (Array.isArray(value)) return value.flatMap((item) => keysOf(item, `${path}[]`))
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([name, part]) => {
    const at = path === '' ? name : `${path}.${name}`
    return [at, ...keysOf(part, at)]
  })
}
