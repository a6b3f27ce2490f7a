import type { LimitName } from '../../main/contract/choices'
import type { ComparatorEntry, Result } from '../../main/contract/result'
import { useApp, useStore } from './use-store'

const slack = 1e-6

/** The use that decides, reached ÷ limit; null when it could not be evaluated or its limit is not above zero. */
export const tightestUse = (entry: ComparatorEntry): number | null => (entry.tightest === null ? null : entry.use[entry.tightest])

/** Whether a use is over its limit. */
export const isOver = (use: number | null): boolean => use !== null && use > 1 + slack

/** Whether a limit is one that nothing can meet: not above zero. A trimmed offset is held against its trim step. */
export function cannotBeMet({ limits, use }: ComparatorEntry, name: LimitName): boolean {
  const limit = {
    time: limits.window_s, noise: limits.noise_v, offset: limits.trim_step_v ?? limits.offset_v, kickback: limits.kickback_v,
    memory: limits.memory_v, input: limits.input_cap_f,
  }[name]
  return use[name] === null && limit <= 0
}

/** A use as it is drawn: endless against a limit that nothing can meet; null when it is not known. */
export const drawnUse = (entry: ComparatorEntry, name: LimitName): number | null => (cannotBeMet(entry, name) ? Infinity : entry.use[name])

/** Whether a comparator misses any of its limits. A limit without a positive value cannot be met. */
export function missesLimit(entry: ComparatorEntry): boolean {
  return Object.values(entry.use).some(isOver) || (entry.tightest !== null && entry.use[entry.tightest] === null)
}

/** The comparator nearest to, or farthest over, a limit. */
export function tightestEntry(result: Result): ComparatorEntry {
  const rank = (entry: ComparatorEntry) => tightestUse(entry) ?? (entry.tightest === null ? -1 : Infinity)
  return result.comparators.reduce((worst, entry) => (rank(entry) > rank(worst) ? entry : worst))
}

/** The comparator that was chosen; as long as none was, the tightest. */
export const chosenEntry = (result: Result, selected: number): ComparatorEntry => result.comparators[selected - 1] ?? tightestEntry(result)

/** The selected comparator of the picture on the screen. */
export function useSelected(): ComparatorEntry | null {
  const app = useApp()
  const result = useStore(app.results, (state) => state.result)
  const selected = useStore(app.views, (state) => state.selected)
  return result ? chosenEntry(result, selected) : null
}
