import { utilityProcess } from 'electron'
import type { Project } from '../core/project/project.ts'
import { reportWorkerFile } from './api/report-thread.ts'
import type { ReportAnswer } from './api/report-worker.ts'

/** Draws the report in a process of its own. @throws Error with what it said, or that it ended early */
export function drawReportInProcess(project: Project): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    const worker = utilityProcess.fork(reportWorkerFile(), [], { serviceName: 'Stillbed report' })
    worker.once('message', (answer: ReportAnswer) => {
      if (answer.ok) resolve(answer.bytes)
      else reject(new Error(answer.message))
      worker.kill()
    })
    worker.once('exit', (code) => reject(new Error(`the report's process ended with code ${code}`)))
    worker.postMessage(project)
  })
}
