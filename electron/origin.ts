/** Which addresses are ours; the sole place that decides it. */
export const SCHEME = 'stillbed'
const HOST = 'app'
export const START_PAGE = `${SCHEME}://${HOST}/index.html`

/** Where the methods' sources can be looked up; nothing else is opened outside. */
const EXTERNAL_HOSTS: readonly string[] = ['doi.org', 'www.iso.org', 'www.iec.ch']

/** An address within our own pages. */
export function isOwnAddress(address: string): boolean {
  const url = parse(address)
  return url !== null && url.protocol === `${SCHEME}:` && url.host === HOST
}

/** What the pages may load: their own files, and data that they have made themselves. */
export function isOwnRequest(address: string): boolean {
  const url = parse(address)
  if (url === null) return false
  if (url.protocol === 'blob:') return isOwnAddress(url.pathname)
  return isOwnAddress(address) || ['data:', 'devtools:', 'chrome-devtools:'].includes(url.protocol)
}

export function isExternalLink(address: string): boolean {
  const url = parse(address)
  return url !== null && url.protocol === 'https:' && url.port === '' && EXTERNAL_HOSTS.includes(url.hostname)
}

/** The sender of a message, as much of it as decides. */
export interface Sender {
  readonly senderFrame: { readonly url: string; readonly parent: unknown } | null
  readonly sender: unknown
}

/**
 * Only the main frame of our own window, standing at our own pages, is listened to. A frame that
 * has gone by the time its message arrives is null, and refused.
 * @param ours the window's contents; null when it has closed
 */
export function isTrustedSender(event: Sender, ours: unknown): boolean {
  const frame = event.senderFrame
  if (frame === null || ours === null || event.sender !== ours) return false
  return frame.parent === null && isOwnAddress(frame.url)
}

function parse(address: string): URL | null {
  return URL.canParse(address) ? new URL(address) : null
}
