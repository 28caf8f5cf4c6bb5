import type { ApiContext } from '../../../electron/api/context.ts'
import { createDispatch } from '../../../electron/api/dispatch.ts'
import { testLibrary } from '../library/open.ts'

/** The API on a library of its own; what it logs is kept to be looked at. */
export function testApi(parts: Partial<ApiContext> = {}) {
  const library = testLibrary()
  const recorded: string[] = []
  const dispatch = createDispatch({
    info: { version: '0.0.0', host: 'loopback', libraryFile: library.file },
    library,
    log: {
      file: '',
      info: () => {},
      warn: () => {},
      record: (message) => {
        recorded.push(message)
        return 'ref-1'
      },
    },
    drawReport: async () => Uint8Array.of(37, 80, 68, 70),
    ...parts,
  })
  return { dispatch, library, recorded }
}
