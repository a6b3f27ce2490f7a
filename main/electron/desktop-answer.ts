import type { BrowserWindow } from 'electron'
import type { channels, ChannelName } from '../contract/channels'
import { succeed } from '../contract/errors'
import { answerFrom, type Table } from '../usecases/answer'
import type { FileDesk } from './files'
import type { KnownPaths } from './known-paths'
import type { Recent } from './recent'
import type { Recovery } from './recovery'
import type { Unsaved } from './unsaved'

type DesktopChannel = { [N in ChannelName]: (typeof channels)[N]['hosts'] extends 'desktop' ? N : never }[ChannelName]

export interface Desktop {
  readonly files: FileDesk
  readonly known: KnownPaths
  readonly recent: Recent
  readonly recovery: Recovery
  readonly unsaved: Unsaved
}

/** The door to the channels that only the desktop program has. */
export function createDesktopAnswer({ files, known, recent, recovery, unsaved }: Desktop) {
  const table: Table<DesktopChannel, BrowserWindow> = {
    'files.open': ({ path }, window) => files.open(window, path),
    'files.save': (request, window) => files.save(window, request),
    'files.export': (request, window) => files.export(window, request),
    'files.recent': async (_request, window) => {
      const paths = await recent.list()
      for (const path of paths) known.offer(window.webContents.id, path)
      return succeed({ paths })
    },
    'recovery.keep': async ({ text }, window) => {
      await recovery.keep(window.webContents.id, text)
      return succeed({})
    },
    'recovery.read': async (_request, window) => succeed({ text: await recovery.read(window.webContents.id) }),
    'window.dirty': async ({ dirty, title }, window) => {
      unsaved.mark(window, dirty, title)
      return succeed({})
    },
  }
  return answerFrom(table)
}
