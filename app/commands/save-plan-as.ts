import { command } from './command'
import { save } from './save-plan'

export const savePlanAs = command({
  id: 'save-plan-as',
  label: 'Save as',
  shortcut: { key: 's', mod: true, shift: true },
  apply: (app) => save(app, true),
})
