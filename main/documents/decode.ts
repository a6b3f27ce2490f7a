import type { Problem } from '../contract/errors'

/** Largest document that is read [bytes]. */
export const largestDocument = 5_000_000

export type Decoded = { readonly ok: true; readonly text: string; readonly changes: string[] } | { readonly ok: false; readonly problem: Problem }

const wanted = 'a JSON text in UTF-8'
const refuse = (code: Problem['code'], value: string, hint: string): Decoded =>
  ({ ok: false, problem: { code, path: '', value, allowed: wanted, hint } })

/** UTF-16 shows by its mark, or by every other byte of the first few being zero. */
function looksLikeUtf16(bytes: Uint8Array): boolean {
  const [first, second, third, fourth] = bytes
  if ((first === 0xff && second === 0xfe) || (first === 0xfe && second === 0xff)) return true
  return bytes.length >= 4 && ((first === 0 && third === 0) || (second === 0 && fourth === 0)) && (first !== 0 || second !== 0)
}

function firstFault(bytes: Uint8Array): string {
  const lines = new TextDecoder('utf-8').decode(bytes).split('\uFFFD')[0].split('\n')
  return `a byte that is not UTF-8 in line ${lines.length}`
}

function decodeBytes(bytes: Uint8Array): Decoded {
  if (looksLikeUtf16(bytes)) return refuse('not_text', 'a text in UTF-16', 'Save the file again as UTF-8.')
  if (bytes.subarray(0, 4096).includes(0)) return refuse('not_text', 'a binary file', 'A plan is a text file whose name ends in .bank.json.')
  try {
    return { ok: true, text: new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes), changes: [] }
  } catch {
    return refuse('not_text', firstFault(bytes), 'Save the file again as UTF-8.')
  }
}

/** Bytes or text of a document as text, without a byte order mark; nothing is replaced in silence. */
export function decodeDocument(input: string | Uint8Array): Decoded {
  if (input.length > largestDocument) return refuse('too_large', `${input.length} bytes`, `A plan has at most ${largestDocument} bytes.`)
  const decoded: Decoded = typeof input === 'string' ? { ok: true, text: input, changes: [] } : decodeBytes(input)
  if (!decoded.ok || !decoded.text.startsWith('\uFEFF')) return decoded
  return { ok: true, text: decoded.text.slice(1), changes: ['The byte order mark at the start was dropped.'] }
}
