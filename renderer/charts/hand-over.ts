import { download } from '../state/project-file.ts'

/** What became of a copy: on the clipboard, or in a file where the clipboard is closed to pages. */
export type HandOver = 'copied' | 'saved'

/** A picture to the clipboard; where that is refused, as a file. */
export async function handOverPicture(picture: Promise<Blob>, name: string): Promise<HandOver> {
  try {
    await navigator.clipboard.write([new ClipboardItem({ 'image/png': picture })])
    return 'copied'
  } catch {
    download(`${name}.png`, await picture)
    return 'saved'
  }
}

/** Text to the clipboard; where that is refused, as a file. */
export async function handOverText(text: string, name: string): Promise<HandOver> {
  try {
    await navigator.clipboard.writeText(text)
    return 'copied'
  } catch {
    download(`${name}.tsv`, new Blob([text], { type: 'text/tab-separated-values' }))
    return 'saved'
  }
}

/** A name that every file system takes. */
export function fileName(...parts: readonly string[]): string {
  const joined = parts
    .map((part) => part.trim())
    .filter((part) => part !== '')
    .join(' - ')
  const safe = joined.replace(/[<>:"/\\|?*\u0000-\u001f]+/g, ' ').replace(/\s+/g, ' ')
  return safe.replace(/^[. ]+|[. ]+$/g, '').slice(0, 120) || 'stillbed'
}
