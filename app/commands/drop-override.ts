import { ledgerItems, type LedgerItem } from '../../main/contract/choices'
import { lowered } from '../text/labels'
import { command } from './command'

/** Lets the model's figure count again. */
export const dropOverride = command<{ item: LedgerItem }>({
  id: 'drop-override',
  label: 'Remove an override',
  apply: (app, { item }) => {
    app.documents.edit(`${lowered(ledgerItems[item])} by its model`, (draft) => {
      const left = (draft.overrides ?? []).filter((line) => line.item !== item)
      if (left.length > 0) draft.overrides = left
      else delete draft.overrides
    })
  },
})
