import { spawn, type ChildProcess } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

const ROOT = join(import.meta.dirname, '..', '..')
/** A loaded machine with two cores starts the host in one to two seconds; beyond this it hangs [ms]. */
const START_LIMIT = 60_000

export interface LoopbackRun {
  /** what `npm start` printed: address with token */
  readonly address: string
  readonly origin: string
  readonly token: string
  readonly libraryFile: string
  /** everything printed so far */
  output(): string
  /** Ctrl-C. @returns the exit code */
  stop(): Promise<number | null>
  /** as a power cut would: nothing of the host runs any more */
  kill(): Promise<void>
  /** the same library again, on a new port */
  restart(): Promise<LoopbackRun>
  /** stops and removes the library's folder */
  remove(): Promise<void>
}

/**
 * The loopback host as `npm start -- --browser --no-open` starts it, on a new temporary library
 * (with the demo projects) or on the given one.
 */
export async function startLoopback(libraryFile?: string): Promise<LoopbackRun> {
  const folder = libraryFile ? null : mkdtempSync(join(tmpdir(), 'stillbed-test-'))
  const file = libraryFile ?? join(folder ?? '', 'library.sqlite')
  const args = [join(ROOT, 'electron', 'launch.mjs'), '--browser', '--no-open', '--library', file]
  const child = spawn(process.execPath, args, { cwd: ROOT, stdio: ['ignore', 'pipe', 'pipe'] })
  let output = ''
  const ended = new Promise<number | null>((resolve) => child.once('close', resolve))
  const address = await new Promise<string>((resolve, reject) => {
    const limit = setTimeout(() => reject(new Error(`no address was printed:\n${output}`)), START_LIMIT)
    const take = (chunk: Buffer) => {
      output += String(chunk)
      const found = /^Address: (\S+)$/m.exec(output)?.[1]
      if (!found) return
      clearTimeout(limit)
      resolve(found)
    }
    child.stdout.on('data', take)
    child.stderr.on('data', take)
    void ended.then((code) => {
      clearTimeout(limit)
      reject(new Error(`the loopback host ended with ${code}:\n${output}`))
    })
  })
  const { origin, hash } = new URL(address)
  const stop = () => end(child, 'SIGINT', ended)
  return {
    address,
    origin,
    token: hash.replace('#token=', ''),
    libraryFile: file,
    output: () => output,
    stop,
    kill: async () => void (await end(child, 'SIGKILL', ended)),
    restart: async () => {
      await stop()
      return startLoopback(file)
    },
    remove: async () => {
      await stop()
      rmSync(join(file, '..'), { recursive: true, force: true })
    },
  }
}

async function end(child: ChildProcess, signal: NodeJS.Signals, ended: Promise<number | null>) {
  if (child.exitCode === null && child.signalCode === null) child.kill(signal)
  return ended
}
