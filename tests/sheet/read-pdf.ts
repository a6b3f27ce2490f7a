import { inflateSync } from 'node:zlib'

/** A stretch of text as it stands on a page, in points from the lower left corner. */
export interface PlacedText {
  readonly text: string
  readonly font: string
  readonly size: number
  readonly x: number
  readonly y: number
  readonly width: number
  /** Width without the spaces at its end. */
  readonly ink: number
  /** Glyphs that the font does not have. */
  readonly missing: number
}

export interface ReadPage { readonly width: number; readonly height: number; readonly texts: readonly PlacedText[] }
export interface ReadFont { readonly name: string; readonly embedded: boolean; readonly mapped: boolean }
export interface ReadPdf {
  readonly pages: readonly ReadPage[]
  readonly fonts: readonly ReadFont[]
  readonly info: Readonly<Record<string, string>>
  readonly outline: readonly string[]
  readonly language: string
}

interface Font { readonly name: string; readonly letters: ReadonlyMap<number, string>; readonly widths: readonly number[] }
type Matrix = readonly [number, number, number, number, number, number]
type Objects = ReadonlyMap<number, { readonly head: string; readonly stream: Buffer | null }>

/** As much of a reader as the sheets need that pdfmake writes: text with its place, fonts, bookmarks, metadata. */
export function readPdf(bytes: Uint8Array): ReadPdf {
  const objects = objectsOf(Buffer.from(bytes))
  const root = [...objects.values()].find(({ head }) => head.includes('/Type /Catalog'))?.head ?? ''
  const kids = headOf(objects, root, 'Pages').match(/\/Kids \[([^\]]*)\]/)?.[1] ?? ''
  const fonts = new Map<number, Font>()
  return {
    pages: [...kids.matchAll(/(\d+) 0 R/g)].map(([, id]) => pageOf(objects, Number(id), fonts)),
    fonts: [...objects.values()].filter(({ head }) => head.includes('/Subtype /Type0')).map(({ head }) => fontOf(objects, head)),
    info: infoOf(objects, Buffer.from(bytes)),
    outline: outlineOf(objects, headOf(objects, root, 'Outlines')),
    language: root.match(/\/Lang \(([^)]*)\)/)?.[1] ?? '',
  }
}

/** The text of a page, line by line. */
export function linesOf({ texts }: ReadPage): string[] {
  const lines: { y: number; end: number; text: string }[] = []
  for (const { text, x, y, width, size } of texts) {
    const last = lines.at(-1)
    const same = last !== undefined && Math.abs(last.y - y) < size && x >= last.end - size
    if (same) Object.assign(last, { text: last.text + (x > last.end + 0.25 * size && !/\s$/.test(last.text) ? ' ' : '') + text, end: x + width })
    else lines.push({ y, end: x + width, text })
  }
  return lines.map(({ text }) => text.replace(/[\u00a0\u200b]/g, (c) => (c === '\u00a0' ? ' ' : '')).trim()).filter((text) => text !== '')
}

/** Texts that leave the room between two margins. */
export const outside = ({ texts, width }: ReadPage, left: number, right: number): PlacedText[] =>
  texts.filter(({ x, ink }) => x < left - 1 || x + ink > width - right + 1)

export const textOf = (pdf: ReadPdf): string => pdf.pages.flatMap(linesOf).join('\n')

function objectsOf(file: Buffer): Objects {
  const objects = new Map<number, { head: string; stream: Buffer | null }>()
  const source = file.toString('latin1')
  for (const found of source.matchAll(/(?:^|\n)(\d+) 0 obj\n/g)) {
    const start = found.index + found[0].length
    const end = source.indexOf('endobj', start)
    const streamAt = source.indexOf('stream\n', start)
    if (streamAt < 0 || streamAt > end) { objects.set(Number(found[1]), { head: source.slice(start, end), stream: null }); continue }
    const head = source.slice(start, streamAt)
    const length = Number(head.match(/\/Length (\d+)/)?.[1])
    const packed = file.subarray(streamAt + 7, streamAt + 7 + length)
    objects.set(Number(found[1]), { head, stream: head.includes('FlateDecode') ? inflateSync(packed) : packed })
  }
  return objects
}

function refOf(head: string, key: string): number {
  return Number(head.match(new RegExp(`/${key} \\[?(\\d+) 0 R`))?.[1] ?? NaN)
}
const headOf = (objects: Objects, head: string, key: string): string => objects.get(refOf(head, key))?.head ?? ''

function infoOf(objects: Objects, file: Buffer): Record<string, string> {
  const trailer = file.toString('latin1').slice(file.lastIndexOf('trailer'))
  const entries = [...headOf(objects, trailer, 'Info').matchAll(/\/(\w+) (\d+) 0 R/g)]
  return Object.fromEntries(entries.map(([, key, id]) => [key, stringOf(objects.get(Number(id))?.head ?? '')]))
}

/** A PDF string, in UTF-16 where it begins with a mark for that. */
function stringOf(source: string): string {
  const inner = source.slice(source.indexOf('(') + 1, source.lastIndexOf(')'))
    .replace(/\\([nrtbf()\\])/g, (_whole, c: string) => ({ n: '\n', r: '\r', t: '\t', b: '\b', f: '\f' })[c] ?? c)
  return inner.startsWith('\xfe\xff') ? Buffer.from(inner.slice(2), 'latin1').swap16().toString('utf16le') : inner
}

function outlineOf(objects: Objects, head: string): string[] {
  const titles: string[] = []
  for (let id = refOf(head, 'First'); !Number.isNaN(id);) {
    const item = objects.get(id)?.head ?? ''
    titles.push(stringOf(item.match(/\/Title (\((?:[^()\\]|\\.)*\))/s)?.[1] ?? ''))
    id = refOf(item, 'Next')
  }
  return titles
}

function fontOf(objects: Objects, head: string): ReadFont {
  const descriptor = headOf(objects, headOf(objects, head, 'DescendantFonts'), 'FontDescriptor')
  return { name: head.match(/\/BaseFont \/\S+\+(\S+)/)?.[1] ?? '', embedded: objects.has(refOf(descriptor, 'FontFile2')), mapped: objects.has(refOf(head, 'ToUnicode')) }
}

function openFont(objects: Objects, id: number): Font {
  const head = objects.get(id)?.head ?? ''
  const letters = new Map<number, string>()
  const cmap = objects.get(refOf(head, 'ToUnicode'))?.stream?.toString('latin1') ?? ''
  for (const [, from, , list] of cmap.matchAll(/<([0-9a-f]+)> <([0-9a-f]+)> \[([^\]]*)\]/g)) {
    [...list.matchAll(/<([0-9a-f ]*)>/g)].forEach(([, hex], i) => {
      letters.set(parseInt(from, 16) + i, hex.split(' ').join('').match(/.{4}/g)?.map((unit) => String.fromCharCode(parseInt(unit, 16))).join('') ?? '')
    })
  }
  const widths = headOf(objects, head, 'DescendantFonts').match(/\/W \[0 \[([^\]]*)\]/)?.[1].trim().split(/\s+/).map(Number) ?? []
  return { name: fontOf(objects, head).name, letters, widths }
}

function pageOf(objects: Objects, id: number, fonts: Map<number, Font>): ReadPage {
  const head = objects.get(id)?.head ?? ''
  const box = head.match(/\/MediaBox \[([^\]]*)\]/)?.[1].split(' ').map(Number) ?? []
  const listed = headOf(objects, head, 'Resources').match(/\/Font <<([^>]*)>>/)?.[1] ?? ''
  const named = new Map([...listed.matchAll(/\/(\w+) (\d+) 0 R/g)].map(([, name, ref]) => {
    const font = fonts.get(Number(ref)) ?? openFont(objects, Number(ref))
    fonts.set(Number(ref), font)
    return [name, font] as const
  }))
  return { width: box[2], height: box[3], texts: textsOf(objects.get(refOf(head, 'Contents'))?.stream?.toString('latin1') ?? '', named) }
}

const times = (m: Matrix, n: Matrix): Matrix => [
  m[0] * n[0] + m[1] * n[2], m[0] * n[1] + m[1] * n[3], m[2] * n[0] + m[3] * n[2], m[2] * n[1] + m[3] * n[3],
  m[4] * n[0] + m[5] * n[2] + n[4], m[4] * n[1] + m[5] * n[3] + n[5],
]

/** Walks through the drawing operators and keeps those that set text. */
function textsOf(content: string, fonts: ReadonlyMap<string, Font>): PlacedText[] {
  const texts: PlacedText[] = []
  const stack: Matrix[] = []
  let page: Matrix = [1, 0, 0, 1, 0, 0]
  let place: Matrix = page
  let font: Font | undefined
  let size = 0
  for (const line of content.split('\n')) {
    const parts = line.trim().split(/\s+/)
    const numbers = parts.slice(0, 6).map(Number) as unknown as Matrix
    if (line === 'q') stack.push(page)
    else if (line === 'Q') page = stack.pop() ?? page
    else if (parts[6] === 'cm') page = times(numbers, page)
    else if (parts[6] === 'Tm') place = numbers
    else if (parts[2] === 'Tf') [font, size] = [fonts.get(parts[0].slice(1)), Number(parts[1])]
    else if (/T[Jj]$/.test(line) && font) texts.push(placed(line, font, size, times(place, page)))
  }
  return texts
}

function placed(line: string, font: Font, size: number, at: Matrix): PlacedText {
  const codes = [...line.matchAll(/<([0-9a-f]*)>|(-?[\d.]+)/g)]
  const glyphs = codes.flatMap(([, hex]) => hex?.match(/.{4}/g)?.map((code) => parseInt(code, 16)) ?? [])
  const moved = codes.reduce((sum, [, hex, shift]) => (hex === undefined ? sum + Number(shift) : sum), 0)
  const scale = Math.hypot(at[0], at[1])
  const text = glyphs.map((glyph) => font.letters.get(glyph) ?? '').join('')
  const em = (size * scale) / 1000
  const sum = (some: readonly number[]): number => some.reduce((all, glyph) => all + (font.widths[glyph] ?? 0), 0)
  const width = (sum(glyphs) - moved) * em
  return {
    text, font: font.name, size: size * scale, x: at[4], y: at[5], width, ink: width - sum(glyphs.slice(text.trimEnd().length)) * em,
    missing: glyphs.filter((glyph) => glyph === 0).length,
  }
}
