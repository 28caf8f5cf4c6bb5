import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Project } from '../../../core/project/project.ts'
import { searchExpression } from '../../../electron/library/search.ts'
import { renamed, sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

describe('search as you type', () => {
  const found = (project: Project, query: string) => {
    const { projects } = testLibrary()
    projects.create(project)
    return projects.list({ query }).length === 1
  }

  it.each([
    ['name', 'siev'],
    ['reference', 't-1'],
    ['site', 'bay'],
    ['notes', 'überg'],
    ['tag', 'sieve'],
    ['machine', 'flange'],
    ['mount type', 'coil'],
    ['kind of mount type', 'spring'],
  ])('finds a project by the beginning of a word of its %s', (_where, query) => {
    expect(found(sampleProject(), query)).toBe(true)
  })

  it.each(['UBERGABE', 'ubergabe', 'capek', 'ČAPEK'])('folds case and accents: %s', (query) => {
    expect(found(sampleProject(), query)).toBe(true)
  })

  it('wants every word, in any order and from any field', () => {
    expect(found(sampleProject(), 'flange sieve bay')).toBe(true)
    expect(found(sampleProject(), 'flange kiln')).toBe(false)
  })

  it('does not find the middle of a word', () => {
    expect(found(sampleProject(), 'ieve')).toBe(false)
  })

  it('lists everything while nothing searchable is typed', () => {
    for (const query of ['', '   ', '*', '"', '- -']) expect(found(sampleProject(), query)).toBe(true)
  })

  it('follows a change of name, and forgets the old one', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    projects.save(id, 1, renamed(sampleProject(), 'Hammer mill'))
    expect(projects.list({ query: 'hammer' })).toHaveLength(1)
    expect(projects.list({ query: 'drive' })).toHaveLength(0)
  })

  it('searches Shelf and wastebasket apart', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    projects.remove(id)
    expect(projects.list({ query: 'sieve' })).toHaveLength(0)
    expect(projects.list({ query: 'sieve', wastebasket: true })).toHaveLength(1)
    projects.erase(id)
    expect(projects.list({ query: 'sieve', wastebasket: true })).toHaveLength(0)
  })

  it.each([
    'AND',
    'fan OR',
    'NEAR(',
    'name:',
    '^sieve',
    'a*b*',
    "';--",
    'x"y',
    '(',
    '{a b}:',
    '-sieve',
    '\0',
  ])('takes %j as text and not as query syntax', (query) => {
    expect(() => testLibrary().projects.list({ query })).not.toThrow()
  })

  it('never fails, whatever is typed', () => {
    const { projects } = testLibrary()
    projects.create(sampleProject())
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 200 }), (query) => {
        projects.list({ query })
      }),
    )
  })
})

it('quotes each word as a prefix', () => {
  expect(searchExpression('kiln "fa')).toBe('"kiln"* "fa"*')
})

// No time is asserted, since machines differ; one with two cores takes about 3 ms for a search.
it('finds the one among five thousand', () => {
  const library = testLibrary()
  const base = sampleProject()
  library.inTransaction(() => {
    for (let number = 0; number < 5000; number += 1) {
      library.projects.create(renamed(base, `Machine ${number} line ${number % 7}`))
    }
  })
  expect(library.projects.list({ query: 'mach 4321' }).map(({ name }) => name)).toEqual([
    'Machine 4321 line 2',
  ])
  expect(library.projects.list({ query: 'line 3' }).length).toBeGreaterThan(700)
  expect(library.projects.list({})).toHaveLength(5000)
})
