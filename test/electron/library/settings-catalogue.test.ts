import { describe, expect, it } from 'vitest'
import { sampleProject } from '../projects.ts'
import { testLibrary } from './open.ts'

describe('settings', () => {
  it("start with the system's sheet and SI, and are kept", () => {
    const library = testLibrary()
    expect(library.settings.get()).toEqual({ sheet: 'system', units: 'SI' })
    library.settings.set({ sheet: 'dark', units: 'US' })
    library.close()
    expect(testLibrary(library.file).settings.get()).toEqual({ sheet: 'dark', units: 'US' })
  })

  it('fall back to what they start with when they cannot be read', () => {
    const { settings } = testLibrary()
    settings.write('interface', { sheet: 'plaid', units: 'US' })
    expect(settings.get()).toEqual({ sheet: 'system', units: 'SI' })
    settings.write('interface', { units: 'US' })
    expect(settings.get()).toEqual({ sheet: 'system', units: 'US' })
  })
})

describe('the catalogue', () => {
  it('keeps the order in which types came, and renews one in its place', () => {
    const { catalogue } = testLibrary()
    const [type] = sampleProject().mounting.types
    if (!type) throw new Error('the sample has a mount type')
    catalogue.addMany([
      { ...type, id: 'b', name: 'B' },
      { ...type, id: 'a', name: 'A' },
    ])
    catalogue.addMany([{ ...type, id: 'b', name: 'B, stiffer', stiffness: [1e5, 1e5, 0.1 + 0.2] }])
    expect(catalogue.list().map(({ name }) => name)).toEqual(['B, stiffer', 'A'])
    expect(catalogue.list()[0]?.stiffness[2]).toBe(0.1 + 0.2)
  })
})
