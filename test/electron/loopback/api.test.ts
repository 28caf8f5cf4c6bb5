import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { decode } from '../../../electron/api/codec.ts'
import { LARGEST_BODY } from '../../../electron/loopback/server.ts'
import { startLoopback, type LoopbackRun } from '../../setup/loopback.ts'
import { renamed, sampleProject } from '../projects.ts'
import { call, request } from './request.ts'

// Layer: the loopback host as `npm start -- --browser` runs it, built, on a real SQLite file.
let host: LoopbackRun
beforeAll(async () => {
  host = await startLoopback()
}, 90_000)
afterAll(() => host.remove())

const valueOf = (body: string) => (JSON.parse(body) as { ok: boolean; value: never }).value

describe('calls', () => {
  it('answer with the envelope of the contract', async () => {
    const { status, headers, body } = await call(host, 'app:info')
    expect(status).toBe(200)
    expect(headers['content-type']).toBe('application/json; charset=utf-8')
    expect(JSON.parse(body)).toEqual({
      ok: true,
      value: { version: '0.1.0', host: 'loopback', libraryFile: host.libraryFile },
    })
  })

  it('keep a project through a restart of the host', async () => {
    const { id } = valueOf((await call(host, 'shelf:create', { project: sampleProject() })).body) as {
      id: string
    }
    await call(host, 'shelf:save', { id, revision: 1, project: renamed(sampleProject(), 'kept') })
    host = await host.restart()
    const { body } = await call(host, 'shelf:open', { id })
    expect(valueOf(body)).toStrictEqual({ id, revision: 2, project: renamed(sampleProject(), 'kept') })
  })

  it('lose no answered save when the host is killed', async () => {
    const { id } = valueOf((await call(host, 'shelf:create', { project: sampleProject() })).body) as {
      id: string
    }
    await call(host, 'shelf:save', { id, revision: 1, project: renamed(sampleProject(), 'before the cut') })
    await host.kill()
    host = await startLoopback(host.libraryFile)
    const { body } = await call(host, 'shelf:open', { id })
    expect(valueOf(body)).toMatchObject({ revision: 2, project: { job: { name: 'before the cut' } } })
  })

  it('draw the report in a thread of its own and send its bytes', async () => {
    const { body } = await call(host, 'report:pdf', { project: sampleProject() })
    const reply = decode(body) as { value: { fileName: string; bytes: Uint8Array } }
    expect(reply.value.fileName).toBe('Sieve drive.pdf')
    expect(Buffer.from(reply.value.bytes.subarray(0, 5)).toString()).toBe('%PDF-')
  })

  it('answer an invalid project with its field, and with status 200', async () => {
    const text = JSON.stringify({ ...sampleProject(), units: 'furlongs' })
    const { status, body } = await call(host, 'shelf:import', { text })
    expect(status).toBe(200)
    expect(JSON.parse(body)).toMatchObject({ ok: false, error: { code: 'invalid-input', field: 'units' } })
  })
})

describe('refusals', () => {
  it.each([
    ['without the token', { 'x-stillbed-token': undefined }],
    ['with another token', { 'x-stillbed-token': 'x'.repeat(43) }],
    ['with an empty token', { 'x-stillbed-token': '' }],
    ['from another site', { origin: 'https://example.org' }],
    ['from a page without an origin of its own', { origin: 'null' }],
    ['from another port of this machine', { origin: 'http://127.0.0.1:1' }],
    ['under another host name', { host: 'rebound.example.org' }],
    ['as localhost', { host: 'localhost' }],
  ])('403 %s', async (_what, headers) => {
    const { status, body } = await call(host, 'shelf:list', {}, headers)
    expect(status).toBe(403)
    expect(body).not.toContain('Kiln')
    expect(JSON.parse(body)).toMatchObject({ ok: false, error: { code: 'not-found' } })
  })

  it("let the host's own pages through", async () => {
    expect((await call(host, 'shelf:list', {}, { origin: host.origin })).status).toBe(200)
  })

  it.each(['application/x-www-form-urlencoded', 'multipart/form-data; boundary=x', 'text/plain', undefined])(
    '415 for a body of type %s, which a form can send across sites',
    async (type) => {
      expect((await call(host, 'app:info', null, { 'content-type': type })).status).toBe(415)
    },
  )

  it.each(['GET', 'PUT', 'DELETE', 'OPTIONS'])('405 for %s', async (method) => {
    const headers = { 'x-stillbed-token': host.token }
    expect((await request(host, { method, path: '/api/app:info', headers })).status).toBe(405)
  })

  it.each(['shelf:steal', 'toString', '__proto__', 'shelf:list/..', ''])(
    '404 for the endpoint %j',
    async (name) => {
      expect((await call(host, name)).status).toBe(404)
    },
  )

  it('400 for an endpoint that cannot be decoded', async () => {
    expect((await call(host, '%E0%A4%A')).status).toBe(400)
  })

  it.each(['{', '{"query":NaN}', '{"__proto__":{"query":""}}', ''])('400 for the body %j', async (text) => {
    const { status, body } = await call(host, 'shelf:list', text)
    expect(status).toBe(400)
    expect(JSON.parse(body)).toMatchObject({ ok: false, error: { code: 'invalid-input' } })
  })

  it('413 for a body that says it is too long, before it is read', async () => {
    const headers = { 'content-length': String(LARGEST_BODY + 1), expect: '100-continue' }
    expect((await call(host, 'shelf:import', 'x', headers)).status).toBe(413)
  })

  it('413 for a body that is too long without saying so', async () => {
    const { origin, token } = host
    const piece = new Uint8Array(1 << 20).fill(0x20)
    let sent = 0
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += piece.length
        if (sent > LARGEST_BODY + 16 * piece.length) controller.close()
        else controller.enqueue(piece)
      },
    })
    const answer = await fetch(`${origin}/api/shelf:import`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'x-stillbed-token': token },
      body: endless,
      duplex: 'half',
    } as RequestInit).catch(() => null)
    // the host may hang up while the rest is still being sent
    if (answer) expect(answer.status).toBe(413)
    expect((await call(host, 'app:info')).status).toBe(200)
  })

  it('send no header that would let other sites read', async () => {
    const { headers } = await call(host, 'app:info', null, { origin: host.origin })
    expect(Object.keys(headers).filter((name) => name.startsWith('access-control'))).toEqual([])
  })
})
