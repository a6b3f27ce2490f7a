import type { PlanInput } from '../../main/contract/plan'
import { problemText } from '../../main/contract/errors'
import type { Opened } from '../files/files'
import { command } from './command'
import { guarded, lay } from './guard'

/** Reads the text of a plan file and puts it on the desk; says what was changed in reading, or why it was refused. */
export const openText = command<Opened>({
  id: 'open-text',
  label: 'Open a dropped file',
  apply: async (app, { text, place }) => {
    const reply = await app.bridge.call('document.read', { text })
    if (!reply.ok) {
      const details = (reply.error.problems ?? []).map(problemText)
      app.views.patch({ notice: { tone: 'stop', text: `${place.name} was not opened. ${reply.error.message}`, details } })
      return
    }
    const { document, changes } = reply.value
    guarded(app, () => {
      lay(app, () => app.documents.open(document as PlanInput, { place, unsaved: changes.length > 0 }))
      if (changes.length > 0) {
        app.views.patch({ notice: { tone: 'note', text: `${place.name} was changed while it was read:`, details: changes } })
      }
    })
  },
})
