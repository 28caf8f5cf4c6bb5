import type { StudyReply, StudyRequest } from './study-messages.ts'

/** The part of a Worker that is used here, so that tests can stand in for one. */
export interface StudyWorker {
  postMessage(request: StudyRequest): void
  terminate(): void
  onmessage: ((event: MessageEvent<StudyReply>) => void) | null
  onerror: ((event: ErrorEvent) => void) | null
}

export interface StudyListener {
  /** each answer as it comes, so that partial results can be shown */
  readonly onreply: (reply: StudyReply) => void
}

/**
 * Puts one question to a thread of its own, which ends with the last answer.
 * @returns a function that stops it; nothing is answered afterwards
 */
export function runStudy(
  request: StudyRequest,
  { onreply }: StudyListener,
  start: () => StudyWorker = startStudyWorker,
): () => void {
  const worker = start()
  const stop = () => {
    worker.onmessage = null
    worker.onerror = null
    worker.terminate()
  }
  worker.onmessage = ({ data }) => {
    if (data.kind === 'end' || data.kind === 'failure') stop()
    onreply(data)
  }
  worker.onerror = (event) => {
    stop()
    onreply({ kind: 'failure', message: event.message || 'The computation stopped unexpectedly.' })
  }
  worker.postMessage(request)
  return stop
}

function startStudyWorker(): StudyWorker {
  return new Worker(new URL('./study-worker.ts', import.meta.url), { type: 'module', name: 'study' })
}
