/**
 * JSON for values that JSON does not know: typed arrays travel as base64 of their bytes, and
 * numbers that are not finite are refused, since JSON would turn them into null without a word.
 */
const ARRAYS = { Uint8Array, Int32Array, Float32Array, Float64Array } as const
type ArrayName = keyof typeof ARRAYS
type TypedArray = InstanceType<(typeof ARRAYS)[ArrayName]>

interface Packed {
  readonly $bytes: ArrayName
  readonly base64: string
}

/** Part of ECMAScript's source text access proposal: a literal that stringify puts out as it stands. */
const { rawJSON } = JSON as { rawJSON?: (text: string) => unknown }
const NEGATIVE_ZERO = rawJSON?.('-0') ?? 0

/**
 * Every number comes back bit for bit, the sign of zero included.
 * @throws RangeError for NaN and infinities; TypeError for what cannot travel (functions, symbols, bigint)
 */
export function encode(value: unknown): string {
  return JSON.stringify(value, function (this: Record<string, unknown>, key: string, plain: unknown) {
    // JSON.stringify has called toJSON already; the holder still has the value itself
    const original = this[key]
    if (isTypedArray(original)) return pack(original, key)
    if (typeof plain === 'number') return finite(plain, key)
    if (typeof plain === 'function' || typeof plain === 'symbol' || typeof plain === 'bigint') {
      throw new TypeError(`"${key}" cannot be sent`)
    }
    return plain
  })
}

/**
 * @throws SyntaxError when `text` is not JSON or would reach an object's prototype,
 * TypeError when a packed array is malformed
 */
export function decode(text: string): unknown {
  return JSON.parse(text, (key, value: unknown) => {
    if (key === '__proto__') throw new SyntaxError('"__proto__" is not accepted as a name')
    return isPacked(value) ? unpack(value) : value
  })
}

function finite(value: number, key: string): unknown {
  if (!Number.isFinite(value)) throw new RangeError(`"${key}" is not a finite number`)
  return Object.is(value, -0) ? NEGATIVE_ZERO : value
}

function isTypedArray(value: unknown): value is TypedArray {
  return Object.values(ARRAYS).some((type) => value instanceof type)
}

function pack(array: TypedArray, key: string): Packed {
  if (!array.every(Number.isFinite)) throw new RangeError(`"${key}" holds a number that is not finite`)
  const name = (Object.keys(ARRAYS) as ArrayName[]).find((key) => array instanceof ARRAYS[key]) // keys of ARRAYS itself
  if (!name) throw new TypeError('a typed array of an unknown kind')
  const bytes = new Uint8Array(array.buffer, array.byteOffset, array.byteLength)
  let binary = ''
  // in slices: a call takes a limited number of arguments
  for (let start = 0; start < bytes.length; start += 8192) {
    binary += String.fromCharCode(...bytes.subarray(start, start + 8192))
  }
  return { $bytes: name, base64: btoa(binary) }
}

function isPacked(value: unknown): value is Packed {
  return typeof value === 'object' && value !== null && '$bytes' in value
}

function unpack(packed: Packed): TypedArray {
  const type = Object.hasOwn(ARRAYS, packed.$bytes) ? ARRAYS[packed.$bytes] : null
  if (!type || typeof packed.base64 !== 'string') throw new TypeError('a malformed typed array')
  const bytes = Uint8Array.from(binaryOf(packed.base64), (character) => character.charCodeAt(0))
  if (bytes.length % type.BYTES_PER_ELEMENT !== 0) throw new TypeError('a malformed typed array')
  return new type(bytes.buffer)
}

function binaryOf(base64: string): string {
  try {
    return atob(base64)
  } catch {
    throw new TypeError('a malformed typed array')
  }
}
