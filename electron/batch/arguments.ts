import { parseArgs } from 'node:util'

export const USAGE = `npm run -s evaluate -- PROJECT.json [options]     (-s keeps npm's own lines out of the output)
  PROJECT.json       a project file; - reads it from standard input
  --out FILE         write the results to FILE instead of standard output
  --report FILE.pdf  write the calculation report as well
  --schema           print the JSON Schema of a project file, and nothing else
  --help             this text

Exit code: 0 computed, 1 computed and a requirement fails, 2 bad input (the message names the
field), 3 the results could not be written or Stillbed itself failed.`

export interface BatchArguments {
  readonly task: 'evaluate' | 'schema' | 'help'
  /** `-` for standard input */
  readonly project: string
  /** empty: standard output */
  readonly out: string
  /** empty: no report */
  readonly report: string
}

/** @throws Error with words for a person */
export function readBatchArguments(args: readonly string[]): BatchArguments {
  const { values, positionals } = parseArgs({
    args: [...args],
    allowPositionals: true,
    options: {
      out: { type: 'string', default: '' },
      report: { type: 'string', default: '' },
      schema: { type: 'boolean', default: false },
      help: { type: 'boolean', default: false },
    },
  })
  const [project = '', ...more] = positionals
  const task = values.help ? 'help' : values.schema ? 'schema' : 'evaluate'
  if (task === 'evaluate' && project === '') throw new Error('which project file?')
  if (more.length > 0) throw new Error(`one project file at a time, not also ${more.join(' ')}`)
  return { task, project, out: values.out, report: values.report }
}
