import { existsSync, readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { z } from 'zod'
import { mountTypeSchema } from '../../core/project/mounts.ts'
import { readProjectText } from '../../core/project/read.ts'
import type { Library } from './library.ts'

/**
 * Fills a new library once with the demo projects (`resources/demo/*.json`, project files) and the
 * demo catalogue (`resources/catalogue/*.json`, arrays of mount types). What the user removes
 * afterwards stays removed.
 * @param warn told of a file that cannot be used; the others are still taken
 */
export function fillOnFirstStart(library: Library, resources: string, warn: (message: string) => void): void {
  if (library.settings.read('filled') === true) return
  const read = <T>(folder: string, parse: (text: string) => T): T[] =>
    jsonFiles(join(resources, folder)).flatMap((file) => {
      try {
        return [parse(readFileSync(file, 'utf8'))]
      } catch (error) {
        warn(`${file} was left out: ${error instanceof Error ? error.message : String(error)}`)
        return []
      }
    })
  const projects = read('demo', readProjectText)
  const types = read('catalogue', (text) => z.array(mountTypeSchema).parse(JSON.parse(text)))
  library.inTransaction(() => {
    // the last one made stands first on the Shelf
    for (const project of projects.toReversed()) library.projects.create(project)
    library.catalogue.addMany(types.flat())
    library.settings.write('filled', true)
  })
}

function jsonFiles(folder: string): string[] {
  if (!existsSync(folder)) return []
  return readdirSync(folder)
    .filter((name) => name.endsWith('.json'))
    .sort()
    .map((name) => join(folder, name))
}
