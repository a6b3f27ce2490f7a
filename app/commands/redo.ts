import { command } from './command'

export const redo = command({
  id: 'redo',
  label: 'Redo',
  shortcut: { key: 'z', mod: true, shift: true },
  enabled: (app) => app.documents.get().future.length > 0,
  apply: (app) => app.documents.redo(),
})
