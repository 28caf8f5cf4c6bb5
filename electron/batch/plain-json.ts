/**
 * Results as JSON that any program reads: typed arrays become plain ones.
 * @throws RangeError for a number that is not finite, which JSON would turn into null without a word
 */
export function plainJson(value: unknown): string {
  return JSON.stringify(value, (key, part: unknown) => {
    if (part instanceof Float64Array) return Array.from(part, (number) => finite(number, key))
    return typeof part === 'number' ? finite(part, key) : part
  })
}

function finite(value: number, key: string): number {
  if (!Number.isFinite(value)) throw new RangeError(`the result "${key}" is not a finite number`)
  return value
}
