import { readFileSync } from 'node:fs'

/** One number from outside the project, and the same number from the project. */
export interface Check {
  /** case and quantity, unique in its list */
  readonly id: string
  /** where the expected number comes from */
  readonly source: string
  readonly quantity: string
  readonly unit: string
  readonly expected: number
  /** largest difference that passes, in `unit` */
  readonly tolerance: number
  /** evaluate: through the door that users have; formula, network: a quantity that no project result is */
  readonly through: 'evaluate' | 'formula' | 'network'
  readonly ours: () => number
}

/** A case of the reference files; each group narrows `inputs` and `expected`. */
export interface ReferenceCase<Inputs, Expected> {
  readonly id: string
  readonly description: string
  readonly inputs: Inputs
  readonly expected: Expected
  readonly tolerance: { readonly rel: number; readonly [more: string]: number | string }
  readonly source: string
  readonly provenance: string
}

/** The cases of a reference file beside this one whose id begins with `prefix`. */
export function casesOf<Inputs, Expected>(
  file: string,
  prefix: string,
): readonly ReferenceCase<Inputs, Expected>[] {
  const text = readFileSync(new URL(file, import.meta.url), 'utf8')
  const { cases } = JSON.parse(text) as { cases: ReferenceCase<Inputs, Expected>[] } // the file's own format
  return cases.filter(({ id }) => id.startsWith(prefix))
}

/** Source and provenance in one line, as printed beside each check. */
export function sourceOf({ source, provenance }: ReferenceCase<unknown, unknown>): string {
  return `${source} [${provenance}]`
}

/** A value computed once, when first asked for. */
export function once<T>(compute: () => T): () => T {
  let kept: { readonly value: T } | null = null
  return () => {
    kept ??= { value: compute() }
    return kept.value
  }
}
