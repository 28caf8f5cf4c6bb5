/**
 * `npm start`: builds what is stale, then opens Stillbed in its desktop window or, where that
 * cannot be had, serves the same pages on 127.0.0.1. Says in one line which, and why.
 */
import { spawn } from 'node:child_process'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'
import {
  USAGE,
  decideHost,
  nodeIsRecentEnough,
  parseLaunchArguments,
  whyNoWindow,
} from './launch-decision.mjs'

const ROOT = dirname(dirname(fileURLToPath(import.meta.url)))
const RUNTIME_PACKAGE = join(ROOT, 'node_modules', 'electron')
/** Says that fetching the runtime was tried and failed, so that not every start waits for it. */
const ATTEMPT_FILE = join(ROOT, 'out', 'runtime-attempt')
const PROBE_LIMIT = 4_000
const FETCH_LIMIT = 300_000

const say = (line) => console.log(line)

function fail(code, message) {
  console.error(message)
  process.exit(code)
}

async function main() {
  if (!nodeIsRecentEnough(process.versions.node)) {
    fail(
      1,
      `Stillbed needs Node 22.12 or newer; this is ${process.versions.node}. \`npm start\` brings the right one: run that instead of calling this file.`,
    )
  }
  const options = readOptions()
  if (options.help) return say(USAGE)
  const { buildStale } = await import('./build.mjs')
  await buildStale({ say }).catch((error) => fail(1, `The build failed: ${error.message}`))

  const decision = await decide(options.host)
  if (decision.host === 'none') fail(3, `The desktop window cannot be had: ${decision.reason}.`)
  if (decision.host === 'browser') return serve(options, decision.reason)
  say('Stillbed opens in its desktop window.')
  const args = [ROOT, ...(options.library ? ['--library', options.library] : [])]
  const failure = await openWindow(decision.runtime, args)
  if (failure === null) return
  if (options.host === 'desktop') fail(3, `The desktop window could not be opened: ${failure}`)
  await serve(options, `the desktop window could not be opened (${failure})`)
}

function readOptions() {
  try {
    const options = parseLaunchArguments(process.argv.slice(2))
    return { ...options, library: options.library && resolve(options.library) }
  } catch (error) {
    return fail(2, `npm start: ${error.message}\n${USAGE}`)
  }
}

async function decide(wanted) {
  const uid = process.getuid?.() ?? null
  const noWindow = whyNoWindow({ platform: process.platform, env: process.env, uid })
  let runtime = findRuntime()
  if (runtime === null && wanted !== 'browser' && noWindow === null) {
    await fetchRuntime(wanted === 'desktop')
    runtime = findRuntime()
  }
  return decideHost({ wanted, noWindow, runtime })
}

/** Electron's own entry would start a download; its executable's place is looked up instead. */
function findRuntime() {
  const override = process.env.ELECTRON_OVERRIDE_DIST_PATH
  const pathFile = join(RUNTIME_PACKAGE, 'path.txt')
  const name = existsSync(pathFile) ? readFileSync(pathFile, 'utf8').trim() : null
  if (!override && name === null) return null
  const file = join(override ?? join(RUNTIME_PACKAGE, 'dist'), name ?? 'electron')
  return existsSync(file) ? file : null
}

/** Runs the installer of the electron package once, if the place it downloads from answers at all. */
async function fetchRuntime(again) {
  const installer = join(RUNTIME_PACKAGE, 'install.js')
  const { version } = JSON.parse(readFileSync(join(RUNTIME_PACKAGE, 'package.json'), 'utf8'))
  const triedBefore = existsSync(ATTEMPT_FILE) && readFileSync(ATTEMPT_FILE, 'utf8') === version
  if (process.env.npm_config_offline === 'true' || (triedBefore && !again)) return
  const mirror =
    process.env.npm_config_electron_mirror ?? process.env.ELECTRON_MIRROR ?? 'https://github.com/electron'
  const answers = await fetch(mirror, { method: 'HEAD', signal: AbortSignal.timeout(PROBE_LIMIT) }).catch(
    () => null,
  )
  if (answers !== null) {
    say("fetching Electron's runtime, about 110 MB, once ...")
    await new Promise((resolve) => {
      const child = spawn(process.execPath, [installer], { stdio: 'ignore', timeout: FETCH_LIMIT })
      child.once('error', resolve)
      child.once('exit', resolve)
    })
  }
  if (findRuntime() === null) writeFileSync(ATTEMPT_FILE, version)
}

async function serve(options, reason) {
  const { startLoopbackHost } = await import(pathToFileURL(join(ROOT, 'out', 'shell', 'loopback.js')).href)
  const host = await startLoopbackHost({ library: options.library, port: options.port }).catch((error) =>
    fail(1, portWords(error) ?? error.message),
  )
  process.stdout.on('error', () => {}) // the terminal may go away before the host does
  say(`Stillbed is served to your browser: ${reason}.`)
  say(`Address: ${host.address}`)
  say(`Library: ${host.libraryFile}`)
  say('Ctrl-C ends it.')
  endWithSignalsAndParent(host)
  if (options.open) await openBrowser(host.address)
}

function portWords(error) {
  if (error.code === 'EADDRINUSE') return `Port ${error.port} is taken; leave out --port for a free one.`
  if (error.code === 'EACCES' && error.syscall === 'listen')
    return `Port ${error.port} may not be used by this user.`
  return null
}

function endWithSignalsAndParent(host) {
  let ending = false
  const end = async () => {
    if (ending) process.exit(1)
    ending = true
    await host.stop()
    process.exit(0)
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, end)
  const parent = process.ppid
  setInterval(() => {
    if (process.ppid !== parent && !ending) end()
  }, 1000).unref()
}

/** Opens the default browser, where there is one; without one the printed address serves. */
async function openBrowser(address) {
  const { platform, env } = process
  if (platform === 'linux' && !env.DISPLAY && !env.WAYLAND_DISPLAY) return
  const [command, args] =
    platform === 'darwin'
      ? ['open', [address]]
      : platform === 'win32'
        ? ['rundll32', ['url.dll,FileProtocolHandler', address]]
        : ['xdg-open', [address]]
  const child = spawn(command, args, { stdio: 'ignore', detached: true })
  child.once('error', () => say('No browser could be opened: open the address yourself.'))
  child.unref()
}

await main()
