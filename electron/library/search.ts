/**
 * What a person types, as an FTS5 query: every word must begin a word of the project. Each is
 * quoted, so that nothing in it is read as query syntax; words without a letter or digit have
 * nothing to be found by and are left out.
 * @returns null when there is nothing to search for
 * @example searchExpression('kiln "fa') // '"kiln"* "fa"*'
 */
export function searchExpression(typed: string): string | null {
  const words = typed.split(/[\s\0"]+/).filter((word) => /[\p{L}\p{N}]/u.test(word))
  return words.length === 0 ? null : words.map((word) => `"${word}"*`).join(' ')
}
