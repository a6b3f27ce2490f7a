import { createReadStream } from 'node:fs'
import { stat, writeFile } from 'node:fs/promises'
import writeFileAtomic from 'write-file-atomic'
import { fail, succeed, type Failure, type Reply } from '../contract/errors'
import { largestDocument } from './decode'

const reasons: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file or folder', EACCES: 'access is not allowed', EPERM: 'access is not allowed', EISDIR: 'it is a folder',
  ENOTDIR: 'a part of the path is not a folder', ENOSPC: 'the disk is full', EROFS: 'the disk is read-only', ENAMETOOLONG: 'the name is too long',
  EMFILE: 'too many files are open', ELOOP: 'the links go in a circle',
}

function failure(action: 'read' | 'write', path: string, error: unknown): Failure {
  const code = error instanceof Error && 'code' in error ? String(error.code) : ''
  const reason = reasons[code] ?? (code === '' ? String(error) : code)
  const missing = action === 'read' && code === 'ENOENT'
  return fail(missing ? 'not_found' : `${action}_failed`, `Cannot ${action} ${path}: ${reason}.`)
}

/** The bytes of a stream, up to one more than a document may have; what is larger is refused when it is decoded. */
export async function readDocumentStream(stream: AsyncIterable<Uint8Array>): Promise<Uint8Array> {
  const chunks: Uint8Array[] = []
  let size = 0
  for await (const chunk of stream) {
    chunks.push(chunk)
    size += chunk.length
    if (size > largestDocument) break
  }
  return new Uint8Array(Buffer.concat(chunks))
}

/** The bytes of a document's file; pipes and devices may be named too. */
export async function readDocumentFile(path: string): Promise<Reply<Uint8Array>> {
  try {
    return succeed(await readDocumentStream(createReadStream(path)))
  } catch (error) {
    return failure('read', path, error)
  }
}

/** Pipes and devices are written to; renaming a file over them would replace them. */
async function isSpecial(path: string): Promise<boolean> {
  const found = await stat(path).catch(() => null)
  return found !== null && !found.isFile() && !found.isDirectory()
}

/** Writes a file whole or not at all: beside it first, then renamed over it. */
export async function saveFile(path: string, content: string | Uint8Array): Promise<Reply<{ path: string }>> {
  try {
    if (await isSpecial(path)) await writeFile(path, content)
    else await writeFileAtomic(path, typeof content === 'string' ? content : Buffer.from(content))
    return succeed({ path })
  } catch (error) {
    return failure('write', path, error)
  }
}
