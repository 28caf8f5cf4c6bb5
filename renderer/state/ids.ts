/**
 * An identifier that the list does not have yet, short enough to be read in a project file.
 * @example newId('m', [{ id: 'm1' }, { id: 'm3' }]) // 'm2'
 */
export function newId(prefix: string, list: readonly { readonly id: string }[]): string {
  const taken = new Set(list.map((item) => item.id))
  let number = 1
  while (taken.has(`${prefix}${number}`)) number += 1
  return `${prefix}${number}`
}

/** A name such as "M7" that no item of the list has yet. */
export function newName(prefix: string, list: readonly { readonly name: string }[]): string {
  const taken = new Set(list.map((item) => item.name))
  let number = 1
  while (taken.has(`${prefix}${number}`)) number += 1
  return `${prefix}${number}`
}
