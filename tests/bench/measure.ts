/** One line of the table. */
export interface Row {
  readonly what: string
  readonly runs: number
  readonly median_ms: number
  /** 95th percentile; of a handful of runs, the largest. */
  readonly high_ms: number
  readonly cpu_ms: number | null
  readonly aim_ms: number | null
}

/** What a part hands to the table. */
export interface Measured { readonly rows: readonly Row[]; readonly notes: readonly string[] }

/** Wall time and processor time of all threads of this process. */
export interface Taken { readonly wall_ms: number; readonly cpu_ms: number | null }

export interface Repeat {
  /** Timed runs. */
  readonly runs: number
  /** Runs before them that are not timed. */
  readonly warmUp: number
  /** Calls in one timed run, of which the mean counts: for work far below a millisecond's resolution. */
  readonly batch?: number
}

/** Processor time of this process since it started, in ms. */
export function cpuNow(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1000
}

/** Times one piece of work. */
export async function taken(work: () => unknown): Promise<Taken> {
  const [wall, cpu] = [performance.now(), cpuNow()]
  await work()
  return { wall_ms: performance.now() - wall, cpu_ms: cpuNow() - cpu }
}

/** Times work again and again; `work` is given a number that never repeats. */
export async function repeated(work: (call: number) => unknown, { runs, warmUp, batch = 1 }: Repeat): Promise<Taken[]> {
  let call = 0
  const once = async () => {
    for (let i = 0; i < batch; i += 1) {
      call += 1
      await work(call)
    }
  }
  for (let i = 0; i < warmUp; i += 1) await once()
  const all: Taken[] = []
  for (let i = 0; i < runs; i += 1) all.push(await taken(once))
  return all.map(({ wall_ms, cpu_ms }) => ({ wall_ms: wall_ms / batch, cpu_ms: cpu_ms === null ? null : cpu_ms / batch }))
}

/** Value below which a part of the sample lies, by nearest rank; `part` in 0…1. */
export function quantile(sample: readonly number[], part: number): number {
  const sorted = [...sample].sort((a, b) => a - b)
  return sorted[Math.max(0, Math.ceil(part * sorted.length) - 1)]
}

/** Runs as a line of the table. */
export function rowOf(what: string, all: readonly Taken[], aim_ms: number | null = null): Row {
  const wall = all.map(({ wall_ms }) => wall_ms)
  const cpu = all.flatMap(({ cpu_ms }) => (cpu_ms === null ? [] : [cpu_ms]))
  return {
    what, runs: all.length, median_ms: quantile(wall, 0.5), high_ms: quantile(wall, 0.95),
    cpu_ms: cpu.length === 0 ? null : quantile(cpu, 0.5), aim_ms,
  }
}
