import { putAt, valueAt } from '../state/paths'
import { stepName } from '../text/labels'
import { command } from './command'

const path = 'comparator.sizing'

/** Chooses who sizes. Manual sizing starts from the widths the planner found last. */
export const setSizing = command<{ value: 'auto' | 'manual' }>({
  id: 'set-sizing',
  label: 'Choose the sizing',
  apply: (app, { value }) => {
    const found = app.results.get().result?.design.widths
    app.documents.edit(stepName(path, value), (draft) => {
      putAt(draft, path, value)
      if (value === 'manual' && found && valueAt(draft, 'comparator.widths') === undefined) putAt(draft, 'comparator.widths', { ...found })
    })
  },
})
