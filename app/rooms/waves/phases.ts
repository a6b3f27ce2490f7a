import type { Waves } from '../../../main/contract/waves'

const smallestNamed = 0.1

/** Whether the name of a phase has room above it. */
export function isNamed(waves: Waves, phase: Waves['phases'][number]): boolean {
  const [from, to] = [waves.rows[0]?.[0] ?? 0, waves.rows[waves.rows.length - 1]?.[0] ?? 0]
  return phase.to_s - phase.from_s > (to - from) * smallestNamed
}
