import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs'

export interface PdfPage {
  /** words in the order in which they were drawn, joined by blanks */
  readonly text: string
  readonly width: number
  readonly height: number
  /** right end of the word that reaches furthest [pt] */
  readonly rightmost: number
}

/** Reads the pages of a PDF back as text. */
export async function pdfPages(bytes: Uint8Array): Promise<readonly PdfPage[]> {
  const file = await getDocument({ data: bytes.slice(), verbosity: 0, useSystemFonts: false }).promise
  try {
    const numbers = Array.from({ length: file.numPages }, (_, index) => index + 1)
    return await Promise.all(
      numbers.map(async (number) => {
        const page = await file.getPage(number)
        const { items } = await page.getTextContent()
        const words = items.flatMap((item) => ('str' in item ? [item.str] : []))
        const { width, height } = page.getViewport({ scale: 1 })
        const ends = items.flatMap((item) => ('str' in item ? [Number(item.transform[4]) + item.width] : []))
        return { text: plain(words.join(' ')), width, height, rightmost: Math.max(...ends) }
      }),
    )
  } finally {
    await file.loadingTask.destroy()
  }
}

/** Text as it is compared: any run of blanks is one. */
export const plain = (text: string): string => text.replace(/[\s\u00a0\u200b]+/g, ' ')

/** Text without blanks, for what a narrow column breaks into lines. */
export const squeezed = (text: string): string =>
  // the micro sign and the Greek letter share one glyph, and are read back as the letter
  text.replace(/[\s\u00a0\u200b]+/g, '').replaceAll('µ', 'μ')
