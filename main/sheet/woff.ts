import { inflateSync } from 'node:zlib'

/**
 * A WOFF 1 file as the TrueType file it was made of: tables unpacked, directory rewritten.
 * pdfmake could read it packed, and would unpack it anew for every sheet.
 *
 * @param file  bytes of a font; anything but WOFF comes back as it is
 */
export function unpackWoff(file: Buffer): Buffer {
  if (file.toString('latin1', 0, 4) !== 'wOFF') return file
  const count = file.readUInt16BE(12)
  const tables = Array.from({ length: count }, (_, i) => tableAt(file, 44 + 20 * i))
  const head = Buffer.alloc(12 + 16 * count)
  file.copy(head, 0, 4, 8)
  head.writeUInt16BE(count, 4)
  let offset = head.length
  tables.forEach(({ tag, checksum, bytes }, i) => {
    const entry = 12 + 16 * i
    tag.copy(head, entry)
    head.writeUInt32BE(checksum, entry + 4)
    head.writeUInt32BE(offset, entry + 8)
    head.writeUInt32BE(bytes.length, entry + 12)
    offset += padded(bytes.length)
  })
  return Buffer.concat([head, ...tables.flatMap(({ bytes }) => [bytes, Buffer.alloc(padded(bytes.length) - bytes.length)])])
}

const padded = (length: number): number => Math.ceil(length / 4) * 4

function tableAt(file: Buffer, entry: number): { tag: Buffer; checksum: number; bytes: Buffer } {
  const [offset, packed, length, checksum] = [4, 8, 12, 16].map((at) => file.readUInt32BE(entry + at))
  const bytes = file.subarray(offset, offset + packed)
  return { tag: file.subarray(entry, entry + 4), checksum, bytes: packed < length ? inflateSync(bytes) : bytes }
}
