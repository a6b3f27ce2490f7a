import pdfmake from 'pdfmake'
import type { TDocumentDefinitions, TFontDictionary } from 'pdfmake/interfaces'

/** What pdfmake has in Node and its types leave out. */
interface NodePrinter {
  readonly virtualfs: { writeFileSync(name: string, bytes: Buffer): void }
}

/** Keeps a font in pdfmake's own memory under a name. */
export function keepFont(name: string, bytes: Buffer): void {
  (pdfmake as unknown as NodePrinter).virtualfs.writeFileSync(name, bytes)
}

/**
 * A page description to PDF bytes; nothing is fetched and no file is read.
 *
 * @param definition  what pdfmake lays out
 * @param fonts       families, by the names that `keepFont` was given
 */
export async function print(definition: TDocumentDefinitions, fonts: TFontDictionary): Promise<Uint8Array> {
  pdfmake.setUrlAccessPolicy(() => false)
  pdfmake.setLocalAccessPolicy(() => false)
  pdfmake.setFonts(fonts)
  return new Uint8Array(await pdfmake.createPdf(definition).getBuffer())
}
