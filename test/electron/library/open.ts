import { join } from 'node:path'
import { onTestFinished } from 'vitest'
import { openLibrary, type Library } from '../../../electron/library/library.ts'
import { temporaryFolder } from '../../setup/folder.ts'

/** A library on a real file, closed after the test. The clock goes one second on at every look. */
export function testLibrary(file = join(temporaryFolder(), 'library.sqlite')): Library {
  let seconds = 0
  const library = openLibrary(file, 'loopback', () => new Date(Date.UTC(2030, 0, 1, 12, 0, seconds++)))
  let open = true
  const close = () => {
    if (open) library.close()
    open = false
  }
  onTestFinished(close)
  return { ...library, close }
}
