import { app, type BrowserWindow } from 'electron'
import { channels } from '../contract/channels'
import { poolCompute } from '../usecases/compute-pool'
import { createAnswer } from '../usecases/handlers'
import { listenOnChannels } from './channels'
import { surviveCrashes } from './crash'
import { createDesktopAnswer } from './desktop-answer'
import { createFileDesk } from './files'
import { createKnownPaths } from './known-paths'
import { setMenu } from './menu'
import { createRecent } from './recent'
import { createRecovery } from './recovery'
import { createUnsaved } from './unsaved'
import { openWindow } from './windows'

/** Puts the parts of the running desktop program together; returns what opens a window. */
export function startDesktop(): (path?: string) => BrowserWindow {
  const folder = app.getPath('userData')
  const known = createKnownPaths()
  const recent = createRecent(folder)
  const recovery = createRecovery(folder)
  const unsaved = createUnsaved((window) => recovery.keep(window.webContents.id, null))
  const compute = poolCompute()
  const answer = createAnswer({ compute, host: 'desktop' })
  const answerDesktop = createDesktopAnswer({ files: createFileDesk(known, recent), known, recent, recovery, unsaved })
  listenOnChannels((name, request, window) => (channels[name].hosts === 'both'
    ? answer(name, request, { window: String(window.webContents.id) })
    : answerDesktop(name, request, window)))

  const open = (path?: string): BrowserWindow => openWindow({
    path,
    prepare: (window) => {
      const { id } = window.webContents
      if (path !== undefined) known.offer(id, path)
      unsaved.guard(window)
      surviveCrashes(window)
      window.on('closed', () => known.forget(id))
    },
  })
  const newWindow = (path?: string) => void open(path)
  setMenu({ newWindow, recent: [] })
  app.on('browser-window-focus', () => void recent.list().then((paths) => setMenu({ newWindow, recent: paths })))
  app.on('will-quit', () => void compute.close())
  return open
}
