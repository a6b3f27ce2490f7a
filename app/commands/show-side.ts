import { command } from './command'

/** On a narrow window: shows the brief or the ledger. */
export const showSide = command<{ side: 'brief' | 'ledger' }>({
  id: 'show-side',
  label: 'Show the brief or the ledger',
  apply: (app, { side }) => app.views.patch({ side }),
})
