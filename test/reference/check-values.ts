/**
 * `npm run -s check-values`: every outside check with its source, the value expected, ours and the
 * difference. `--json` prints the same as data. Exit code 1 when one lies outside its tolerance.
 */
import { allChecks } from './all-checks.ts'
import type { Check } from './check-type.ts'

interface Line extends Omit<Check, 'ours'> {
  readonly group: string
  readonly ours: number
  readonly difference: number
  readonly holds: boolean
}

const lines: Line[] = []
for (const [group, checks] of await allChecks()) {
  for (const { ours: compute, ...check } of checks) {
    const ours = compute()
    const difference = ours - check.expected
    lines.push({ ...check, group, ours, difference, holds: Math.abs(difference) <= check.tolerance })
  }
}
const missed = lines.filter(({ holds }) => !holds).length

if (process.argv.includes('--json')) console.log(JSON.stringify(lines, null, 1))
else printTable()
process.exitCode = missed === 0 ? 0 : 1

function printTable(): void {
  let group = ''
  let source = ''
  for (const line of lines) {
    if (line.group !== group) console.log(`\n== ${(group = line.group)}`)
    if (line.source !== source) console.log(`source: ${(source = line.source)}`)
    const figures = [line.expected, line.ours, line.difference, line.tolerance].map(figure)
    const name = `${line.id} ${line.unit === '' ? '' : `[${line.unit}]`}`.trim()
    console.log(
      `  ${line.holds ? 'holds ' : 'MISSED'} ${figures.join(' ')}  ${line.through.padEnd(8)} ${name}`,
    )
  }
  const doors = Map.groupBy(lines, ({ through }) => through)
  const split = [...doors].map(([through, list]) => `${list.length} through ${through}`).join(', ')
  console.log('\ncolumns: expected, ours, difference, tolerance; then the door the value came through')
  console.log(`${lines.length - missed} of ${lines.length} checks hold (${split})`)
}

function figure(value: number): string {
  return (
    Math.abs(value) < 1e5 && Math.abs(value) >= 1e-3 ? value.toPrecision(9) : value.toExponential(4)
  ).padStart(14)
}
