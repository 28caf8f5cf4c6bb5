/** Which host `npm start` uses, decided from facts alone; `launch.mjs` gathers them and acts. */

export const USAGE = `npm start [-- options]
  --browser       serve the pages on 127.0.0.1 and open them in a browser
  --desktop       the desktop window or nothing: exits with 3 when it cannot be had
  --library FILE  use this library instead of the one in your data folder
  --port N        port for --browser; otherwise any free one
  --no-open       print the address without opening a browser
  --help          this text`

/**
 * @param {readonly string[]} args
 * @returns {import('./launch-decision.d.mts').LaunchOptions}
 * @throws {Error} with words for a person
 */
export function parseLaunchArguments(args) {
  const options = { host: 'any', library: '', port: 0, open: true, help: false }
  for (let index = 0; index < args.length; index += 1) {
    const argument = args[index]
    if (argument === '--browser' || argument === '--desktop') {
      const host = argument.slice(2)
      if (options.host !== 'any' && options.host !== host)
        throw new Error('--browser and --desktop exclude each other')
      options.host = host
    } else if (argument === '--no-open') options.open = false
    else if (argument === '--help') options.help = true
    else if (argument === '--library') options.library = valueOf(args, ++index, '--library', 'a file')
    else if (argument === '--port') options.port = portOf(valueOf(args, ++index, '--port', 'a number'))
    else throw new Error(`unknown option ${argument}`)
  }
  return options
}

function valueOf(args, index, option, what) {
  const value = args[index]
  if (value === undefined || value === '' || value.startsWith('--'))
    throw new Error(`${option} needs ${what}`)
  return value
}

function portOf(text) {
  const port = Number(text)
  if (!/^\d+$/.test(text) || port < 1 || port > 65535) throw new Error(`--port takes 1 to 65535, not ${text}`)
  return port
}

/** @param {string} version such as `22.12.0` @returns {boolean} */
export function nodeIsRecentEnough(version) {
  const [major = 0, minor = 0] = version.split('.').map(Number)
  return major > 22 || (major === 22 && minor >= 12)
}

/**
 * Why no window can be shown here; null when one can.
 * @param {{ platform: string, env: Record<string, string | undefined>, uid: number | null }} machine
 * @returns {string | null}
 */
export function whyNoWindow({ platform, env, uid }) {
  if (platform !== 'linux') return null
  if (!env.DISPLAY && !env.WAYLAND_DISPLAY) return 'there is no display'
  if (uid === 0) return "the desktop window's sandbox does not run as root"
  return null
}

/**
 * @param {import('./launch-decision.d.mts').Facts} facts
 * @returns {import('./launch-decision.d.mts').Decision}
 */
export function decideHost({ wanted, noWindow, runtime }) {
  if (wanted === 'browser') return { host: 'browser', reason: 'as asked by --browser' }
  const obstacle =
    noWindow ?? (runtime === null ? "Electron's runtime is not installed and could not be fetched" : null)
  if (obstacle === null) return { host: 'desktop', runtime, reason: '' }
  return wanted === 'desktop' ? { host: 'none', reason: obstacle } : { host: 'browser', reason: obstacle }
}
