/**
 * A runtime in place of Electron's, for machines where its binary cannot be had: Node runs the built
 * main, a real Chromium shows the pages, and an `electron` module of ours stands between them.
 * Playwright's `_electron.launch()` drives it as it drives Electron. What it cannot show: the binary
 * itself, the system's sandbox, native menus and dialogs, and other systems than this one.
 */
import inspector from 'node:inspector'
import { createRequire, registerHooks } from 'node:module'
import { readFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { pathToFileURL } from 'node:url'

/** A main that has not been evaluated by then waits for a readiness that can only come afterwards [ms]. */
const EVALUATION_LIMIT = Number(process.env['STAND_IN_PATIENCE'] ?? 10_000)

const here = (file: string) => pathToFileURL(join(import.meta.dirname, file)).href
registerHooks({
  resolve(specifier, context, next) {
    if (specifier !== 'electron') return next(specifier, context)
    return context.conditions?.includes('require')
      ? { url: here('electron.cjs'), format: 'commonjs', shortCircuit: true }
      : { url: here('electron.ts'), format: 'module-typescript', shortCircuit: true }
  },
})

const given = process.argv.slice(2)
const runtime = await import('./electron.ts')
Object.defineProperty(globalThis, Symbol.for('stand-in electron'), { value: runtime })
if (given.includes('--inspect=0')) inspector.open(0)
const debugging = await runtime.startBrowser()

// as Electron has it: the executable, then everything it was given, its own switches included
process.argv = [process.argv[0] ?? '', ...given]
const preloaded = valueAfter('-r')
if (preloaded) createRequire(import.meta.url)(preloaded)
// Playwright connects at this line, and counts on its loader being there by then
process.stderr.write(`${debugging}\n`)

const own = given.slice(given.indexOf('--remote-debugging-port=0') + 1)
const folder = resolve(own.find((argument) => !argument.startsWith('-')) ?? '.')
const manifest = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8')) as {
  main: string
  version: string
}
runtime.app.setManifest(folder, manifest.version)

// a test run that is broken off leaves nothing behind
const parent = process.ppid
setInterval(() => {
  if (process.ppid !== parent) runtime.app.exit(1)
}, 1000).unref()

const limit = setTimeout(() => {
  process.stderr.write('main waits at its top level: Electron would never become ready\n')
  runtime.app.exit(1)
}, EVALUATION_LIMIT)
await import(pathToFileURL(join(folder, manifest.main)).href)
clearTimeout(limit)
runtime.app.becomeReady()

function valueAfter(option: string): string | null {
  const at = given.indexOf(option)
  return at < 0 ? null : (given[at + 1] ?? null)
}
