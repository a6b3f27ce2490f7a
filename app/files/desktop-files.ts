import type { Call } from '../../main/contract/channels'
import { succeed } from '../../main/contract/errors'
import type { Files } from './files'

/** Files through the operating system's own dialogs. */
export function desktopFiles(call: Call): Files {
  return {
    open: async (path) => {
      const reply = await call('files.open', { path })
      if (!reply.ok || reply.value === null) return reply as typeof reply & { value: null }
      const { text, name, path: place } = reply.value
      return succeed({ text, place: { name, path: place } })
    },
    save: (text, { place, ask, suggestedName }) =>
      call('files.save', { text, path: ask ? null : (place?.path ?? null), suggested_name: place?.name ?? suggestedName }),
    hand: (base64, name) => call('files.export', { base64, suggested_name: name }),
    recent: async () => {
      const reply = await call('files.recent', {})
      return reply.ok ? reply.value.paths : []
    },
    keepRecovery: (text) => void call('recovery.keep', { text }),
    readRecovery: async () => {
      const reply = await call('recovery.read', {})
      return reply.ok ? reply.value.text : null
    },
    setDirty: (dirty, title) => void call('window.dirty', { dirty, title }),
  }
}
