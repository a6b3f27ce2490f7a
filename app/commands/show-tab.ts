import type { Tab } from '../state/view-store'
import { command } from './command'

/** Shows one of the rooms below the bank. */
export const showTab = command<{ tab: Tab; filter?: string }>({
  id: 'show-tab',
  label: 'Show a room below the bank',
  apply: (app, { tab, filter }) => app.views.patch({ tab, filter: filter ?? '' }),
})
