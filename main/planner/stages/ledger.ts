import type { Override } from '../../contract/plan'
import type { Ledger, LedgerLine } from '../../contract/result'
import type { Condition } from '../latch/condition'
import type { Bank } from './bank'
import { areaLines } from './ledger-area'
import { powerLines, type DraftLine } from './ledger-power'

export interface LedgerDraft { readonly condition: Condition; readonly ledger: Ledger; readonly drafts: readonly DraftLine[] }

function overridden(draft: DraftLine, overrides: readonly Override[]): LedgerLine | null {
  const last = overrides.filter((o) => o.item === draft.item).at(-1)
  if (last !== undefined) return { item: draft.item, value: last.value, model: `value of the user's own${last.reason === '' ? '' : `: ${last.reason}`}`, overridden: true }
  return draft.value === null ? null : { item: draft.item, value: draft.value, model: draft.model, overridden: false }
}

/** Lines after overrides with their total; null where a line could not be computed. */
function totalled(drafts: readonly DraftLine[], overrides: readonly Override[]): { lines: LedgerLine[]; total: number | null } {
  const lines = drafts.map((draft) => overridden(draft, overrides))
  const shown = lines.filter((line) => line !== null)
  return { lines: shown, total: shown.length === lines.length ? shown.reduce((sum, line) => sum + line.value, 0) : null }
}

/** Power and area of the whole bank at one condition. */
export function ledgerAt(bank: Bank, condition: Condition): LedgerDraft {
  const { overrides } = bank.s.plan
  const power = powerLines(bank, condition)
  const area = areaLines(bank)
  const [watts, metres] = [totalled(power, overrides), totalled(area, overrides)]
  return { condition, drafts: [...power, ...area], ledger: { power_w: watts.total, area_m2: metres.total, power: watts.lines, area: metres.lines } }
}

/** Ledgers of all conditions; the first of the largest power is the one a result shows. */
export function ledgers(bank: Bank): { all: LedgerDraft[]; largest: LedgerDraft } {
  const all = bank.s.conditions.map((condition) => ledgerAt(bank, condition))
  return { all, largest: all.reduce((a, b) => ((b.ledger.power_w ?? Infinity) > (a.ledger.power_w ?? Infinity) ? b : a)) }
}
