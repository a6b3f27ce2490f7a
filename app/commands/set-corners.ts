import { cornerNames, type CornerName } from '../../main/contract/choices'
import { command } from './command'

/** Chooses the corners that are evaluated; none is not a choice. */
export const setCorners = command<{ names: readonly CornerName[] }>({
  id: 'set-corners',
  label: 'Choose the corners',
  apply: (app, { names }) => {
    const chosen = cornerNames.filter((name) => names.includes(name))
    if (chosen.length === 0) return
    app.documents.edit(`corners ${chosen.join(', ')}`, (draft) => {
      draft.corners = chosen.length === cornerNames.length ? ['all'] : chosen
    })
  },
})
