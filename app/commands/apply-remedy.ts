import type { Remedy } from '../../main/contract/result'
import { putAt } from '../state/paths'
import { labelOf, lowered, shownValue } from '../text/labels'
import { command } from './command'

/** Does what a finding proposes, as one step. */
export const applyRemedy = command<{ remedy: Remedy }>({
  id: 'apply-remedy',
  label: 'Apply a remedy',
  apply: (app, { remedy }) => {
    const name = remedy.set.map(({ path, value }) => `${lowered(labelOf(path))} ${shownValue(path, value)}`).join(', ')
    for (const { path } of remedy.set) app.views.draft(path, null)
    app.documents.edit(name, (draft) => {
      for (const { path, value } of remedy.set) putAt(draft, path, value)
    })
  },
})
