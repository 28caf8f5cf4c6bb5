import { resolve } from 'node:path'

export interface MainArguments {
  /** empty: the library in the user's data folder */
  readonly library: string
  /** a project file to bring in; empty: none */
  readonly file: string
}

/**
 * What the desktop was started with. Switches of the runtime itself and the app's own folder
 * are passed over.
 * @param folder relative paths start here
 */
export function readMainArguments(args: readonly string[], folder: string): MainArguments {
  const at = args.indexOf('--library')
  const library = at >= 0 ? (args[at + 1] ?? '') : ''
  const rest = at >= 0 ? args.toSpliced(at, 2) : args
  const file = rest.find((argument) => !argument.startsWith('-') && argument.endsWith('.json')) ?? ''
  return {
    library: library === '' ? '' : resolve(folder, library),
    file: file === '' ? '' : resolve(folder, file),
  }
}
