import Sqlite from 'better-sqlite3'
import { describe, expect, it } from 'vitest'
import { NotFoundError, StaleError } from '../../../electron/library/errors.ts'
import { renamed, sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

const UNKNOWN = '00000000-0000-4000-8000-000000000000'

describe('saving', () => {
  it('raises the revision by one and moves the time of change', () => {
    const { projects } = testLibrary()
    const { id, revision } = projects.create(sampleProject())
    const before = projects.row(id).changedAt
    const saved = projects.save(id, revision, renamed(sampleProject(), 'Sieve drive, new mounts'))
    expect(saved.revision).toBe(2)
    expect(saved.changedAt > before).toBe(true)
    expect(projects.row(id)).toMatchObject({ name: 'Sieve drive, new mounts', changedAt: saved.changedAt })
  })

  it('refuses a copy that is older than the stored project, and stores nothing of it', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    projects.save(id, 1, renamed(sampleProject(), 'by the first'))
    expect(() => projects.save(id, 1, renamed(sampleProject(), 'by the second'))).toThrow(StaleError)
    expect(projects.open(id)).toMatchObject({ revision: 2, project: { job: { name: 'by the first' } } })
  })

  it('stores all of a save or, when it fails on the way, nothing', () => {
    const { projects, file } = testLibrary()
    const { id } = projects.create(sampleProject())
    const other = new Sqlite(file)
    other.exec('DROP TABLE project_text')
    other.close()
    expect(() => projects.save(id, 1, renamed(sampleProject(), 'half'))).toThrow(/project_text/)
    expect(() => projects.create(renamed(sampleProject(), 'half'))).toThrow(/project_text/)
    expect(projects.list({})).toHaveLength(1)
    expect(projects.open(id)).toStrictEqual({ id, revision: 1, project: sampleProject() })
  })

  it('refuses an unknown project and one in the wastebasket', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    projects.remove(id)
    expect(() => projects.save(UNKNOWN, 1, sampleProject())).toThrow(NotFoundError)
    expect(() => projects.save(id, 1, sampleProject())).toThrow(/wastebasket/)
  })
})

describe('listing', () => {
  it('shows what the Shelf needs of the machine', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    expect(projects.list({})).toEqual([
      {
        id,
        name: 'Sieve drive',
        reference: 'T-1',
        site: 'Test bay',
        description: 'Vibrating sieve with flange motor',
        tags: ['sieve'],
        createdAt: '2030-01-01T12:00:00.000Z',
        changedAt: '2030-01-01T12:00:00.000Z',
        removedAt: null,
        mass: 250,
        runningSpeed: sampleProject().machine.duty.runningSpeed,
        mountPositions: [
          [0.4, 0.3],
          [0.4, -0.3],
          [-0.4, 0.3],
          [-0.4, -0.3],
        ],
        mountCount: 4,
        absorberCount: 0,
      },
    ])
  })

  it('adds up the parts of a machine that is described by parts', () => {
    const { projects } = testLibrary()
    const base = sampleProject()
    const part = { shape: 'box' as const, name: '', centre: [0, 0, 0] as [number, number, number] }
    const size: [number, number, number] = [1, 1, 1]
    const parts = [
      { ...part, id: 'a', mass: 120, size },
      { ...part, id: 'b', mass: 40.5, size },
    ]
    const machine = { ...base.machine, massProperties: { from: 'parts' as const, parts } }
    const { id } = projects.create({ ...base, machine })
    expect(projects.row(id).mass).toBe(160.5)
  })

  it('puts what changed last first', () => {
    const { projects } = testLibrary()
    const older = projects.create(renamed(sampleProject(), 'older'))
    projects.create(renamed(sampleProject(), 'newer'))
    const names = () => projects.list({}).map(({ name }) => name)
    expect(names()).toEqual(['newer', 'older'])
    projects.save(older.id, 1, renamed(sampleProject(), 'older'))
    expect(names()).toEqual(['older', 'newer'])
  })
})

describe('renaming and duplicating', () => {
  it('writes the name into the project itself, which nothing else of it follows', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    expect(projects.rename(id, 'Screen 2').name).toBe('Screen 2')
    expect(projects.open(id).project).toStrictEqual(renamed(sampleProject(), 'Screen 2'))
  })

  it('makes an independent copy', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    const copy = projects.duplicate(id)
    expect(copy.name).toBe('Copy of Sieve drive')
    projects.save(copy.id, 1, renamed(sampleProject(), 'changed'))
    expect(projects.open(id).project.job.name).toBe('Sieve drive')
  })

  it('keeps the name of a copy within the length of a name', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(renamed(sampleProject(), 'x'.repeat(200)))
    expect(projects.open(projects.duplicate(id).id).project.job.name).toHaveLength(200)
  })
})

describe('the wastebasket', () => {
  it('takes a project from the Shelf and gives it back as it was', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    expect(projects.remove(id).removedAt).not.toBeNull()
    expect(projects.list({})).toEqual([])
    expect(projects.list({ wastebasket: true })).toHaveLength(1)
    expect(() => projects.open(id)).toThrow(NotFoundError)
    projects.restore(id)
    expect(projects.list({ wastebasket: true })).toEqual([])
    expect(projects.open(id)).toStrictEqual({ id, revision: 1, project: sampleProject() })
  })

  it('erases for good, but only what was removed before', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    expect(() => projects.erase(id)).toThrow(NotFoundError)
    projects.remove(id)
    projects.erase(id)
    expect(projects.list({ wastebasket: true })).toEqual([])
    expect(() => projects.restore(id)).toThrow(NotFoundError)
  })

  it('keeps the time of the first removal', () => {
    const { projects } = testLibrary()
    const { id } = projects.create(sampleProject())
    const first = projects.remove(id).removedAt
    expect(projects.remove(id).removedAt).toBe(first)
  })
})
