import { command } from './command'
import { openRecent } from './open-recent'

/** Asks for a plan file and opens it. */
export const openPlan = command({
  id: 'open-plan',
  label: 'Open',
  shortcut: { key: 'o', mod: true },
  apply: (app) => openRecent.apply(app, { path: null }),
})
