import { app, BrowserWindow } from 'electron'
import { built } from '../usecases/built-files'
import { windowAddress } from './window-files'

/** What every window of the program is made with. */
export const windowPreferences = {
  contextIsolation: true, sandbox: true, nodeIntegration: false, nodeIntegrationInWorker: false, nodeIntegrationInSubFrames: false,
  webSecurity: true, allowRunningInsecureContent: false, experimentalFeatures: false, webviewTag: false, navigateOnDragDrop: false,
  spellcheck: false,
} as const

export interface WindowOptions {
  /** A plan file the window starts with. */
  path?: string
  /** Runs before the page loads. */
  prepare(window: BrowserWindow): void
}

/** Opens one window; there may be several. */
export function openWindow({ path, prepare }: WindowOptions): BrowserWindow {
  const window = new BrowserWindow({
    width: 1440, height: 900, minWidth: 900, minHeight: 600, show: false, title: app.name,
    webPreferences: { ...windowPreferences, devTools: !app.isPackaged, preload: built('preload', 'preload.cjs') },
  })
  window.once('ready-to-show', () => window.show())
  window.on('page-title-updated', (event) => event.preventDefault())
  prepare(window)
  const fragment = path === undefined ? '' : `#open=${encodeURIComponent(path)}`
  window.loadURL(windowAddress + fragment).catch(() => undefined)
  return window
}
