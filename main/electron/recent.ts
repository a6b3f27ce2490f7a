import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { z } from 'zod'
import writeFileAtomic from 'write-file-atomic'

const most = 10
const recentSchema = z.strictObject({ paths: z.array(z.string().min(1).max(4096)).max(100) })

/** The files opened or saved last, newest first, kept between runs. */
export interface Recent {
  list(): Promise<readonly string[]>
  add(path: string): Promise<void>
}

/**
 * @param folder  where the program keeps its own data
 */
export function createRecent(folder: string): Recent {
  const file = join(folder, 'recent.json')
  let writing: Promise<void> = Promise.resolve()
  const list = async () => {
    try {
      return recentSchema.parse(JSON.parse(await readFile(file, 'utf8'))).paths.slice(0, most)
    } catch {
      return []
    }
  }
  const add = async (path: string) => {
    const paths = [path, ...(await list()).filter((other) => other !== path)].slice(0, most)
    await writeFileAtomic(file, JSON.stringify({ paths }, null, 1), { mode: 0o600 })
  }
  return {
    list: () => writing.then(list),
    add: (path) => {
      writing = writing.then(() => add(path)).catch(() => undefined)
      return writing
    },
  }
}
