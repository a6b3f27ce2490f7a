import type { TFontDictionary } from 'pdfmake/interfaces'
import { coveredBy } from './coverage'
import type { FontFamily } from './font-files'
import { keepFont } from './printer'

/** What text is set in: words in a proportional face, figures in one whose columns stand. */
export type Voice = 'words' | 'figures'

/** The characters each family can show, and the families as pdfmake wants them. */
export interface Faces {
  readonly covers: ReadonlyMap<FontFamily, ReadonlySet<number>>
  readonly dictionary: TFontDictionary
}

let loaded: Promise<Faces> | undefined

/** The fonts of the sheet, handed to pdfmake; read once. */
export function loadFaces(): Promise<Faces> {
  loaded ??= readFaces()
  return loaded
}

async function readFaces(): Promise<Faces> {
  const { fontFiles } = await import('./font-files')
  const covers = new Map<FontFamily, ReadonlySet<number>>()
  const dictionary: TFontDictionary = {}
  for (const { family, weight, name, bytes } of fontFiles) {
    keepFont(name, bytes)
    const covered = coveredBy(bytes)
    const before = covers.get(family)
    covers.set(family, before ? new Set([...before].filter((code) => covered.has(code))) : covered)
    dictionary[family] = { bold: name, ...dictionary[family], [weight]: name }
  }
  return { covers, dictionary }
}
