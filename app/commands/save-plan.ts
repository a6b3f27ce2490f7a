import type { App } from '../state/app'
import { currentStep } from '../state/document-store'
import { fileName } from '../files/files'
import { command } from './command'

const timeNow = () => new Date().toLocaleTimeString(undefined, { hour: '2-digit', minute: '2-digit' })

/** Saves the document as it is written, also when it is not a valid plan yet. */
export async function save(app: App, ask: boolean): Promise<void> {
  const state = app.documents.get()
  const written = await app.bridge.call('document.write', { document: state.document })
  const text = written.ok ? written.value.text : `${JSON.stringify(state.document, null, 2)}\n`
  const reply = await app.files.save(text, { place: state.place, ask, suggestedName: fileName(state.document.title ?? '', '.bank.json') })
  if (!reply.ok) {
    app.views.patch({ notice: { tone: 'stop', text: reply.error.message, details: [], action: { label: 'Save as', run: () => void save(app, true) } } })
    return
  }
  if (reply.value === null) return
  app.documents.markSaved(currentStep(state), reply.value, timeNow())
  app.files.keepRecovery(null)
}

export const savePlan = command({
  id: 'save-plan',
  label: 'Save',
  shortcut: { key: 's', mod: true },
  apply: (app) => save(app, false),
})
