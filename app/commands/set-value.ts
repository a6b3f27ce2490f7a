import { stepName } from '../text/labels'
import { putAt } from '../state/paths'
import { command } from './command'

/** Writes one value of the brief. */
export const setValue = command<{ path: string; value: unknown; group?: string }>({
  id: 'set-value',
  label: 'Change a field',
  apply: (app, { path, value, group }) => {
    app.views.draft(path, null)
    app.documents.edit(stepName(path, value), (draft) => putAt(draft, path, value), group)
  },
})
