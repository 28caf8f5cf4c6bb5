import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { readProjectText } from '../../../core/project/read.ts'
import { formatQuantity } from '../../../core/units/format.ts'

const README = readFileSync(join(import.meta.dirname, '../../../README.md'), 'utf8')

it('evaluates the project file of the README to the figures that stand there', () => {
  const text = /```json\n([\s\S]*?)```/.exec(README)?.[1] ?? ''
  const { verdicts, problems } = evaluate(readProjectText(text))
  expect(problems).toEqual([])
  const [isolation, velocity] = verdicts
  expect(README).toContain(`${formatQuantity(isolation?.value, 'share', 'SI', 3)} isolation`)
  expect(README).toContain(`${formatQuantity(velocity?.value, 'velocity', 'SI', 3)} at the bearing`)
  expect(verdicts.map((verdict) => verdict.status)).not.toContain('fail')
})
