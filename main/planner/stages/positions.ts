import type { Limits } from '../../contract/result'

/** One comparator (or one cycle of it) with its place and its limits. */
export interface Position {
  readonly lane: number
  readonly cycle: number | null
  readonly threshold: number | null
  readonly commonMode: number
  readonly limits: Limits
}

/**
 * What all positions of one common mode ask of the latch together: the hardest of each limit.
 * The same latch sits at all of them, so only these decide its size.
 */
export interface Demand {
  readonly commonMode: number
  readonly limits: Limits
}

const smaller = (a: number | null, b: number | null): number | null => (a === null ? b : b === null ? a : Math.min(a, b))

function harder(a: Limits, b: Limits): Limits {
  const keys = Object.keys(a) as (keyof Limits)[]
  return Object.fromEntries(keys.map((key) => [key, smaller(a[key], b[key])])) as unknown as Limits
}

/** One demand per distinct common mode, in the order in which they appear. */
export function demandsOf(positions: readonly Position[]): Demand[] {
  const byMode = new Map<number, Limits>()
  for (const { commonMode, limits } of positions) {
    const known = byMode.get(commonMode)
    byMode.set(commonMode, known === undefined ? limits : harder(known, limits))
  }
  return [...byMode].map(([commonMode, limits]) => ({ commonMode, limits }))
}
