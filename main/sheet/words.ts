import type { Content, ContentText, Size, TableCell } from 'pdfmake/interfaces'
import { ink, lineAcross, size } from './theme'

type Styled = ContentText & { width?: Size }
type Style = Partial<Omit<Styled, 'text'>>

/** A number with its unit: in the figures' face, never broken across lines. */
export const figure = (text: string, style: Style = {}): Styled =>
  ({ text: text.replace(/ /g, '\u00a0'), font: 'figures', noWrap: true, ...style })

/** Figures at the right of a table's column. */
export const right = (text: string, style: Style = {}): Styled => figure(text, { alignment: 'right', ...style })

/** Second text: smaller and lighter. */
export const aside = (text: string, style: Style = {}): Styled => ({ text, fontSize: size.small, color: ink.muted, ...style })

/** The head of a table's column. */
export const columnHead = (text: string, alignment: 'left' | 'right' | 'center' = 'left'): TableCell =>
  ({ text, fontSize: size.small, color: ink.muted, alignment })

/** `σ_os,lim` with what follows the first underscore set low. */
export function symbol(text: string, style: Style = {}): Styled {
  const cut = text.indexOf('_')
  const parts = cut < 0 ? [{ text }] : [{ text: text.slice(0, cut) }, { text: text.slice(cut + 1), sub: true, fontSize: 6 / 0.58 }]
  return { text: parts, color: ink.muted, noWrap: true, ...style }
}

/**
 * The head of a section, a bookmark, and a line under it. What follows a `tall` one may run over pages:
 * it moves to the next page when too little of this one is left.
 */
export function heading(text: string, width: number, note?: string, tall = false): Content {
  const level = tall ? { headlineLevel: 1 } : {}
  const line: Content = { text, fontSize: size.head, bold: true, outline: true, outlineText: text, margin: [0, 14, 0, 3], ...level }
  const under = note === undefined ? [] : [aside(note, { margin: [0, 0, 0, 6] })]
  return { stack: [line, lineAcross(width, ink.copper, 0.8, note === undefined ? 6 : 4), ...under] }
}

/** The head of a group within a section. */
export const subheading = (text: string): Content => ({ text, bold: true, margin: [0, 7, 0, 1] })
