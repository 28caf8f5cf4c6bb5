import { spawnSync } from 'node:child_process'
import { join } from 'node:path'
import { browserProgram } from './browser.ts'
import { chooseRuntime } from './runtime.ts'

/** Before the tests that need them: pages and shell built, the browser unpacked; each once. */
export async function setup(): Promise<void> {
  const script = join(import.meta.dirname, '..', '..', 'electron', 'build.mjs')
  const built = spawnSync(process.execPath, [script], { encoding: 'utf8' })
  if (built.status !== 0) throw new Error(`the build failed:\n${built.stderr}`)
  await browserProgram()
  console.log(`runtime: ${chooseRuntime()}`)
}
