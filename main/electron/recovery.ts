import { chmod, mkdir, readdir, readFile, rename, rm, stat } from 'node:fs/promises'
import { join } from 'node:path'
import writeFileAtomic from 'write-file-atomic'

/** Unsaved work of the windows, so that it survives a crash. One file a window; its name says whose it is. */
export interface Recovery {
  /** Keeps the text of a window; null: nothing is unsaved any more. */
  keep(window: number, text: string | null): Promise<void>
  /** What this window kept, or else the newest text left behind by a program that is gone; that text then belongs to this window. */
  read(window: number): Promise<string | null>
}

const namePattern = /^(\d+)-\d+\.bank\.json$/

/**
 * @param folder   where the program keeps its own data
 * @param pid      this process
 * @param isAlive  whether a process still runs
 */
export function createRecovery(folder: string, pid: number = process.pid, isAlive: (pid: number) => boolean = processRuns): Recovery {
  const home = join(folder, 'recovery')
  const own = (window: number) => join(home, `${pid}-${window}.bank.json`)
  const queues = new Map<number, Promise<unknown>>()
  const inTurn = <T>(window: number, job: () => Promise<T>): Promise<T> => {
    const next = (queues.get(window) ?? Promise.resolve()).then(job, job)
    queues.set(window, next.catch(() => undefined))
    return next
  }
  const keep = async (window: number, text: string | null) => {
    if (text === null) return rm(own(window), { force: true })
    await mkdir(home, { recursive: true, mode: 0o700 })
    await chmod(home, 0o700).catch(() => undefined)
    await writeFileAtomic(own(window), text, { mode: 0o600 })
  }
  const read = async (window: number) => {
    for (const left of await leftBehind(home, pid, isAlive)) {
      if (await readText(own(window)) !== null) break
      await rename(left, own(window)).catch(() => undefined)
    }
    return readText(own(window))
  }
  return { keep: (window, text) => inTurn(window, () => keep(window, text)), read: (window) => inTurn(window, () => read(window)) }
}

async function leftBehind(home: string, pid: number, isAlive: (pid: number) => boolean): Promise<string[]> {
  const names = await readdir(home).catch(() => [])
  const left = names.filter((name) => {
    const owner = Number(namePattern.exec(name)?.[1] ?? pid)
    return owner !== pid && !isAlive(owner)
  })
  const dated = await Promise.all(left.map(async (name) => ({
    path: join(home, name), time_ms: await stat(join(home, name)).then((found) => found.mtimeMs, () => 0),
  })))
  return dated.sort((a, b) => b.time_ms - a.time_ms).map((entry) => entry.path)
}

const readText = (path: string) => readFile(path, 'utf8').catch(() => null)

function processRuns(pid: number): boolean {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM'
  }
}
