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

/** @throws RangeError for NaN and infinities; TypeError for what cannot travel (functions, symbols, bigint) */
export function encode(value: unknown): string {
  return JSON.stringify(value, function (this: Record<string, unknown>, key: string, plain: unknown) {
    // JSON.stringify has called toJSON already; the holder still has the value itself
    const original = this[key]
    if (typeof plain === 'number' && !Number.isFinite(plain)) {
      throw new RangeError(`"${key}" is not a finite number`)
    }
    if (typeof plain === 'function' || typeof plain === 'symbol' || typeof plain === 'bigint') {
      throw new TypeError(`"${key}" cannot be sent`)
    }
    return isTypedArray(original) ? pack(original) : plain
  })
}

/** @throws SyntaxError when `text` is not JSON, TypeError when a packed array is malformed */
export function decode(text: string): unknown {
  return JSON.parse(text, (_key, value: unknown) => (isPacked(value) ? unpack(value) : value))
}

function isTypedArray(value: unknown): value is TypedArray {
  return Object.values(ARRAYS).some((type) => value instanceof type)
}

function pack(array: TypedArray): Packed {
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
  const bytes = Uint8Array.from(atob(packed.base64), (character) => character.charCodeAt(0))
  if (bytes.length % type.BYTES_PER_ELEMENT !== 0) throw new TypeError('a malformed typed array')
  return new type(bytes.buffer)
}
