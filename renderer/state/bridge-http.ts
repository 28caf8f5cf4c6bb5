import type { EndpointName, Reply, Value } from '../../electron/api/contract.ts'
import { decode, encode } from '../../electron/api/codec.ts'

const TOKEN_KEY = 'stillbed-token'
/** Browsers refuse a longer body in a request that may outlive its page [characters]. */
const KEEPALIVE_LIMIT = 60_000

let token = ''

/** Takes the run's token out of the address (once) or, after a reload, out of the session. */
export function readToken(): void {
  const given = /(?:^#|&)token=([^&]+)/.exec(location.hash)?.[1]
  if (given !== undefined) {
    token = given
    sessionStorage.setItem(TOKEN_KEY, given)
    history.replaceState(null, '', location.pathname + location.search)
  } else {
    token = sessionStorage.getItem(TOKEN_KEY) ?? ''
  }
}

/** The same call over the loopback host's HTTP. @throws when the host cannot be reached */
export async function httpInvoke<E extends EndpointName>(
  endpoint: E,
  argument: unknown,
): Promise<Reply<Value<E>>> {
  const body = encode(argument)
  try {
    const response = await fetch(`/api/${endpoint}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'x-stillbed-token': token },
      body,
      // a save outlives the page: it may be the last thing that the page does
      keepalive: endpoint === 'shelf:save' && body.length < KEEPALIVE_LIMIT,
    })
    return decode(await response.text()) as Reply<Value<E>> // the host answers by the shared contract
  } catch {
    const message = 'Stillbed is not answering: its window or terminal may have been closed.'
    return { ok: false, error: { code: 'storage', message } }
  }
}
