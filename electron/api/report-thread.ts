import { Worker } from 'node:worker_threads'
import { join } from 'node:path'
import { appRoot } from '../app-root.ts'
import type { Project } from '../../core/project/project.ts'
import type { ReportAnswer } from './report-worker.ts'

/** The built worker: a page's wish for a PDF must not hold up the saving of a project. */
export function reportWorkerFile(root: string = appRoot()): string {
  return join(root, 'out', 'shell', 'report-worker.js')
}

/** Draws the report in a worker thread of its own. @throws Error with what the thread said */
export function drawReportInThread(project: Project): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    const worker = new Worker(reportWorkerFile())
    worker.once('message', (answer: ReportAnswer) => {
      void worker.terminate()
      if (answer.ok) resolve(answer.bytes)
      else reject(new Error(answer.message))
    })
    worker.once('error', reject)
    worker.once('exit', (code) => reject(new Error(`the report's thread ended with code ${code}`)))
    worker.postMessage(project)
  })
}
