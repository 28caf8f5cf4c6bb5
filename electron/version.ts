import { readFileSync } from 'node:fs'
import { join } from 'node:path'

/** Version of this program, from its package.json. */
export function appVersion(root: string): string {
  const manifest = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as { version: string } // ours
  return manifest.version
}
