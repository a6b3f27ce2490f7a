/**
 * The characters a font file can show, read from its `cmap` table (OpenType, formats 4 and 12).
 *
 * @param file  bytes of a TrueType font
 * @returns     code points with a glyph of their own
 * @throws      Error when the file is of another kind or has no Unicode table
 */
export function coveredBy(file: Buffer): ReadonlySet<number> {
  const cmap = tableOf(file, 'cmap')
  const covered = new Set<number>()
  for (let i = 0; i < cmap.readUInt16BE(2); i += 1) {
    const table = cmap.subarray(cmap.readUInt32BE(4 + 8 * i + 4))
    const format = table.readUInt16BE(0)
    if (format === 4) addSegments(table, covered)
    if (format === 12) addGroups(table, covered)
  }
  if (covered.size === 0) throw new Error('The font has no Unicode character table')
  return covered
}

function tableOf(file: Buffer, tag: string): Buffer {
  for (let entry = 12; entry < 12 + 16 * file.readUInt16BE(4); entry += 16) {
    if (file.toString('latin1', entry, entry + 4) !== tag) continue
    const offset = file.readUInt32BE(entry + 8)
    return file.subarray(offset, offset + file.readUInt32BE(entry + 12))
  }
  throw new Error(`The font has no ${tag} table`)
}

function addSegments(table: Buffer, covered: Set<number>): void {
  const doubled = table.readUInt16BE(6)
  for (let i = 0; i < doubled; i += 2) {
    const end = table.readUInt16BE(14 + i)
    const start = table.readUInt16BE(16 + doubled + i)
    const delta = table.readUInt16BE(16 + 2 * doubled + i)
    const at = 16 + 3 * doubled + i
    const range = table.readUInt16BE(at)
    for (let code = start; code <= end && code < 0xffff; code += 1) {
      const glyph = range === 0 ? code : table.readUInt16BE(at + range + 2 * (code - start))
      if (glyph !== 0 && ((glyph + delta) & 0xffff) !== 0) covered.add(code)
    }
  }
}

function addGroups(table: Buffer, covered: Set<number>): void {
  for (let i = 0; i < table.readUInt32BE(12); i += 1) {
    const [start, end, glyph] = [0, 4, 8].map((at) => table.readUInt32BE(16 + 12 * i + at))
    for (let code = start; code <= end; code += 1) if (glyph + code - start !== 0) covered.add(code)
  }
}
