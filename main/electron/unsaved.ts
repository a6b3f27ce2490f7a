import { app, dialog, type BrowserWindow } from 'electron'

/** Which windows hold unsaved changes, and the question before one of them goes. */
export interface Unsaved {
  mark(window: BrowserWindow, dirty: boolean, title: string): void
  guard(window: BrowserWindow): void
}

/**
 * @param discarded  called when a person chose to lose the changes of a window
 */
export function createUnsaved(discarded: (window: BrowserWindow) => Promise<void>): Unsaved {
  const dirtyWindows = new Set<number>()
  let quitting = false
  app.on('before-quit', () => { quitting = true })

  const ask = async (window: BrowserWindow) => {
    const leaving = quitting
    quitting = false
    const { response } = await dialog.showMessageBox(window, {
      type: 'warning', buttons: ['Keep editing', 'Discard changes'], defaultId: 0, cancelId: 0, noLink: true,
      message: 'This plan has unsaved changes.', detail: 'They are lost when the window closes now.',
    })
    if (response !== 1) return
    dirtyWindows.delete(window.id)
    await discarded(window)
    window.destroy()
    if (leaving) app.quit()
  }
  return {
    mark: (window, dirty, title) => {
      if (dirty) dirtyWindows.add(window.id)
      else dirtyWindows.delete(window.id)
      window.setDocumentEdited(dirty)
      window.setTitle(title === '' ? app.name : `${dirty ? '• ' : ''}${title} — ${app.name}`)
    },
    guard: (window) => {
      let asking = false
      window.on('close', (event) => {
        if (!dirtyWindows.has(window.id)) return
        event.preventDefault()
        if (asking) return
        asking = true
        void ask(window).finally(() => { asking = false })
      })
    },
  }
}
