import { app, dialog, type BrowserWindow } from 'electron'
import { basename, extname, join } from 'node:path'
import type { Replies } from '../contract/channels'
import { fail, succeed, type Reply } from '../contract/errors'
import { saveFile } from '../documents/files'
import { readPlanText } from '../usecases/plan-text'
import type { KnownPaths } from './known-paths'
import type { Recent } from './recent'

const planFilters = [{ name: 'Latchwright plan', extensions: ['json'] }, { name: 'All files', extensions: ['*'] }]

/** Kinds of file that the program exports. */
const exportEndings: readonly string[] = ['.pdf', '.svg', '.png', '.csv', '.tsv', '.json']

export interface FileDesk {
  open(window: BrowserWindow, path: string | null): Promise<Reply<Replies['files.open']>>
  save(window: BrowserWindow, request: { text: string; path: string | null; suggested_name: string }): Promise<Reply<Replies['files.save']>>
  export(window: BrowserWindow, request: { base64: string; suggested_name: string }): Promise<Reply<Replies['files.export']>>
}

/** Opens and writes files where the person at the dialog said, and nowhere else. */
export function createFileDesk(known: KnownPaths, recent: Recent): FileDesk {
  const keep = async (window: BrowserWindow, path: string) => {
    known.grant(window.webContents.id, path)
    await recent.add(path)
    app.addRecentDocument(path)
    window.setRepresentedFilename(path)
  }
  const open: FileDesk['open'] = async (window, named) => {
    if (named !== null && !known.mayRead(window.webContents.id, named)) return fail('refused', 'Open this file through the dialog first.')
    const path = named ?? await askWhatToOpen(window)
    if (path === null) return succeed(null)
    const read = await readPlanText(path)
    if (!read.ok) return read
    await keep(window, path)
    return succeed({ ...read.value, path })
  }
  const save: FileDesk['save'] = async (window, { text, path: named, suggested_name }) => {
    if (named !== null && !known.mayWrite(window.webContents.id, named)) return fail('refused', 'Choose a place for this file in the dialog first.')
    const path = named ?? await askWhereToSave(window, plainName(suggested_name, '.bank.json'))
    if (path === null) return succeed(null)
    const written = await saveFile(path, text)
    if (!written.ok) return written
    await keep(window, path)
    return succeed({ path, name: basename(path) })
  }
  const exportFile: FileDesk['export'] = async (window, { base64, suggested_name }) => {
    if (!/^[A-Za-z0-9+/]*={0,2}$/.test(base64)) return fail('bad_request', 'files.export: base64: this is not base64.')
    const name = plainName(suggested_name, '.json')
    if (!exportEndings.includes(extname(name).toLowerCase())) return fail('bad_request', `files.export: suggested_name: ends with one of ${exportEndings.join(' ')}.`)
    const path = await askWhereToSave(window, name)
    if (path === null) return succeed(null)
    const written = await saveFile(path, Buffer.from(base64, 'base64'))
    return written.ok ? succeed({ name: basename(path) }) : written
  }
  return { open, save, export: exportFile }
}

async function askWhatToOpen(window: BrowserWindow): Promise<string | null> {
  const answer = await dialog.showOpenDialog(window, { title: 'Open a plan', filters: planFilters, properties: ['openFile'] })
  return answer.canceled ? null : (answer.filePaths[0] ?? null)
}

async function askWhereToSave(window: BrowserWindow, name: string): Promise<string | null> {
  const ending = extname(name).slice(1)
  const filters = ending === '' || ending === 'json' ? planFilters : [{ name: ending.toUpperCase(), extensions: [ending] }]
  const answer = await dialog.showSaveDialog(window, { title: 'Save', defaultPath: join(app.getPath('documents'), name), filters })
  return answer.canceled || answer.filePath === '' ? null : answer.filePath
}

/** A bare file name out of whatever the page suggests; nothing in it may hide its ending. */
function plainName(suggested: string, ending: string): string {
  const bare = basename(suggested.replaceAll('\\', '/')).replace(/[\p{Cc}\p{Bidi_Control}<>:"|?*]/gu, '')
  const name = bare.replace(/^\.+/, '').trim()
  return name === '' ? `plan${ending}` : name
}
