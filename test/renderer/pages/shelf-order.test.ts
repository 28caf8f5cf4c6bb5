import { describe, expect, it } from 'vitest'
import type { ShelfRow } from '../../../electron/api/contract.ts'
import { sayWhen } from '../../../renderer/pages/shelf/dates.ts'
import { nextOrder, parseTags, sortRows, tagsOf } from '../../../renderer/pages/shelf/shelf-order.ts'

function row(name: string, mass: number | null, tags: readonly string[] = []): ShelfRow {
  return {
    id: name,
    name,
    reference: '',
    site: '',
    description: '',
    tags,
    createdAt: '2026-01-01T00:00:00Z',
    changedAt: '2026-01-01T00:00:00Z',
    removedAt: null,
    mass,
    runningSpeed: null,
    mountPositions: [],
    mountCount: 0,
    absorberCount: 0,
  }
}

describe('the Shelf', () => {
  const rows = [row('pump 10', null, ['demo']), row('pump 2', 300, ['demo', 'pump']), row('fan', 40)]

  it('sorts by name as a person counts', () => {
    const order = { column: 'name', rising: true } as const
    expect(sortRows(rows, order).map((item) => item.name)).toEqual(['fan', 'pump 2', 'pump 10'])
  })

  it('puts what is not known last, whichever way it is sorted', () => {
    for (const rising of [true, false]) {
      expect(sortRows(rows, { column: 'mass', rising }).at(-1)?.name).toBe('pump 10')
    }
  })

  it('turns the order round at a second click', () => {
    const first = nextOrder({ column: 'changedAt', rising: false }, 'mass')
    expect(first).toEqual({ column: 'mass', rising: false })
    expect(nextOrder(first, 'mass')).toEqual({ column: 'mass', rising: true })
  })

  it('lists tags by use, and reads them as typed', () => {
    expect(tagsOf(rows)).toEqual(['demo', 'pump'])
    expect(parseTags(' fan,  two   words,, fan ')).toEqual(['fan', 'two words'])
  })

  it('says when something was as one would say it', () => {
    const now = new Date(2026, 4, 10, 15, 0)
    expect(sayWhen(new Date(2026, 4, 10, 1, 0).toISOString(), now)).toMatch(/^today /)
    expect(sayWhen(new Date(2026, 4, 9, 23, 0).toISOString(), now)).toMatch(/^yesterday /)
    expect(sayWhen(new Date(2026, 3, 1, 23, 0).toISOString(), now)).toMatch(/2026/)
  })
})
