import { readFile, realpath } from 'node:fs/promises'
import { extname, join, sep } from 'node:path'

const types: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8', '.js': 'text/javascript; charset=utf-8', '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8', '.map': 'application/json; charset=utf-8', '.txt': 'text/plain; charset=utf-8',
  '.svg': 'image/svg+xml', '.png': 'image/png', '.ico': 'image/x-icon', '.webmanifest': 'application/manifest+json',
  '.woff2': 'font/woff2', '.woff': 'font/woff', '.ttf': 'font/ttf',
}

export interface StaticFile { readonly body: Buffer; readonly type: string; readonly cache: string }

/**
 * One file of the built window, never anything outside its folder.
 *
 * @param root      folder of the built window
 * @param pathname  path of the address, still percent-encoded, starting with `/`; `/` is the window itself
 * @returns         the file, or null for whatever is not a file in there
 */
export async function readStatic(root: string, pathname: string): Promise<StaticFile | null> {
  const parts = safeParts(pathname)
  if (parts === null) return null
  const wanted = parts.length === 0 ? ['index.html'] : parts
  try {
    const base = await realpath(root)
    const path = await realpath(join(base, ...wanted))
    if (!path.startsWith(base + sep)) return null
    const body = await readFile(path)
    return { body, type: types[extname(path).toLowerCase()] ?? 'application/octet-stream', cache: cacheRule(wanted.at(-1) ?? '') }
  } catch {
    return null
  }
}

function safeParts(pathname: string): string[] | null {
  try {
    const parts = decodeURIComponent(pathname).split('/').filter((part) => part !== '')
    return parts.some((part) => part.startsWith('.') || /[\\:\0]/.test(part)) ? null : parts
  } catch {
    return null
  }
}

const cacheRule = (name: string) =>
  /-[\w-]{8,}\.(js|css|woff2?|ttf|png|svg)$/.test(name) ? 'private, max-age=31536000, immutable' : 'no-store'
