import fc from 'fast-check'
import { expect, it } from 'vitest'
import type { Project } from '../../../core/project/project.ts'
import { decode, encode } from '../../../electron/api/codec.ts'
import { sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

/** Every double that a coordinate takes, the smallest and the negative zero among them. */
const coordinate = fc.double({ min: -1e15, max: 1e15, noNaN: true })
const positive = fc.double({ min: Number.MIN_VALUE, max: 1e15, noNaN: true })
/** Any text: control characters, NUL, halves of surrogate pairs, quotes. */
const text = fc.string({ unit: 'binary', maxLength: 60 }).filter((value) => value.length <= 200)

const project: fc.Arbitrary<Project> = fc
  .record({
    name: text,
    notes: text,
    tag: text,
    mass: positive,
    place: fc.tuple(coordinate, coordinate, coordinate),
  })
  .map(({ name, notes, tag, mass, place }) => {
    const base = sampleProject()
    const tags = tag === '' ? [] : [tag]
    const massProperties = {
      ...base.machine.massProperties,
      from: 'typed' as const,
      mass,
      centreOfGravity: place,
    }
    return {
      ...base,
      job: { ...base.job, name, notes, tags },
      machine: { ...base.machine, massProperties: { ...massProperties, inertia: inertiaOf(base) } },
    }
  })

function inertiaOf({ machine: { massProperties } }: Project) {
  if (massProperties.from !== 'typed') throw new Error('the sample types its mass')
  return massProperties.inertia
}

// toStrictEqual compares numbers as Object.is does: bit for bit, the sign of zero included.
it('gives back every project bit for bit after saving, closing and opening', () => {
  const library = testLibrary()
  fc.assert(
    fc.property(project, project, (first, second) => {
      const { id } = library.projects.create(first)
      expect(library.projects.open(id).project).toStrictEqual(first)
      library.projects.save(id, 1, second)
      expect(library.projects.open(id).project).toStrictEqual(second)
    }),
  )
})

it('keeps every double on its way through HTTP', () => {
  fc.assert(
    fc.property(fc.array(fc.double({ noNaN: true, noDefaultInfinity: true })), (numbers) => {
      expect(decode(encode(numbers))).toStrictEqual(numbers)
      expect(decode(encode(Float64Array.from(numbers)))).toStrictEqual(Float64Array.from(numbers))
    }),
  )
})

it('keeps the negative zero, which plain JSON loses', () => {
  const library = testLibrary()
  const base = sampleProject()
  const placed = base.mounting.placed.map((mount) => ({
    ...mount,
    position: [-0, 0, -0] as [number, number, number],
  }))
  const { id } = library.projects.create({ ...base, mounting: { ...base.mounting, placed } })
  expect(library.projects.open(id).project.mounting.placed[0]?.position).toStrictEqual([-0, 0, -0])
})
