import { describe, expect, it } from 'vitest'
import { ARGUMENTS, type EndpointName, type Reply } from '../../../electron/api/contract.ts'
import { bridgeName } from '../../../electron/api/bridge-name.ts'
import { isEndpoint } from '../../../electron/api/dispatch.ts'
import { fileStem } from '../../../electron/api/report.ts'
import { renamed, sampleProject } from '../projects.ts'
import { testApi } from './context.ts'

const UNKNOWN = '00000000-0000-4000-8000-000000000000'

function valueOf<T>(reply: Reply<T>): T {
  if (!reply.ok) throw new Error(reply.error.message)
  return reply.value
}

describe('a project through the API', () => {
  it('is created, saved, renamed, duplicated, removed, restored and erased', async () => {
    const { dispatch } = testApi()
    const { id } = valueOf(await dispatch('shelf:create', { project: sampleProject() }))
    const project = renamed(sampleProject(), 'second state')
    expect(valueOf(await dispatch('shelf:save', { id, revision: 1, project })).revision).toBe(2)
    expect(valueOf(await dispatch('shelf:open', { id }))).toStrictEqual({ id, revision: 2, project })
    expect(valueOf(await dispatch('shelf:rename', { id, name: '  third name ' })).name).toBe('third name')
    expect(valueOf(await dispatch('shelf:duplicate', { id })).name).toBe('Copy of third name')
    valueOf(await dispatch('shelf:remove', { id }))
    expect(valueOf(await dispatch('shelf:list', {}))).toHaveLength(1)
    valueOf(await dispatch('shelf:restore', { id }))
    expect(valueOf(await dispatch('shelf:list', { query: 'third' }))).toHaveLength(2)
    valueOf(await dispatch('shelf:remove', { id }))
    expect(valueOf(await dispatch('shelf:erase', { id }))).toBeNull()
    expect(valueOf(await dispatch('shelf:list', { wastebasket: true }))).toEqual([])
  })

  it('comes in from the text of a project file, quantities written with units', async () => {
    const { dispatch } = testApi()
    const text = `\uFEFF{"format":"stillbed-project","version":1,"job":{"name":"by hand"},
      "machine":{"massProperties":{"from":"typed","mass":"200 lb"}}}`
    const row = valueOf(await dispatch('shelf:import', { text }))
    // SOURCE  international pound, exactly 0.45359237 kg (NIST SP 811, Appendix B.8)
    expect(row).toMatchObject({ name: 'by hand', mass: 200 * 0.45359237 })
  })

  it('reports as a PDF named after the project', async () => {
    const { dispatch } = testApi()
    const reply = valueOf(
      await dispatch('report:pdf', { project: renamed(sampleProject(), 'Fan 7/8: "new"') }),
    )
    expect(reply).toEqual({ fileName: 'Fan 7 8 new.pdf', bytes: Uint8Array.of(37, 80, 68, 70) })
  })

  it('keeps settings and says what it is', async () => {
    const { dispatch, library } = testApi()
    valueOf(await dispatch('settings:set', { sheet: 'dark', units: 'US' }))
    expect(valueOf(await dispatch('settings:get', null))).toEqual({ sheet: 'dark', units: 'US' })
    expect(valueOf(await dispatch('app:info', null)).libraryFile).toBe(library.file)
    expect(valueOf(await dispatch('catalogue:list', null))).toEqual([])
  })
})

describe('what goes wrong', () => {
  const errorOf = <T>(reply: Reply<T>) => (reply.ok ? null : reply.error)

  it('names the field of a project that cannot be used, and stores nothing', async () => {
    const { dispatch } = testApi()
    const { id } = valueOf(await dispatch('shelf:create', { project: sampleProject() }))
    const bad = structuredClone(sampleProject())
    const [mount] = bad.mounting.placed
    if (mount) mount.position[1] = NaN
    expect(errorOf(await dispatch('shelf:save', { id, revision: 1, project: bad }))).toMatchObject({
      code: 'invalid-input',
      field: 'mounting.placed[0].position[1]',
    })
    expect(valueOf(await dispatch('shelf:open', { id })).revision).toBe(1)
  })

  it.each<[EndpointName, unknown, string]>([
    ['shelf:open', { id: 'not-an-id' }, 'id'],
    ['shelf:open', { id: UNKNOWN, more: 1 }, 'argument'],
    ['shelf:open', null, 'argument'],
    ['shelf:rename', { id: UNKNOWN, name: '   ' }, 'name'],
    ['shelf:save', { id: UNKNOWN, revision: 0.5, project: {} }, 'revision'],
    ['settings:set', { sheet: 'plaid', units: 'SI' }, 'sheet'],
    ['shelf:import', { text: '{"format":"something-else"}' }, 'format'],
    ['shelf:import', { text: 'no JSON' }, 'project'],
  ])('answers %s with %j by naming the field %s', async (endpoint, argument, field) => {
    expect(errorOf(await testApi().dispatch(endpoint, argument))).toMatchObject({
      code: 'invalid-input',
      field,
    })
  })

  it('tells a stale save from a missing project', async () => {
    const { dispatch } = testApi()
    const { id } = valueOf(await dispatch('shelf:create', { project: sampleProject() }))
    const save = (to: string, revision: number) =>
      dispatch('shelf:save', { id: to, revision, project: sampleProject() })
    expect(errorOf(await save(id, 5))).toMatchObject({ code: 'stale' })
    expect(errorOf(await save(UNKNOWN, 1))).toMatchObject({ code: 'not-found' })
  })

  it("turns the database's errors into plain words", async () => {
    const { dispatch, library, recorded } = testApi()
    const full = () => {
      throw Object.assign(new Error('database or disk is full'), { code: 'SQLITE_FULL' })
    }
    const broken = testApi({ library: { ...library, projects: { ...library.projects, list: full } } })
    expect(errorOf(await broken.dispatch('shelf:list', {}))).toEqual({
      code: 'storage',
      message: `The library ${library.file} cannot grow: the disk is full (database or disk is full).`,
    })
    expect(await dispatch('shelf:list', {})).toMatchObject({ ok: true })
    expect(recorded).toEqual([])
  })

  it('logs a bug with its place, and tells the reference and nothing else of it', async () => {
    const drawReport = () => Promise.reject(new Error('secret detail'))
    const { dispatch, recorded } = testApi({ drawReport })
    const error = errorOf(await dispatch('report:pdf', { project: sampleProject() }))
    expect(error?.code).toBe('internal')
    expect(error?.message).toContain('ref-1')
    expect(error?.message).not.toContain('secret')
    expect(recorded[0]).toMatch(/^report:pdf: Error: secret detail\n\s+at /)
  })

  it('keeps what the pages report in the same log', async () => {
    const { dispatch, recorded } = testApi()
    const reply = await dispatch('app:log', { message: 'cannot draw', stack: 'at chart.ts' })
    expect(valueOf(reply)).toEqual({ reference: 'ref-1' })
    expect(recorded).toEqual(['pages: cannot draw\nat chart.ts'])
  })
})

describe('names', () => {
  it('knows the endpoints of the contract and nothing that an object has anyway', () => {
    for (const endpoint of Object.keys(ARGUMENTS)) expect(isEndpoint(endpoint)).toBe(true)
    for (const name of ['', 'shelf', 'toString', '__proto__', 'constructor'])
      expect(isEndpoint(name)).toBe(false)
  })

  it('gives every endpoint a function of its own', () => {
    const names = Object.keys(ARGUMENTS).map((endpoint) => bridgeName(endpoint))
    expect(new Set(names).size).toBe(names.length)
    expect(bridgeName('shelf:list')).toBe('shelfList')
  })

  it.each([
    ['Kiln fan', 'Kiln fan'],
    ['../../etc/passwd', 'etc passwd'],
    ['Ümlaut №7', 'Ümlaut 7'],
    ['...', 'Stillbed report'],
    ['', 'Stillbed report'],
    ['CON\u0000|<>', 'CON Stillbed report'],
  ])('makes a file name of %j', (name, stem) => {
    expect(fileStem(name)).toBe(stem)
  })
})
