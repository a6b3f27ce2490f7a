import { dialog, type BrowserWindow } from 'electron'

/** Says so when a page has died, and loads it anew; what was unsaved is then offered from its recovery copy. */
export function surviveCrashes(window: BrowserWindow): void {
  window.webContents.on('render-process-gone', (_event, { reason }) => {
    if (reason === 'clean-exit' || window.isDestroyed()) return
    void dialog.showMessageBox(window, {
      type: 'error', buttons: ['Load again'], message: 'The window stopped working.', detail: 'Unsaved work was kept and is offered again.',
    }).then(() => window.reload())
  })
}
