import { existsSync } from 'node:fs'
import { dirname, join } from 'node:path'

/** The folder that holds package.json, `out/pages` and `resources`: the same in the sources, the build and the package. */
export function appRoot(from: string = import.meta.dirname): string {
  for (let folder = from; ; folder = dirname(folder)) {
    if (existsSync(join(folder, 'package.json'))) return folder
    if (folder === dirname(folder)) throw new Error(`no package.json above ${from}`)
  }
}
