import { problemText } from '../../main/contract/errors'
import { command } from './command'

/** Makes the PDF sheet of the plan as it stands and hands it out. */
export const exportSheet = command({
  id: 'export-sheet',
  label: 'Export sheet',
  shortcut: { key: 'e', mod: true },
  enabled: (app) => app.results.get().result !== null && app.views.get().busy === null,
  apply: async (app) => {
    app.views.patch({ busy: 'Making the sheet', notice: null })
    const reply = await app.bridge.call('sheet.make', {
      document: app.documents.get().document, paper: app.views.get().paper, date: null,
    })
    const handed = reply.ok ? await app.files.hand(reply.value.base64, reply.value.suggested_name) : reply
    app.views.patch({ busy: null })
    if (handed.ok) {
      if (handed.value !== null) app.views.patch({ notice: { tone: 'note', text: `The sheet is in ${handed.value.name}.`, details: [] } })
      return
    }
    const details = (handed.error.problems ?? []).map(problemText)
    app.views.patch({ notice: { tone: 'stop', text: `No sheet was made. ${handed.error.message}`, details } })
  },
})
