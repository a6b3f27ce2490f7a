import type { BudgetLine, ComparatorEntry, Result, Working } from '../../../contract/result'
import type { Bank } from '../bank'
import type { LedgerDraft } from '../ledger'
import { briefWorkings } from './brief'
import { limitWorkings } from './limits'
import { reachedWorkings } from './reached'
import { ledgerWorkings, predictedWorkings } from './totals'

/** The comparator of the largest use; one that nothing can meet comes first. */
export function tightestEntry(entries: readonly ComparatorEntry[]): ComparatorEntry {
  const rank = (entry: ComparatorEntry): number => {
    const use = entry.tightest === null ? 0 : entry.use[entry.tightest]
    return use ?? Infinity
  }
  return entries.reduce((a, b) => (rank(b) > rank(a) ? b : a))
}

/** Workings common to the bank and those of one comparator: the one asked for, else the tightest. */
export function workingsOf(bank: Bank, ledger: LedgerDraft, budget: readonly BudgetLine[], predicted: Result['predicted'], index?: number): Working[] {
  const entry = (index === undefined ? undefined : bank.entries[index - 1]) ?? tightestEntry(bank.entries)
  return [
    ...briefWorkings(bank),
    ...limitWorkings(bank, entry),
    ...reachedWorkings(bank, entry),
    ...ledgerWorkings(ledger),
    ...predictedWorkings(bank, budget, predicted, ledger.ledger.power_w),
  ]
}
