import type { PlanInput } from '../../main/contract/plan'
import { command } from './command'
import { guarded, lay } from './guard'

/** Takes up the plan that was not saved when the window was closed last. */
export const restoreRecovery = command<{ document: PlanInput }>({
  id: 'restore-recovery',
  label: 'Restore the unsaved plan',
  apply: (app, { document }) => guarded(app, () => lay(app, () => app.documents.open(document, { unsaved: true }))),
})
