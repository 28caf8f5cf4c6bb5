import { readdirSync } from 'node:fs'
import type { Check } from './check-type.ts'

const FOLDER = new URL('./checks/', import.meta.url)

/** Every check that a file of `checks/` exports, once each, by file. */
export async function allChecks(): Promise<ReadonlyMap<string, readonly Check[]>> {
  const groups = new Map<string, readonly Check[]>()
  const seen = new Set<Check>()
  for (const file of readdirSync(FOLDER).toSorted()) {
    // the list may hold files of helpers too: what is no array of checks is passed over below
    const exported = (await import(new URL(file, FOLDER).href)) as Record<string, unknown>
    const fresh = Object.values(exported)
      .filter((value) => Array.isArray(value))
      .flat()
      .filter((value): value is Check => isCheck(value) && !seen.has(value))
    for (const check of fresh) seen.add(check)
    if (fresh.length > 0) groups.set(file.replace('.ts', ''), fresh)
  }
  return groups
}

function isCheck(value: unknown): value is Check {
  return (
    typeof value === 'object' &&
    value !== null &&
    'expected' in value &&
    'tolerance' in value &&
    'ours' in value
  )
}
