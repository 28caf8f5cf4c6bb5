import { request as httpRequest, type IncomingHttpHeaders } from 'node:http'
import type { LoopbackRun } from '../../setup/loopback.ts'

export interface Answer {
  readonly status: number
  readonly headers: IncomingHttpHeaders
  readonly body: string
}

interface Wish {
  readonly method?: string
  /** sent as it stands: no client tidies it up */
  readonly path: string
  readonly headers?: Record<string, string | undefined>
  readonly body?: string
}

/** A request as an attacker may form it: any Host, any Origin, any path. */
export function request(
  host: LoopbackRun,
  { method = 'GET', path, headers = {}, body }: Wish,
): Promise<Answer> {
  const { hostname, port } = new URL(host.origin)
  const sent = Object.fromEntries(Object.entries(headers).filter(([, value]) => value !== undefined))
  return new Promise((resolve, reject) => {
    const outgoing = httpRequest(
      { hostname, port, method, path, headers: sent as Record<string, string> },
      (incoming) => {
        let text = ''
        incoming.setEncoding('utf8')
        incoming.on('data', (chunk: string) => (text += chunk))
        incoming.on('end', () =>
          resolve({ status: incoming.statusCode ?? 0, headers: incoming.headers, body: text }),
        )
      },
    )
    outgoing.on('error', reject)
    outgoing.end(body)
  })
}

/** A call as the pages make it; `headers` replace theirs, undefined leaves one out. */
export function call(
  host: LoopbackRun,
  endpoint: string,
  argument: unknown = null,
  headers: Wish['headers'] = {},
): Promise<Answer> {
  return request(host, {
    method: 'POST',
    path: `/api/${endpoint}`,
    headers: { 'content-type': 'application/json', 'x-stillbed-token': host.token, ...headers },
    body: typeof argument === 'string' ? argument : JSON.stringify(argument),
  })
}
