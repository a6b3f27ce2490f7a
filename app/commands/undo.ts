import { command } from './command'

export const undo = command({
  id: 'undo',
  label: 'Undo',
  shortcut: { key: 'z', mod: true },
  enabled: (app) => app.documents.get().past.length > 0,
  apply: (app) => app.documents.undo(),
})
