import { describe, expect, it } from 'vitest'
import { coveredBy } from '../../main/sheet/coverage'
import { fontFiles } from '../../main/sheet/font-files'
import { unpackWoff } from '../../main/sheet/woff'

/** Sum of the 32-bit words of a table, as the OpenType directory keeps it. */
function checksum(table: Buffer): number {
  const whole = Buffer.concat([table, Buffer.alloc((4 - (table.length % 4)) % 4)])
  let sum = 0
  for (let at = 0; at < whole.length; at += 4) sum = (sum + whole.readUInt32BE(at)) >>> 0
  return sum
}

describe('the font files', () => {
  it.each(fontFiles.map((file) => [file.name, file.bytes] as const))('%s is a TrueType font whose tables are whole', (_name, bytes) => {
    expect(bytes.readUInt32BE(0)).toBe(0x00010000)
    const tables = Array.from({ length: bytes.readUInt16BE(4) }, (_, i) => {
      const entry = 12 + 16 * i
      const offset = bytes.readUInt32BE(entry + 8)
      return { tag: bytes.toString('latin1', entry, entry + 4), sum: bytes.readUInt32BE(entry + 4), table: bytes.subarray(offset, offset + bytes.readUInt32BE(entry + 12)) }
    })
    expect(tables.map(({ tag }) => tag)).toEqual(expect.arrayContaining(['cmap', 'glyf', 'head', 'hmtx', 'loca', 'name']))
    for (const { tag, sum, table } of tables) if (tag !== 'head') expect(checksum(table), tag).toBe(sum)
  })

  it('have every letter and digit, and DejaVu the signs of the trade', () => {
    const ascii = Array.from({ length: 94 }, (_, i) => i + 33)
    for (const { family, bytes } of fontFiles.filter(({ family }) => family === 'words' || family === 'figures')) {
      expect(ascii.filter((code) => !coveredBy(bytes).has(code)), family).toEqual([])
    }
    const signs = fontFiles.filter(({ family }) => family === 'signs').map(({ bytes }) => coveredBy(bytes))
    for (const sign of 'στρκµΩΔΣπ√≤≥±→·×÷−∞◥▲●◆▌\u200b\ufffd') expect(signs.every((covered) => covered.has(sign.codePointAt(0) ?? 0)), sign).toBe(true)
  })

  it('are refused when they are no fonts', () => {
    expect(() => coveredBy(Buffer.alloc(64))).toThrow('no cmap table')
    const plain = Buffer.from('not a font at all')
    expect(unpackWoff(plain)).toBe(plain)
  })
})
