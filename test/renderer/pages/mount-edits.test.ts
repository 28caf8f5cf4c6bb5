import { describe, expect, it } from 'vitest'
import { blankProject } from '../../../core/project/create.ts'
import type { MountType } from '../../../core/project/mounts.ts'
import { readProject } from '../../../core/project/read.ts'
import {
  carries,
  deflectionUnder,
  filterCatalogue,
  heaveFrequency,
} from '../../../renderer/pages/mounts/catalogue.ts'
import {
  addMount,
  freePlace,
  nameMounts,
  takeFromCatalogue,
} from '../../../renderer/pages/mounts/mount-edits.ts'

function item(id: string, rated: number | null, least: number | null = null): MountType {
  return {
    id,
    name: id.toUpperCase(),
    kind: id.startsWith('s') ? 'steel spring' : 'elastomer',
    stiffness: [1e5, 1e5, 2e5],
    law: { kind: 'linear' },
    design: null,
    dynamicRatio: 1.44,
    lossFactor: 0.1,
    viscous: [0, 0, 0],
    ratedLoad: rated,
    leastLoad: least,
    deflectionLimit: null,
    snubberGap: null,
    stiffnessAtTemperature: null,
    height: null,
    price: null,
    note: '',
  }
}

describe('mounts', () => {
  it('get a type when the project has none yet, and make a project that can be stored', () => {
    const draft = blankProject('x')
    const first = addMount(draft, null, [0, 0, 0])
    addMount(draft, null, [1, 0, 0])
    expect(draft.mounting.types).toHaveLength(1)
    expect(draft.mounting.placed.map((mount) => [mount.id, mount.name])).toEqual([
      [first, 'M1'],
      ['m2', 'M2'],
    ])
    expect(() => readProject(draft)).not.toThrow()
  })

  it('take a type of the catalogue, and leave no copies that nothing uses', () => {
    const draft = blankProject('x')
    const catalogue = [item('s1', 1000), item('s2', 2000)]
    const [s1, s2] = catalogue
    if (!s1 || !s2) throw new Error('the two items above')
    const ids = [addMount(draft, null, [0, 0, 0]), addMount(draft, null, [1, 0, 0])]
    for (const type of draft.mounting.types) type.stiffness = [4e5, 4e5, 5e5]
    takeFromCatalogue(draft, s1, ids, catalogue, null)
    takeFromCatalogue(draft, s2, ids, catalogue, null)
    // the type typed in by hand stays, the first item's copy goes
    expect(draft.mounting.types.map((type) => type.id)).toEqual(['type1', 's2'])
    takeFromCatalogue(draft, s1, ['m1'], catalogue, null)
    expect(draft.mounting.placed.map((mount) => mount.type)).toEqual(['s1', 's2'])
    expect(() => readProject(draft)).not.toThrow()
  })

  it('leave no guess behind that nobody has touched', () => {
    const draft = blankProject('x')
    const ids = [addMount(draft, null, [0, 0, 0])]
    takeFromCatalogue(draft, item('s1', 1000), ids, [], null)
    expect(draft.mounting.types.map((type) => type.id)).toEqual(['s1'])
  })

  it('do not take over a type of the same id with other figures', () => {
    const draft = blankProject('x')
    const ids = [addMount(draft, null, [0, 0, 0])]
    draft.mounting.types.push({ ...item('s1', 1000), lossFactor: 0.3 })
    takeFromCatalogue(draft, item('s1', 1000), ids, [], null)
    expect(draft.mounting.placed[0]?.type).not.toBe('s1')
    expect(draft.mounting.types.find((type) => type.id === 's1')?.lossFactor).toBe(0.3)
  })

  it('added one after the other do not stand in one another', () => {
    const draft = blankProject('x')
    const places = [1, 2, 3].map(() => {
      const place = freePlace(draft.mounting.placed, [0, 0.5, 0], 0.1)
      addMount(draft, null, place)
      return place
    })
    expect(places).toEqual([
      [0, 0.5, 0],
      [0.1, 0.5, 0],
      [0.2, 0.5, 0],
    ])
  })

  it('are named in a sentence', () => {
    const draft = blankProject('x')
    for (let x = 0; x < 7; x += 1) addMount(draft, null, [x, 0, 0])
    expect(nameMounts(draft.mounting.placed.slice(0, 2))).toBe('M1, M2')
    expect(nameMounts(draft.mounting.placed)).toBe('7 mounts')
    expect(nameMounts([])).toBe('no mount')
  })
})

describe('the catalogue', () => {
  it('offers what carries the loads in question', () => {
    const items = [item('s1', 1000, 300), item('s2', 2000, 600), item('e1', null)]
    const find = (fitting: boolean, query = '', kind = '') =>
      filterCatalogue(items, { fitting, query, kind }, { least: 500, largest: 900 }).map((found) => found.id)
    expect(find(true)).toEqual(['s1', 'e1'])
    expect(find(false)).toEqual(['s1', 's2', 'e1'])
    expect(find(false, 'spring')).toEqual(['s1', 's2'])
    expect(find(false, '', 'elastomer')).toEqual(['e1'])
    expect(carries(item('s1', 1000), { least: 0, largest: 1001 })).toBe(false)
  })

  it('tells deflection on static and heave on dynamic stiffness', () => {
    const mount = item('e1', null)
    expect(deflectionUnder(mount, 1000)).toBe(0.005)
    // sqrt(g / δ) / 2π with δ = 5 mm, times sqrt(1.44) = 1.2; closed form, exact to rounding
    expect(heaveFrequency(mount, 1000, 9.8)).toBeCloseTo((1.2 * Math.sqrt(9.8 / 0.005)) / (2 * Math.PI), 10)
    expect(heaveFrequency(mount, -5, 9.8)).toBeNull()
  })
})
