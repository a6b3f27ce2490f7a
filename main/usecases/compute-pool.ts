import { availableParallelism } from 'node:os'
import { Tinypool } from 'tinypool'
import type { Result } from '../contract/result'
import type { Waves } from '../contract/waves'
import { built } from './built-files'
import type { Compute } from './compute'
import type { Job } from './compute.worker'
import { superseded } from './superseded'

/** Compute port over worker threads, with views in which the newest call counts. */
export interface ComputePool extends Compute {
  /**
   * The same port for one asker: a call replaces the calls under the same key before it, which then reject (see `isSuperseded`).
   *
   * @param key     who asks, and for what; null: nothing is replaced
   * @param signal  ends the calls when the asker is gone
   */
  view(key: string | null, signal?: AbortSignal): Compute
}

export interface PoolOptions {
  /** The emitted worker; default: the one of the build output. */
  workerFile?: string
  /** Worker threads, 1 or more; default 2, or 1 on a machine with a single core. */
  threads?: number
  /** How long a replaced plan that is already running may still go on, in ms: ending a worker costs more than a short plan. */
  grace_ms?: number
}

interface Task { readonly key: string | null; readonly controller: AbortController; grace: NodeJS.Timeout | null }

/**
 * Starts the worker pool that both hosts plan with. Workers start with the first job and do not keep the process alive.
 *
 * @returns port whose `close` ends all workers
 */
export function poolCompute(options: PoolOptions = {}): ComputePool {
  const threads = options.threads ?? Math.min(2, availableParallelism())
  const tasks: Task[] = []
  let pool: Tinypool | null = null
  const started = () => pool ??= new Tinypool({
    filename: options.workerFile ?? built('main', 'compute.worker.js'), minThreads: threads, maxThreads: threads,
  })
  const run = (job: Job, key: string | null, signal?: AbortSignal): Promise<unknown> => {
    if (key !== null) replaceOlder(tasks, key, threads, options.grace_ms ?? 300)
    return follow(tasks, key, signal, (own) => started().run(job, { signal: own }) as Promise<unknown>)
  }
  const close = async () => {
    for (const task of [...tasks]) task.controller.abort()
    await pool?.destroy()
    pool = null
  }
  const view = (key: string | null, signal?: AbortSignal): Compute => ({
    plan: (document, card, settings) => run({ kind: 'plan', document, card, options: { ...settings } }, key, signal) as Promise<Result>,
    waves: (document, card, settings) => run({ kind: 'waves', document, card, options: settings }, key, signal) as Promise<Waves>,
    close,
  })
  return { ...view(null), view }
}

/** Gives up the tasks under a key: waiting ones at once, those that run after their grace. Tasks start in their order. */
function replaceOlder(tasks: readonly Task[], key: string, threads: number, grace_ms: number): void {
  tasks.forEach((task, position) => {
    if (task.key !== key || task.controller.signal.aborted || task.grace !== null) return
    if (position >= threads) task.controller.abort()
    else task.grace = setTimeout(() => task.controller.abort(), grace_ms)
  })
}

/** Keeps a task in the list for as long as it goes on; it ends early with its asker's signal. */
async function follow(
  tasks: Task[], key: string | null, signal: AbortSignal | undefined, work: (own: AbortSignal) => Promise<unknown>,
): Promise<unknown> {
  const controller = new AbortController()
  const task: Task = { key, controller, grace: null }
  const abort = () => controller.abort()
  if (signal?.aborted) abort()
  signal?.addEventListener('abort', abort)
  tasks.push(task)
  try {
    return await work(controller.signal)
  } catch (error) {
    throw controller.signal.aborted ? superseded() : error
  } finally {
    signal?.removeEventListener('abort', abort)
    if (task.grace !== null) clearTimeout(task.grace)
    tasks.splice(tasks.indexOf(task), 1)
  }
}
