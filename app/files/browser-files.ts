import { fail, succeed, type Reply } from '../../main/contract/errors'
import type { Place } from '../state/document-store'
import type { Files, Opened } from './files'

interface Handle {
  readonly name: string
  getFile(): Promise<File>
  createWritable(): Promise<{ write(data: string): Promise<void>; close(): Promise<void> }>
}
interface Pickers {
  showOpenFilePicker?: (options: object) => Promise<Handle[]>
  showSaveFilePicker?: (options: object) => Promise<Handle>
}

const recoveryKey = 'latchwright.recovery'
const planType = { description: 'Latchwright plan', accept: { 'application/json': ['.json'] } }
const pickers = (): Pickers => window as unknown as Pickers
const cancelled = (error: unknown) => error instanceof DOMException && error.name === 'AbortError'

/** Lets the browser store bytes in its own download folder. */
function download(data: Blob, name: string): void {
  const url = URL.createObjectURL(data)
  const link = document.createElement('a')
  link.href = url
  link.download = name
  link.click()
  setTimeout(() => URL.revokeObjectURL(url), 10_000)
}

function upload(): Promise<File | null> {
  return new Promise((resolve) => {
    const input = document.createElement('input')
    input.type = 'file'
    input.accept = '.json,application/json'
    input.addEventListener('change', () => resolve(input.files?.[0] ?? null))
    input.addEventListener('cancel', () => resolve(null))
    input.click()
  })
}

function bytesOf(base64: string): Uint8Array<ArrayBuffer> {
  return Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0))
}

/** Runs a picker; a closed picker is null, a failure a reply. */
async function picked<T>(code: 'read_failed' | 'write_failed', run: () => Promise<T | null>): Promise<Reply<T | null>> {
  try {
    return succeed(await run())
  } catch (error) {
    if (cancelled(error)) return succeed(null)
    const read = code === 'read_failed'
    return fail(code, read ? 'The file could not be read. Try to open it again.' : 'The file could not be written. Save it under another name.')
  }
}

/** Files through the browser's own pickers, or by upload and download where it has none. */
export function browserFiles(): Files {
  let handle: Handle | null = null

  const open = async (): Promise<Opened | null> => {
    const pick = pickers().showOpenFilePicker
    const chosen = pick ? (await pick.call(window, { types: [planType] }))[0] : null
    const file = chosen ? await chosen.getFile() : await (pick ? null : upload())
    if (!file) return null
    handle = chosen ?? null
    return { text: await file.text(), place: { name: file.name, path: null } }
  }
  const save = async (text: string, place: Place | null, ask: boolean, name: string): Promise<Place | null> => {
    const pick = pickers().showSaveFilePicker
    if (!pick) {
      download(new Blob([text], { type: 'application/json' }), place?.name ?? name)
      return { name: place?.name ?? name, path: null }
    }
    if (ask || place === null || handle === null) handle = await pick.call(window, { suggestedName: place?.name ?? name, types: [planType] })
    const stream = await handle.createWritable()
    await stream.write(text)
    await stream.close()
    return { name: handle.name, path: null }
  }
  return {
    open: () => picked('read_failed', open),
    save: (text, { place, ask, suggestedName }) => picked('write_failed', () => save(text, place, ask, suggestedName)),
    hand: async (base64, name) => {
      download(new Blob([bytesOf(base64)]), name)
      return succeed({ name })
    },
    recent: async () => [],
    keepRecovery: (text) => {
      if (text === null) window.localStorage.removeItem(recoveryKey)
      else window.localStorage.setItem(recoveryKey, text)
    },
    readRecovery: async () => window.localStorage.getItem(recoveryKey),
    setDirty: () => undefined,
  }
}
