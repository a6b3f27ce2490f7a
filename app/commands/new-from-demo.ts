import type { PlanInput } from '../../main/contract/plan'
import { command } from './command'
import { guarded, lay } from './guard'

/** Starts a new plan from one of the worked examples. */
export const newFromDemo = command<{ id: string }>({
  id: 'new-from-demo',
  label: 'New from a demo',
  enabled: (app) => app.library.get().demos.length > 0,
  apply: (app, { id }) => {
    const demo = app.library.get().demos.find((one) => one.id === id)
    if (!demo) return
    guarded(app, () => lay(app, () => app.documents.open(demo.document as PlanInput)))
  },
})
