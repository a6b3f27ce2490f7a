import { ledgerItems, type LedgerItem } from '../../main/contract/choices'
import { formatSi } from '../../main/contract/units'
import { ledgerUnit, lowered } from '../text/labels'
import { command } from './command'

/** Puts a person's own figure in place of a line of the ledger. */
export const setOverride = command<{ item: LedgerItem; value: number; reason: string }>({
  id: 'set-override',
  label: 'Override a ledger line',
  apply: (app, { item, value, reason }) => {
    app.documents.edit(`${lowered(ledgerItems[item])} ${formatSi(value, ledgerUnit(item))}`, (draft) => {
      draft.overrides = [...(draft.overrides ?? []).filter((line) => line.item !== item), { item, value, reason }]
    })
  },
})
