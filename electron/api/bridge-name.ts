/** `shelf:list` is `shelfList` on the object that the preload script exposes to the pages. */
export type BridgeName<E extends string> = E extends `${infer Area}:${infer Verb}`
  ? `${Area}${Capitalize<Verb>}`
  : E

/** @param endpoint name from the contract, such as `shelf:list` */
export function bridgeName<E extends string>(endpoint: E): BridgeName<E> {
  const name = endpoint.replace(/:(.)/, (_, first: string) => first.toUpperCase())
  return name as BridgeName<E> // the same rule as the type, which a template cannot prove
}
