/**
 * The font files, put into the program when it is built, so that no folder is read at run time.
 * Loaded only when a sheet is made. Each is named as the font names itself: pictures find a font by that name.
 */
import dejaVu from '../../node_modules/dejavu-fonts-ttf/ttf/DejaVuSans.ttf?inline'
import dejaVuBold from '../../node_modules/dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf?inline'
import nextRegular from '../../node_modules/@fontsource/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-400-normal.woff?inline'
import nextBold from '../../node_modules/@fontsource/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-600-normal.woff?inline'
import nextMoreRegular from '../../node_modules/@fontsource/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-400-normal.woff?inline'
import nextMoreBold from '../../node_modules/@fontsource/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-600-normal.woff?inline'
import monoRegular from '../../node_modules/@fontsource/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-400-normal.woff?inline'
import monoBold from '../../node_modules/@fontsource/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-600-normal.woff?inline'
import monoMoreRegular from '../../node_modules/@fontsource/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-400-normal.woff?inline'
import monoMoreBold from '../../node_modules/@fontsource/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-600-normal.woff?inline'
import { unpackWoff } from './woff'

const bytes = (dataUrl: string): Buffer => unpackWoff(Buffer.from(dataUrl.slice(dataUrl.indexOf(',') + 1), 'base64'))

/** Family, weight, the font's own name, and its bytes. */
export const fontFiles = [
  { family: 'words', weight: 'normal', name: 'AtkinsonHyperlegibleNext-Regular', bytes: bytes(nextRegular) },
  { family: 'words', weight: 'bold', name: 'AtkinsonHyperlegibleNext-SemiBold', bytes: bytes(nextBold) },
  { family: 'words-more', weight: 'normal', name: 'words-more-normal', bytes: bytes(nextMoreRegular) },
  { family: 'words-more', weight: 'bold', name: 'words-more-bold', bytes: bytes(nextMoreBold) },
  { family: 'figures', weight: 'normal', name: 'AtkinsonHyperlegibleMono-Regular', bytes: bytes(monoRegular) },
  { family: 'figures', weight: 'bold', name: 'AtkinsonHyperlegibleMono-SemiBold', bytes: bytes(monoBold) },
  { family: 'figures-more', weight: 'normal', name: 'figures-more-normal', bytes: bytes(monoMoreRegular) },
  { family: 'figures-more', weight: 'bold', name: 'figures-more-bold', bytes: bytes(monoMoreBold) },
  { family: 'signs', weight: 'normal', name: 'DejaVuSans', bytes: bytes(dejaVu) },
  { family: 'signs', weight: 'bold', name: 'DejaVuSans-Bold', bytes: bytes(dejaVuBold) },
] as const

export type FontFamily = (typeof fontFiles)[number]['family']
