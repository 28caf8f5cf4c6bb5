/**
 * The batch door: a project file in, its complete results out, by the same `evaluate` that the
 * pages call. `npm run -s evaluate -- PROJECT.json`; exit codes stand in `USAGE`.
 */
import { readFileSync, writeFileSync, writeSync } from 'node:fs'
import { z } from 'zod'
import { InputError } from '../../core/errors.ts'
import { evaluate } from '../../core/evaluate.ts'
import { projectSchema, type Project } from '../../core/project/project.ts'
import { readProjectText } from '../../core/project/read.ts'
import type { Evaluation, Verdict } from '../../core/results.ts'
import type { UnitSystem } from '../../core/units/dimensions.ts'
import { formatQuantity } from '../../core/units/format.ts'
import { USAGE, readBatchArguments, type BatchArguments } from './arguments.ts'
import { blockingProblems } from './blocking.ts'
import { plainJson } from './plain-json.ts'

const EXIT = { computed: 0, requirementFails: 1, badInput: 2, failed: 3 } as const
const STANDARD_INPUT = 0

/** What ends the run with words for a person. */
class Refusal extends Error {
  readonly exitCode: number

  constructor(exitCode: number, message: string) {
    super(message)
    this.exitCode = exitCode
  }
}

async function main(): Promise<number> {
  const args = readArguments()
  if (args.task === 'help') return print(USAGE, '')
  if (args.task === 'schema') {
    return print(JSON.stringify(z.toJSONSchema(projectSchema, { io: 'input' }), null, 2), args.out)
  }
  const project = readInput(args.project)
  const evaluation = evaluate(project)
  refuseIncomplete(project, evaluation)
  print(plainJson(evaluation), args.out)
  if (args.report !== '') await writeReport(project, args.report)
  return judge(evaluation, project.units)
}

function readArguments(): BatchArguments {
  try {
    return readBatchArguments(process.argv.slice(2))
  } catch (error) {
    throw new Refusal(EXIT.badInput, `evaluate: ${messageOf(error)}\n${USAGE}`)
  }
}

function readInput(file: string): Project {
  let text: string
  try {
    text = readFileSync(file === '-' ? STANDARD_INPUT : file, 'utf8')
  } catch (error) {
    throw new Refusal(EXIT.badInput, `${file} cannot be read: ${messageOf(error)}`)
  }
  try {
    return readProjectText(text)
  } catch (error) {
    if (error instanceof InputError) throw new Refusal(EXIT.badInput, error.message)
    throw error
  }
}

function refuseIncomplete(project: Project, evaluation: Evaluation): void {
  const blocking = blockingProblems(project, evaluation)
  if (blocking.length === 0) return
  throw new Refusal(EXIT.badInput, blocking.map(({ field, message }) => `${field}: ${message}`).join('\n'))
}

/** Says on standard error what a reader of the exit code alone would miss. */
function judge({ verdicts, problems }: Evaluation, units: UnitSystem): number {
  const say = (line: string) => process.stderr.write(`${line}\n`)
  for (const { field, message, kind } of problems)
    if (kind === 'caution') say(`caution: ${field}: ${message}`)
  for (const verdict of verdicts) {
    if (verdict.status === 'fail') say(`fails: ${verdict.title}: ${figures(verdict, units)}`)
    if (verdict.status === 'unknown') say(`not known: ${verdict.title}: ${verdict.advice}`)
  }
  return verdicts.some(({ status }) => status === 'fail') ? EXIT.requirementFails : EXIT.computed
}

function figures({ value, limit, dimension }: Verdict, units: UnitSystem): string {
  return `${formatQuantity(value, dimension, units)}, limit ${formatQuantity(limit, dimension, units)}`
}

function print(text: string, out: string): number {
  try {
    if (out === '') writeAll(`${text}\n`)
    else writeFileSync(out, `${text}\n`)
    return EXIT.computed
  } catch (error) {
    throw new Refusal(EXIT.failed, `${out || 'the results'} cannot be written: ${messageOf(error)}`)
  }
}

/** Synchronously, since a pipe may take less than the whole at a time and the process ends soon. */
function writeAll(text: string): void {
  const bytes = Buffer.from(text)
  for (let at = 0; at < bytes.length;) {
    try {
      at += writeSync(1, bytes, at)
    } catch (error) {
      const { code } = error as NodeJS.ErrnoException // writeSync throws system errors
      if (code === 'EPIPE') return // the reader has seen enough, as `head` does
      if (code !== 'EAGAIN') throw error
    }
  }
}

async function writeReport(project: Project, file: string): Promise<void> {
  const { drawReport } = await import('../report/draw-report.ts')
  const bytes = await drawReport(project)
  try {
    writeFileSync(file, bytes)
  } catch (error) {
    throw new Refusal(EXIT.failed, `${file} cannot be written: ${messageOf(error)}`)
  }
}

function messageOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error)
}

try {
  process.exitCode = await main()
} catch (error) {
  const words =
    error instanceof Refusal
      ? error.message
      : `Stillbed failed: ${error instanceof Error ? error.stack : String(error)}`
  process.stderr.write(`${words}\n`)
  process.exitCode = error instanceof Refusal ? error.exitCode : EXIT.failed
}
