import { succeed, type Reply } from '../contract/errors'
import type { Waves } from '../contract/waves'
import type { ReadPlan } from '../documents/read-plan'
import { computeFailure, type Compute, type WavesOptions } from './compute'

/** The transient of one comparator of a plan: a decision and its reset. */
export async function runWaves(compute: Compute, { plan, card }: Pick<ReadPlan, 'plan' | 'card'>, options: WavesOptions): Promise<Reply<Waves>> {
  try {
    return succeed(await compute.waves(plan, card, options))
  } catch (error) {
    return computeFailure(error)
  }
}

/** The waves as CSV: a header line, then a row for each time. Full digits, `\n` between lines. */
export function wavesCsv({ columns, rows }: Waves): string {
  return `${[columns, ...rows].map((row) => row.join(',')).join('\n')}\n`
}
