import { readProject } from '../../core/project/read.ts'
import type { AreaHandlers } from './context.ts'

export const reportHandlers: AreaHandlers<'report'> = {
  'report:pdf': async ({ project: raw }, { drawReport }) => {
    const project = readProject(raw)
    return { fileName: `${fileStem(project.job.name)}.pdf`, bytes: await drawReport(project) }
  },
}

/** Names that Windows keeps for devices. */
const RESERVED = /^(con|prn|aux|nul|com\d|lpt\d)$/i

/** A project's name as a file name that every system takes. */
export function fileStem(name: string): string {
  const stem = name
    .replace(/[^\p{L}\p{N} ._-]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .slice(0, 80)
    .replace(/^[. ]+|[. ]+$/g, '')
  return stem === '' || RESERVED.test(stem) ? `${stem} Stillbed report`.trim() : stem
}
