import type { IncomingMessage } from 'node:http'

/** Largest request: a plan text of the largest legal size, escaped as JSON, fits with room to spare. */
export const bodyLimit_bytes = 24_000_000

export type Body = { ok: true; value: unknown } | { ok: false; status: 400 | 413; message: string }

/** Reads the JSON of a request, refusing what is too large or no JSON. */
export async function readJson(request: IncomingMessage, limit_bytes = bodyLimit_bytes): Promise<Body> {
  const tooLarge: Body = { ok: false, status: 413, message: `A request may have ${limit_bytes} bytes at most.` }
  if (Number(request.headers['content-length'] ?? 0) > limit_bytes) {
    request.resume()
    return tooLarge
  }
  const chunks: Buffer[] = []
  let size_bytes = 0
  for await (const chunk of request.iterator({ destroyOnReturn: false }) as AsyncIterable<Buffer>) {
    size_bytes += chunk.length
    if (size_bytes <= limit_bytes) chunks.push(chunk)
    else chunks.length = 0
  }
  if (size_bytes > limit_bytes) return tooLarge
  try {
    return { ok: true, value: JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks))) }
  } catch {
    return { ok: false, status: 400, message: 'The request is not JSON.' }
  }
}
