import { command } from './command'

export const showShortcuts = command({
  id: 'show-shortcuts',
  label: 'Keyboard shortcuts',
  shortcut: { key: 'F1' },
  apply: (app) => app.views.patch({ dialog: { kind: 'shortcuts' } }),
})
