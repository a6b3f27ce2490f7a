import { stat } from 'node:fs/promises'
import { resolve } from 'node:path'
import { fail, succeed, type Reply } from '../contract/errors'
import { readDocumentFile } from '../documents/files'
import { readPlan, type ReadPlan } from '../documents/read-plan'
import type { Setting } from '../documents/set-path'
import type { Streams } from './streams'

/** Whether two names lead to one file, be it through a link. */
async function isSame(one: string, other: string): Promise<boolean> {
  if (resolve(one) === resolve(other)) return true
  const [a, b] = await Promise.all([one, other].map((path) => stat(path, { bigint: true }).catch(() => null)))
  return a !== null && b !== null && a.isFile() && a.dev === b.dev && a.ino === b.ino
}

/** The plan that a command is asked about; what was changed on the way in is said on the error stream. */
export async function planOf(file: string, options: Readonly<Record<string, unknown>>, streams: Streams): Promise<Reply<ReadPlan>> {
  if (typeof options['out'] === 'string' && file !== '-' && await isSame(options['out'], file)) {
    return fail('bad_request', `--out names the plan file itself (${file}); it would be replaced. Name another file.`)
  }
  const bytes = file === '-' ? succeed(await streams.readInput()) : await readDocumentFile(file)
  if (!bytes.ok) return bytes
  const read = readPlan(bytes.value, options['set'] as Setting[] | undefined)
  if (read.ok) for (const change of read.value.changes) streams.err(`latchwright: ${change}`)
  return read
}
