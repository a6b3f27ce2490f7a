import type { Content } from 'pdfmake/interfaces'
import type { Faces, Voice } from './faces'
import { softened, splitRuns } from './runs'

type Node = Record<string, unknown>

/**
 * Content as written, with `font: 'words' | 'figures'`, to content in real fonts: every text is cut into runs,
 * in tables, columns and pictures alike. Nothing reaches the page around this.
 */
export function typeset(content: Content, faces: Faces, voice: Voice = 'words'): Content {
  return visit(content, faces, voice) as Content
}

function visit(node: unknown, faces: Faces, voice: Voice): unknown {
  if (typeof node === 'string') return { text: runsOf(node, {}, faces, voice) }
  if (Array.isArray(node)) return node.map((part) => visit(part, faces, voice))
  if (node === null || typeof node !== 'object') return node
  return visitObject(node as Node, faces, voice)
}

function visitObject(node: Node, faces: Faces, outer: Voice): Node {
  const voice = voiceOf(node, outer)
  const set: Node = { ...node }
  if ('text' in node) set.text = runsOf(node.text, node.noWrap ? { noWrap: true } : {}, faces, voice)
  for (const key of ['stack', 'columns'] as const) if (key in node) set[key] = visit(node[key], faces, voice)
  const table = node.table as { body: unknown } | undefined
  if (table) set.table = { ...table, body: visit(table.body, faces, voice) }
  if (typeof node.svg === 'string') set.svg = setPicture(node.svg, faces)
  return set
}

const voiceOf = ({ font }: Node, outer: Voice): Voice => (font === 'figures' || font === 'words' ? font : outer)

/** Text, or texts within a text, as runs in a row; a style given further in wins. */
function runsOf(text: unknown, style: Node, faces: Faces, voice: Voice): Node[] {
  if (Array.isArray(text)) return text.flatMap((part) => runsOf(part, style, faces, voice))
  if (text !== null && typeof text === 'object') {
    const { text: within, font, ...own } = text as Node
    return runsOf(within, { ...style, ...own }, faces, voiceOf({ font }, voice))
  }
  const written = String(text ?? '')
  const cut = splitRuns(style.noWrap ? written : softened(written), voice, faces)
  return cut.length === 0 ? [{ ...style, text: '', font: voice }] : cut.map((run) => ({ ...style, ...run }))
}

/** The texts of a picture, each run in a span of its own. */
function setPicture(svg: string, faces: Faces): string {
  return svg.replace(/<text data-voice="(words|figures)" font-size="([\d.]+)"([^>]*)>([^<]*)<\/text>/g,
    (_whole, voice: Voice, size: string, attributes: string, text: string) => {
      const cut = splitRuns(unescape(text), voice, faces, 'picture')
      if (cut.length === 1) return `<text font-size="${size}" font-family="${cut[0].font}"${attributes}>${text}</text>`
      return `<text font-size="0.01" font-family="${voice}"${attributes}>${spans(cut, Number(size))}</text>`
    })
}

/** Width of a space in the figures' face, in ems. */
const space = 0.632

/** Spaces between spans are lost on the way to the page, so they become a step to the right. */
function spans(cut: readonly { text: string; font: string }[], size: number): string {
  return cut.map(({ text, font }, i) => {
    const before = /\s$/.test(cut[i - 1]?.text ?? '') || /^\s/.test(text) ? ` dx="${(space * size).toFixed(2)}"` : ''
    return `<tspan font-size="${size}" font-family="${font}"${before}>${escape(text.trim())}</tspan>`
  }).join('')
}

/** Text as it may stand in XML. */
export const escape = (text: string): string => text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;')
const unescape = (text: string): string => text.replace(/&quot;/g, '"').replace(/&gt;/g, '>').replace(/&lt;/g, '<').replace(/&amp;/g, '&')
