import { sha256 } from '@noble/hashes/sha2.js'
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js'

/**
 * JSON with one spelling for one value: keys sorted by UTF-16 code units, no blanks, numbers and
 * strings as ECMAScript writes them. Source: RFC 8785, JSON Canonicalization Scheme, section 3.2.
 * @throws Error for what JSON cannot hold (a number that is not finite, a function)
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value)
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new Error('a number that is not finite has no JSON')
    return JSON.stringify(value)
  }
  if (Array.isArray(value)) return `[${value.map((item) => canonicalJson(item)).join(',')}]`
  if (typeof value === 'object') {
    const members = Object.entries(value)
      .filter(([, member]) => member !== undefined)
      .toSorted(([a], [b]) => (a < b ? -1 : 1))
      .map(([key, member]) => `${JSON.stringify(key)}:${canonicalJson(member)}`)
    return `{${members.join(',')}}`
  }
  throw new Error(`a ${typeof value} has no JSON`)
}

/**
 * Fingerprint of the inputs: two projects share it only when every input is the same.
 * @returns SHA-256 (FIPS 180-4) of the canonical JSON, 64 hexadecimal digits
 */
export function inputChecksum(project: object): string {
  return bytesToHex(sha256(utf8ToBytes(canonicalJson(project))))
}
