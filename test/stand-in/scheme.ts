import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'

type Handler = (request: Request) => Response | Promise<Response>

/**
 * Chromium cannot be taught a scheme from outside. `stillbed://app` is shown as
 * `http://app.localhost:<port>`, which counts as a secure origin too; every address that main sees
 * is translated back.
 */
export class Scheme {
  #name = ''
  #handler: Handler | null = null
  #port = 0

  get registered(): boolean {
    return this.#name !== ''
  }

  register(name: string): void {
    this.#name = name
  }

  handle(name: string, handler: Handler): void {
    if (name !== this.#name) throw new Error(`the scheme ${name} was not registered before the app was ready`)
    this.#handler = handler
  }

  async listen(): Promise<void> {
    const server = createServer((request, response) => {
      void this.#answer(request.method ?? 'GET', request.url ?? '/').then(async (answer) => {
        response.writeHead(answer.status, Object.fromEntries(answer.headers))
        response.end(new Uint8Array(await answer.arrayBuffer()))
      })
    })
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
    server.unref()
    this.#port = (server.address() as AddressInfo).port // listening on a port, not a pipe
  }

  /** what main says to what Chromium loads */
  toBrowser(address: string): string {
    return address.replace(new RegExp(`^${this.#name}://([^/]+)`), `http://$1.localhost:${this.#port}`)
  }

  toMain(address: string): string {
    return address.replace(new RegExp(`http://(\\w+)\\.localhost:${this.#port}`), `${this.#name}://$1`)
  }

  async #answer(method: string, path: string): Promise<Response> {
    if (!this.#handler) return new Response(null, { status: 404 })
    try {
      return await this.#handler(new Request(`${this.#name}://app${path}`, { method }))
    } catch (error) {
      return new Response(String(error), { status: 500 })
    }
  }
}
