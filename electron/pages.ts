import { readFile, realpath } from 'node:fs/promises'
import { extname, join, sep } from 'node:path'

/**
 * Everything that a page may load or do; both hosts send it with every answer. `connect-src` is
 * for the API of the loopback host, `blob:` pictures for charts that are copied or saved, and
 * inline style attributes for widgets that place themselves. There is no inline script, no eval
 * and nothing from outside.
 */
export const CONTENT_SECURITY_POLICY = [
  "default-src 'none'",
  "script-src 'self'",
  "style-src 'self'",
  "style-src-attr 'unsafe-inline'",
  "img-src 'self' data: blob:",
  "font-src 'self' data:",
  "connect-src 'self'",
  "worker-src 'self'",
  "manifest-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
].join('; ')

export const PAGE_HEADERS: Readonly<Record<string, string>> = {
  'content-security-policy': CONTENT_SECURITY_POLICY,
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'referrer-policy': 'no-referrer',
  'x-content-type-options': 'nosniff',
  'cache-control': 'no-cache',
}

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.woff2': 'font/woff2',
  '.woff': 'font/woff',
  '.wasm': 'application/wasm',
}

export interface Page {
  readonly body: Buffer<ArrayBuffer>
  readonly type: string
}

/**
 * A file of the built pages.
 * @param path path of the address, such as `/assets/index.js`; `/` is `index.html`
 * @returns null when there is none, or when the path leads out of `folder`
 */
export async function readPage(folder: string, path: string): Promise<Page | null> {
  const wanted = decodePath(path)
  if (wanted === null) return null
  try {
    const root = await realpath(folder)
    const file = await realpath(join(root, wanted === '/' ? 'index.html' : wanted))
    if (!file.startsWith(root + sep)) return null
    const type = TYPES[extname(file)]
    return type ? { body: await readFile(file), type } : null
  } catch (error) {
    if (isMissing(error)) return null
    throw error
  }
}

function decodePath(path: string): string | null {
  try {
    const decoded = decodeURIComponent(path)
    return /[\0\\]/.test(decoded) ? null : decoded
  } catch {
    return null
  }
}

function isMissing(error: unknown): boolean {
  if (typeof error !== 'object' || error === null || !('code' in error)) return false
  return ['ENOENT', 'ENOTDIR', 'EISDIR', 'ENAMETOOLONG'].includes(String(error.code))
}
