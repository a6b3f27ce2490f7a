import { labelOf, lowered } from '../text/labels'
import { dropAt, valueAt } from '../state/paths'
import { command } from './command'

/** Takes a value out of the brief, so that the default counts again. */
export const clearValue = command<{ path: string }>({
  id: 'clear-value',
  label: 'Return a field to its default',
  apply: (app, { path }) => {
    app.views.draft(path, null)
    if (valueAt(app.documents.get().document, path) === undefined) return
    app.documents.edit(`${lowered(labelOf(path))} to default`, (draft) => dropAt(draft, path))
  },
})
