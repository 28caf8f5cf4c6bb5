import { expect, it } from 'vitest'
import { readProjectText } from '../../../core/project/read.ts'
import { importRefusal } from '../../../renderer/pages/shelf/import-words.ts'

it.each([
  ['half a file', '{"format": "stillbed-proj', 'It is no project file, or only part of one.'],
  ['a picture', '\u0089PNG', 'It is no project file, or only part of one.'],
  ['another JSON file', '{"hello": 1}', 'It is no project file of Stillbed.'],
  [
    'a file of a newer program',
    '{"format":"stillbed-project","version":99}',
    'Its version 99 is not known: this program reads versions up to 1; a newer one is needed.',
  ],
  [
    'a field that cannot be',
    '{"format":"stillbed-project","version":1,"machine":{"massProperties":{"from":"typed","mass":"-5 kg"}}}',
    'machine.massProperties.mass: must be greater than 0 kg (got "-5 kg")',
  ],
  [
    'an unknown field',
    '{"format":"stillbed-project","version":1,"job":{"colour":"red"}}',
    'job: Unrecognized key: "colour" (got an object)',
  ],
])('says in words why %s is not taken', (_what, text, words) => {
  let refused: unknown
  try {
    readProjectText(text)
  } catch (error) {
    refused = error
  }
  expect(importRefusal(refused)).toBe(words)
})
