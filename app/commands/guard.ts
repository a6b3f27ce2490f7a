import type { App } from '../state/app'
import { isDirty } from '../state/document-store'

/** Asks before changes that are not saved are left behind. */
export function guarded(app: App, proceed: () => void): void {
  if (isDirty(app.documents.get())) app.views.patch({ dialog: { kind: 'discard', proceed } })
  else proceed()
}

/** Puts a document on the desk and forgets what was typed about the last one. */
export function lay(app: App, open: () => void): void {
  const { notice } = app.views.get()
  app.views.patch({ drafts: {}, notice: notice?.action ? notice : null, selected: 0, zoom: { scale: 1, x: 0, y: 0 } })
  open()
}
