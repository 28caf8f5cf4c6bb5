import log from 'electron-log/node.js'
import { randomBytes } from 'node:crypto'
import { join } from 'node:path'

/** The host's log file, and the references under which a person can find an entry. */
export interface Log {
  readonly file: string
  info(message: string): void
  warn(message: string): void
  /** Writes a failure. @returns a short reference, which also stands in the entry */
  record(message: string): string
}

/** @param folder where `stillbed.log` is kept; it is cut at 1 MB, one older part is kept */
export function openLog(folder: string): Log {
  const file = join(folder, 'stillbed.log')
  const logger = log.create({ logId: file })
  logger.transports.console.level = false
  logger.transports.file.resolvePathFn = () => file
  logger.transports.file.maxSize = 1_000_000
  return {
    file,
    info: (message) => logger.info(message),
    warn: (message) => logger.warn(message),
    record(message) {
      const reference = randomBytes(4).toString('hex')
      logger.error(`[${reference}] ${message}`)
      return reference
    },
  }
}
