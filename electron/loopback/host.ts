/**
 * The loopback host: the same pages, API and library as the desktop, in any browser on this
 * machine. Started by `launch.mjs`; ends on Ctrl-C, on SIGTERM, and with the process that started it.
 */
import { randomBytes } from 'node:crypto'
import { dirname, join } from 'node:path'
import { createDispatch } from '../api/dispatch.ts'
import { appRoot } from '../app-root.ts'
import { drawReportInThread } from '../api/report-thread.ts'
import { defaultLibraryFile } from '../library/data-folder.ts'
import { fillOnFirstStart } from '../library/first-start.ts'
import { openLibrary } from '../library/library.ts'
import { openLog } from '../log.ts'
import { appVersion } from '../version.ts'
import { startLoopbackServer } from './server.ts'

export interface RunningHost {
  /** the address to open, with this run's token */
  readonly address: string
  readonly libraryFile: string
  /** finishes the calls under way, then closes the library */
  stop(): Promise<void>
}

/**
 * @param options library: the library's file; empty: the one in the user's data folder
 * @throws LibraryHeldError when another host has the library, StorageError when it cannot be used
 */
export async function startLoopbackHost(options: { library: string; port: number }): Promise<RunningHost> {
  const root = appRoot()
  const file = options.library || defaultLibraryFile()
  const library = openLibrary(file, 'loopback')
  try {
    const log = openLog(join(dirname(file), 'logs'))
    fillOnFirstStart(library, join(root, 'resources'), (message) => log.warn(message))
    const token = randomBytes(32).toString('base64url')
    const dispatch = createDispatch({
      info: { version: appVersion(root), host: 'loopback', libraryFile: file },
      library,
      log,
      drawReport: drawReportInThread,
    })
    const server = await startLoopbackServer({
      dispatch,
      pages: join(root, 'out', 'pages'),
      token,
      port: options.port,
    })
    library.announce(server.origin)
    log.info(`serving ${server.origin}`)
    return {
      address: `${server.origin}/#token=${token}`,
      libraryFile: file,
      async stop() {
        await server.close()
        library.close()
      },
    }
  } catch (error) {
    library.close()
    throw error
  }
}
