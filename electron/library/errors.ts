/** Something the library was asked for is not there. */
export class NotFoundError extends Error {
  override readonly name = 'NotFoundError'
}

/** A save that is based on an older state than the stored one. */
export class StaleError extends Error {
  override readonly name = 'StaleError'
}

/** The library cannot be opened or used; the message is meant for a person. */
export class StorageError extends Error {
  override readonly name = 'StorageError'
}
