/**
 * Draws reports off the host's main thread: a worker thread of the loopback host, a utility
 * process of the desktop. Takes a project, answers with the PDF's bytes.
 */
import { parentPort as threadPort } from 'node:worker_threads'
import type { Project } from '../../core/project/project.ts'
import { drawReport } from '../report/draw-report.ts'

export type ReportAnswer =
  { readonly ok: true; readonly bytes: Uint8Array } | { readonly ok: false; readonly message: string }

/** Electron gives a utility process its port here. */
interface UtilityPort {
  on(event: 'message', listener: (event: { data: unknown }) => void): void
  postMessage(message: unknown): void
}

async function draw(project: Project): Promise<ReportAnswer> {
  try {
    return { ok: true, bytes: await drawReport(project) }
  } catch (error) {
    return { ok: false, message: error instanceof Error ? (error.stack ?? error.message) : String(error) }
  }
}

const utilityPort = (process as { parentPort?: UtilityPort }).parentPort
if (utilityPort) {
  utilityPort.on('message', ({ data }) => {
    void draw(data as Project).then((answer) => utilityPort.postMessage(answer)) // sent by report-process.ts
  })
} else if (threadPort) {
  const port = threadPort
  port.on('message', (project: Project) => {
    void draw(project).then((answer) => port.postMessage(answer))
  })
}
