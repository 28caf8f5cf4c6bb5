import { fork, type ChildProcess } from 'node:child_process'
import { EventEmitter } from 'node:events'
import { join } from 'node:path'

/** A process of its own with a `parentPort`, as Electron's utility process has it. */
class UtilityProcess extends EventEmitter {
  readonly #child: ChildProcess

  constructor(module: string, args: readonly string[]) {
    super()
    const port = join(import.meta.dirname, 'parent-port.ts')
    this.#child = fork(module, args, { serialization: 'advanced', execArgv: ['--import', port] })
    this.#child.on('message', (message) => this.emit('message', message))
    this.#child.on('spawn', () => this.emit('spawn'))
    this.#child.on('exit', (code) => this.emit('exit', code))
  }

  get pid(): number | undefined {
    return this.#child.pid
  }
  postMessage = (message: object): void => void this.#child.send(message)
  kill = (): boolean => this.#child.kill()
}

export const utilityProcess = {
  fork: (module: string, args: readonly string[] = []) => new UtilityProcess(module, args),
}
