import { ledgerItems } from '../../../contract/choices'
import type { BudgetLine, Result, Working } from '../../../contract/result'
import { references } from '../../references'
import type { Bank } from '../bank'
import { digits } from '../digits'
import type { LedgerDraft } from '../ledger'
import { numbers, working } from './working'

/** Workings of every ledger line as shown, and of both totals. */
export function ledgerWorkings({ condition, ledger, drafts }: LedgerDraft): Working[] {
  const lines = [...ledger.power, ...ledger.area].map((line) => {
    const draft = drafts.find((d) => d.item === line.item)!
    const unit = line.item.startsWith('power.') ? 'W' : 'm²'
    const title = `${ledgerItems[line.item]}${unit === 'W' ? `, ${condition.name}` : ''}`
    return line.overridden
      ? working(line.item, `${title}, overridden`, line.model, digits(line.value), line.value, unit, 'the user')
      : working(line.item, title, line.model, draft.numbers, line.value, unit, references.practice)
  })
  const sum = (of: Result['ledger']['power'], id: string, title: string, value: number | null, unit: string) =>
    working(id, title, 'sum of the lines', of.map((line) => digits(line.value)).join(' + ') || '0', value, unit, references.definition)
  return [
    ...lines,
    sum(ledger.power, 'ledger.power_w', `Total power, ${condition.name}`, ledger.power_w, 'W'),
    sum(ledger.area, 'ledger.area_m2', 'Total area', ledger.area_m2, 'm²'),
  ]
}

/** Workings of the predicted figures. */
export function predictedWorkings({ s }: Bank, lines: readonly BudgetLine[], predicted: Result['predicted'], power: number | null): Working[] {
  if (predicted.enob_bits === null || predicted.sndr_db === null) return []
  const total = lines.map((line) => digits(line.used_v2!)).join(' + ')
  const rate = s.plan.converter.sample_rate_hz
  const merits = power === null || !(power > 0) ? [] : [
    working('predicted.walden_j', 'Walden figure of merit', 'P / (2^ENOB · f_s)', numbers`${power} / (2^${predicted.enob_bits} * ${rate})`, predicted.walden_j, 'J', references.walden),
    working('predicted.schreier_db', 'Schreier figure of merit', 'SNDR + 10·log10(f_s / 2P)', numbers`${predicted.sndr_db} + 10 * log10(${rate} / 2 / ${power})`, predicted.schreier_db, 'dB', references.schreier),
  ]
  return [
    working('predicted.enob_bits', 'Predicted effective bits', '½·log2(V_FS² / 12ΣP)', `0.5 * log2(${numbers`${s.fullScale}`}^2 / (12 * (${total})))`, predicted.enob_bits, 'bit', references.ieee1241),
    working('predicted.sndr_db', 'Predicted SNDR', '10·log10((V_FS²/8) / ΣP)', `10 * log10(${numbers`${s.fullScale}`}^2 / 8 / (${total}))`, predicted.sndr_db, 'dB', references.ieee1241),
    ...merits,
  ]
}
