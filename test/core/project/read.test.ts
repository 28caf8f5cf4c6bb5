import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { InputError } from '../../../core/errors.ts'
import { blankProject } from '../../../core/project/create.ts'
import { projectSchema } from '../../../core/project/project.ts'
import { readProject, readProjectText } from '../../../core/project/read.ts'

const frame = { format: 'stillbed-project', version: 1 }
const withMass = (mass: unknown) => ({ ...frame, machine: { massProperties: { from: 'typed', mass } } })

function refusal(run: () => unknown): InputError {
  try {
    run()
  } catch (error) {
    if (error instanceof InputError) return error
    throw error
  }
  throw new Error('was accepted')
}

function massOf(raw: unknown): number | null {
  const { massProperties } = readProject(raw).machine
  return massProperties.from === 'typed' ? massProperties.mass : null
}

describe('a project file', () => {
  it('takes quantities as SI numbers or as text with units', () => {
    expect(massOf(withMass(850))).toBe(850)
    expect(massOf(withMass('850 kg'))).toBe(850)
    // 1 lb = 0.45359237 kg exactly: international yard and pound agreement, 1959
    expect(massOf(withMass('1000 lb'))).toBeCloseTo(453.59237, 10)
    expect(massOf(withMass(null))).toBeNull()
  })

  it('fills everything that has a default, and reads its own output unchanged', () => {
    const blank = blankProject('Kiln fan')
    expect(readProject(JSON.parse(JSON.stringify(blank)))).toEqual(blank)
    expect(readProject({ ...frame, job: { name: 'Kiln fan' } })).toEqual(blank)
  })

  it.each([
    ['text', 'heavy', 'enter a number'],
    ['zero', 0, 'greater than 0 kg'],
    ['a negative mass', -5, 'greater than 0 kg'],
    ['negative text', '-5 kg', 'greater than 0 kg'],
    ['the wrong unit', '5 rpm', 'enter a number'],
    ['a list', [5], 'expected number'],
    ['an absurd mass', 1e300, 'must not be beyond'],
  ])('refuses %s at the field that holds it', (_what, mass, words) => {
    const error = refusal(() => readProject(withMass(mass)))
    expect(error.field).toBe('machine.massProperties.mass')
    expect(error.allowed).toContain(words)
  })

  it('names the field inside lists', () => {
    const type = { id: 't', stiffness: [1e5, 1e5, -2e5] }
    expect(refusal(() => readProject({ ...frame, mounting: { types: [type] } })).field).toBe(
      'mounting.types[0].stiffness[2]',
    )
    const speed = { duty: { furtherSpeeds: ['600 rpm', '1e9 rpm'] } }
    expect(refusal(() => readProject({ ...frame, machine: speed })).field).toBe(
      'machine.duty.furtherSpeeds[1]',
    )
  })

  it('refuses a key that it does not know, so that no misspelt field is silently dropped', () => {
    const error = refusal(() => readProject({ ...frame, machine: { mass: 5 } }))
    expect(error.field).toBe('machine')
    expect(error.message).toContain('mass')
  })

  it('refuses a mount of an unknown type and an identifier used twice', () => {
    const placed = { id: 'M1', type: 'none', position: [0, 0, 0] }
    expect(refusal(() => readProject({ ...frame, mounting: { placed: [placed] } })).field).toBe(
      'mounting.placed[0].type',
    )
    const points = [1, 2].map(() => ({ id: 'A', position: [0, 0, 0] }))
    expect(refusal(() => readProject({ ...frame, machine: { points } })).field).toBe('machine.points[1].id')
  })

  it('refuses what is not JSON, not a project, or from a newer program', () => {
    expect(refusal(() => readProjectText('{"format":')).message).toContain('is not JSON')
    expect(refusal(() => readProject([])).field).toBe('project')
    expect(refusal(() => readProject({ version: 1 })).field).toBe('format')
    expect(refusal(() => readProject({ ...frame, version: 99 })).message).toContain('newer')
    expect(refusal(() => readProject({ ...frame, version: 0.5 })).field).toBe('version')
  })

  it('is not led astray by a key named like a part of JavaScript', () => {
    const raw: unknown = JSON.parse('{"format":"stillbed-project","version":1,"__proto__":{"units":"US"}}')
    expect(refusal(() => readProject(raw)).field).toBe('project')
  })
})

describe('the JSON Schema of a project', () => {
  it('is made from the same schema and states meaning and unit of a quantity', () => {
    const schema = JSON.stringify(z.toJSONSchema(projectSchema, { io: 'input' }))
    expect(schema).toContain('total mass on the mounts')
    expect(schema).toContain('"unit":"rad/s"')
  })
})
