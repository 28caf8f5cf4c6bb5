import type { Project } from '../../core/project/project.ts'

/** Text of a project file: what the Shelf imports and the batch door reads. */
export function projectFileText(project: Project): string {
  return `${JSON.stringify(project, null, 2)}\n`
}

/** A name that every file system takes. */
export function projectFileName(name: string): string {
  const plain = name
    .normalize('NFKD')
    .replace(/[^\w\s.-]/g, '')
    .trim()
    .replace(/\s+/g, '-')
    .slice(0, 80)
  return `${plain === '' || /^\.+$/.test(plain) ? 'project' : plain}.stillbed.json`
}

/** Hands the project over as a download. */
export function downloadProject(project: Project): void {
  download(
    projectFileName(project.job.name),
    new Blob([projectFileText(project)], { type: 'application/json' }),
  )
}

export function download(fileName: string, content: Blob): void {
  const address = URL.createObjectURL(content)
  const link = document.createElement('a')
  link.href = address
  link.download = fileName
  link.click()
  setTimeout(() => {
    URL.revokeObjectURL(address)
  }, 10_000)
}
