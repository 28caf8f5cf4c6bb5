/**
 * Builds the pages into out/pages and the shell's bundles into out/shell, each only when one of
 * its sources has changed since the last build. `npm run build -- --force` builds regardless.
 */
import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join, relative } from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'

const ROOT = dirname(dirname(fileURLToPath(import.meta.url)))
const OUT = join(ROOT, 'out')
const COMMON_SOURCES = ['core', 'electron', 'package-lock.json']

/** Left out of the bundles: native code, the runtime itself, and libraries that load their own files. */
const EXTERNAL = ['electron', 'better-sqlite3', 'pdfmake', 'electron-log']

/**
 * @typedef {{ name: string, sources: readonly string[], build: (folder: string) => Promise<void> }} Target
 * @type {readonly Target[]}
 */
const TARGETS = [
  { name: 'shell', sources: COMMON_SOURCES, build: buildShell },
  {
    name: 'pages',
    sources: [...COMMON_SOURCES, 'renderer', 'vite.config.ts', 'svelte.config.js'],
    build: buildPages,
  },
]

/** Names of the targets whose sources differ from those of their last build. */
export function staleTargets() {
  return TARGETS.filter((target) => readStamp(target) !== fingerprint(target)).map((target) => target.name)
}

/**
 * Builds what is stale. Two builds at the same time wait for each other.
 * @param {{ force?: boolean, say?: (line: string) => void }} options
 * @returns {Promise<readonly string[]>} names of what was built
 */
export async function buildStale({ force = false, say = console.log } = {}) {
  if (!force && staleTargets().length === 0) return []
  mkdirSync(OUT, { recursive: true })
  const unlock = await lock(join(OUT, 'building'))
  try {
    const built = []
    for (const target of TARGETS) {
      const stamp = fingerprint(target)
      if (!force && readStamp(target) === stamp) continue
      const started = performance.now()
      await buildOne(target, stamp)
      built.push(target.name)
      say(`built ${target.name} in ${((performance.now() - started) / 1000).toFixed(1)} s`)
    }
    return built
  } finally {
    unlock()
  }
}

// A caller's own setting, such as a test runner's, must not put the libraries' development half into the build.
process.env.NODE_ENV = 'production'

/** The old build stays in place until the new one is complete, since a host may be serving it. */
async function buildOne(target, stamp) {
  const folder = join(OUT, target.name)
  const next = `${folder}.next`
  const old = `${folder}.old`
  rmSync(next, { recursive: true, force: true })
  await target.build(next)
  rmSync(old, { recursive: true, force: true })
  if (existsSync(folder)) renameSync(folder, old)
  renameSync(next, folder)
  rmSync(old, { recursive: true, force: true })
  writeFileSync(stampFile(target), stamp)
}

async function buildPages(folder) {
  const { build } = await import('vite')
  await build({
    root: join(ROOT, 'renderer'),
    configFile: join(ROOT, 'vite.config.ts'),
    logLevel: 'warn',
    build: { outDir: folder, emptyOutDir: true },
  })
}

async function buildShell(folder) {
  const { ARGUMENTS } = await import(pathToFileURL(join(ROOT, 'electron/api/contract.ts')).href)
  await bundle(folder, 'es', {
    main: 'electron/main.ts',
    loopback: 'electron/loopback/host.ts',
    'report-worker': 'electron/api/report-worker.ts',
  })
  // The sandboxed preload gets the endpoints' names as data: the table itself would bring zod along.
  await bundle(
    folder,
    'cjs',
    { preload: 'electron/preload.ts' },
    { ENDPOINT_NAMES: JSON.stringify(Object.keys(ARGUMENTS)) },
  )
}

async function bundle(folder, format, entries, define = {}) {
  const { build } = await import('vite')
  const input = Object.fromEntries(Object.entries(entries).map(([name, path]) => [name, join(ROOT, path)]))
  const extension = format === 'cjs' ? 'cjs' : 'js'
  await build({
    root: ROOT,
    configFile: false,
    logLevel: 'warn',
    define,
    ssr: { noExternal: true, external: EXTERNAL },
    build: {
      ssr: true,
      target: 'node24',
      outDir: folder,
      emptyOutDir: false,
      minify: false,
      copyPublicDir: false,
      rolldownOptions: {
        input,
        external: [...EXTERNAL, ...EXTERNAL.map((name) => new RegExp(`^${name}/`))],
        output: {
          format,
          entryFileNames: `[name].${extension}`,
          chunkFileNames: `[name]-[hash].${extension}`,
        },
      },
    },
  })
}

function stampFile(target) {
  return join(OUT, `${target.name}.stamp`)
}

function readStamp(target) {
  if (!existsSync(join(OUT, target.name)) || !existsSync(stampFile(target))) return ''
  return readFileSync(stampFile(target), 'utf8')
}

/** Contents and not times: a fresh clone or a switched branch touches every file. */
function fingerprint(target) {
  const hash = createHash('sha256').update(process.versions.node.split('.')[0] ?? '')
  for (const source of target.sources) {
    for (const file of filesUnder(join(ROOT, source))) {
      hash.update(`${relative(ROOT, file)}\n`).update(readFileSync(file))
    }
  }
  return hash.digest('hex')
}

function filesUnder(path) {
  if (!existsSync(path)) return []
  try {
    return readdirSync(path, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) => join(entry.parentPath, entry.name))
      .sort()
  } catch (error) {
    if (error.code === 'ENOTDIR') return [path]
    throw error
  }
}

/** A folder is made by one process only; one left by a process that died is taken over. */
async function lock(folder) {
  const owner = join(folder, 'pid')
  for (;;) {
    try {
      mkdirSync(folder)
      writeFileSync(owner, String(process.pid))
      return () => rmSync(folder, { recursive: true, force: true })
    } catch (error) {
      if (error.code !== 'EEXIST') throw error
    }
    const pid = existsSync(owner) ? Number(readFileSync(owner, 'utf8')) : 0
    if (pid > 0 && !isAlive(pid)) rmSync(folder, { recursive: true, force: true })
    else await new Promise((resolve) => setTimeout(resolve, 200))
  }
}

function isAlive(pid) {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return error.code === 'EPERM'
  }
}

if (import.meta.main) {
  const unknown = process.argv.slice(2).filter((argument) => argument !== '--force')
  if (unknown.length > 0) {
    console.error(`npm run build: unknown option ${unknown[0]}; there is only --force`)
    process.exit(2)
  }
  const built = await buildStale({ force: process.argv.includes('--force') }).catch((error) => {
    console.error(error.message)
    process.exit(1)
  })
  if (built.length === 0) console.log('nothing to build: pages and shell are up to date')
}
