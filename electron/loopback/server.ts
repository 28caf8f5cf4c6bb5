/**
 * The pages and the API on 127.0.0.1, for a machine without Electron's runtime or a display.
 *
 * HOW A PAGE CALLS. The address that is opened is `http://127.0.0.1:<port>/#token=<token>`; the
 * page reads the token from `location.hash` once, keeps it in sessionStorage (a reload finds it
 * there) and takes it out of the address with `history.replaceState`. Then for each endpoint of
 * the contract:
 *
 *     POST /api/<endpoint>            for example POST /api/shelf:list
 *     content-type: application/json
 *     x-stillbed-token: <token>
 *     body: the argument as JSON      (`null` where the endpoint takes none)
 *
 * The answer is always JSON, `{"ok":true,"value":...}` or `{"ok":false,"error":{code,message,field?}}`,
 * with status 200 for both; other statuses mean that the call did not reach the API (403 wrong
 * token, Host or Origin; 404 no such endpoint; 413 too long; 415 wrong content type) and carry
 * the same error envelope. Typed arrays travel as `{"$bytes":"Uint8Array","base64":"..."}`:
 * decode the text with `decode` of `electron/api/codec.ts`. A save while the page is being
 * closed may use `fetch(..., { keepalive: true })`.
 */
import { createHash, timingSafeEqual } from 'node:crypto'
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http'
import { decode, encode } from '../api/codec.ts'
import type { ApiError } from '../api/contract.ts'
import { isEndpoint, type Dispatch } from '../api/dispatch.ts'
import { PAGE_HEADERS, readPage } from '../pages.ts'

/** The largest body that any endpoint takes: an imported file of 20 MB, escaped, and its envelope [bytes]. */
export const LARGEST_BODY = 48 * 1024 * 1024
const LOOPBACK = '127.0.0.1'

export interface LoopbackServer {
  /** `http://127.0.0.1:<port>`, without the token */
  readonly origin: string
  /** ends when the calls under way have been answered */
  close(): Promise<void>
}

export interface LoopbackOptions {
  readonly dispatch: Dispatch
  /** folder of the built pages */
  readonly pages: string
  readonly token: string
  /** 0: any free port */
  readonly port: number
}

/** A refusal before the API is reached. */
class Refusal extends Error {
  readonly status: number
  readonly code: ApiError['code']

  constructor(status: number, code: ApiError['code'], message: string) {
    super(message)
    this.status = status
    this.code = code
  }
}

/** @throws the system's error when the port cannot be had */
export async function startLoopbackServer(options: LoopbackOptions): Promise<LoopbackServer> {
  let origin = ''
  const server = createServer({ requestTimeout: 60_000, headersTimeout: 10_000 }, (request, response) => {
    answer(request, response, options, origin).catch((error: unknown) => refuse(response, error))
  })
  await listen(server, options.port)
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('the server has no port')
  origin = `http://${LOOPBACK}:${address.port}`
  return { origin, close: () => close(server) }
}

async function answer(
  request: IncomingMessage,
  response: ServerResponse,
  options: LoopbackOptions,
  origin: string,
): Promise<void> {
  assertLocal(request, origin)
  const { pathname } = new URL(request.url ?? '/', origin)
  if (pathname.startsWith('/api/')) return call(request, response, options, origin, pathname.slice(5))
  if (request.method !== 'GET' && request.method !== 'HEAD') {
    throw new Refusal(405, 'not-found', 'Pages are only read.')
  }
  // the raw path: URL has already resolved "..", and a path that needed it is not one of ours
  const page = await readPage(options.pages, (request.url ?? '/').replace(/[?#].*$/s, ''))
  if (!page) throw new Refusal(404, 'not-found', 'There is no such page.')
  response.writeHead(200, { ...PAGE_HEADERS, 'content-type': page.type, 'content-length': page.body.length })
  response.end(request.method === 'HEAD' ? undefined : page.body)
}

/** A page of another site that had its name pointed at 127.0.0.1 still sends its own name as Host. */
function assertLocal(request: IncomingMessage, origin: string): void {
  if (request.headers.host !== origin.slice('http://'.length)) {
    throw new Refusal(403, 'not-found', 'This address answers under its own name only.')
  }
}

async function call(
  request: IncomingMessage,
  response: ServerResponse,
  { dispatch, token }: LoopbackOptions,
  origin: string,
  name: string,
): Promise<void> {
  if (request.method !== 'POST') throw new Refusal(405, 'not-found', 'The API takes POST only.')
  const from = request.headers.origin
  if (from !== undefined && from !== origin) {
    throw new Refusal(403, 'not-found', 'Calls from other sites are refused.')
  }
  if (!sameToken(request.headers['x-stillbed-token'], token)) {
    throw new Refusal(
      403,
      'not-found',
      'The token is missing or wrong: open the address that npm start printed.',
    )
  }
  if (!/^application\/json\s*(;|$)/i.test(request.headers['content-type'] ?? '')) {
    throw new Refusal(415, 'invalid-input', 'The body must be application/json.')
  }
  const endpoint = decodeURIComponent(name)
  if (!isEndpoint(endpoint)) throw new Refusal(404, 'not-found', 'There is no such endpoint.')
  const argument = parseBody(await readBody(request))
  sendJson(response, 200, encode(await dispatch(endpoint, argument)))
}

/** Compares digests, so that neither length nor a common beginning shows in the time taken. */
function sameToken(given: string | string[] | undefined, token: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text).digest()
  return typeof given === 'string' && timingSafeEqual(digest(given), digest(token))
}

async function readBody(request: IncomingMessage): Promise<string> {
  const tooLong = () => new Refusal(413, 'invalid-input', 'This is longer than Stillbed takes.')
  if (Number(request.headers['content-length'] ?? 0) > LARGEST_BODY) throw tooLong()
  const chunks: Buffer[] = []
  let length = 0
  for await (const chunk of request) {
    const bytes = chunk as Buffer // no encoding is set on the request
    length += bytes.length
    if (length > LARGEST_BODY) throw tooLong()
    chunks.push(bytes)
  }
  return Buffer.concat(chunks).toString('utf8')
}

function parseBody(text: string): unknown {
  try {
    return decode(text)
  } catch (error) {
    const because = error instanceof Error ? error.message : 'unreadable'
    throw new Refusal(400, 'invalid-input', `The body cannot be read: ${because}`)
  }
}

function sendJson(response: ServerResponse, status: number, body: string): void {
  response.writeHead(status, { ...PAGE_HEADERS, 'content-type': 'application/json; charset=utf-8' })
  response.end(body)
}

function refuse(response: ServerResponse, error: unknown): void {
  if (response.headersSent) {
    response.destroy()
    return
  }
  const refusal =
    error instanceof Refusal ? error : new Refusal(400, 'invalid-input', 'The request cannot be read.')
  // a body that is not wanted is not waited for
  response.shouldKeepAlive = false
  sendJson(
    response,
    refusal.status,
    encode({ ok: false, error: { code: refusal.code, message: refusal.message } }),
  )
}

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, LOOPBACK, () => {
      server.off('error', reject)
      resolve()
    })
  })
}

function close(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve())
    server.closeIdleConnections()
  })
}
