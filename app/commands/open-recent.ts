import { command } from './command'
import { openText } from './open-text'

/** Opens a plan by the path it was last seen at; without one, asks for it. */
export const openRecent = command<{ path: string | null }>({
  id: 'open-recent',
  label: 'Open a recent plan',
  apply: async (app, { path }) => {
    const reply = await app.files.open(path)
    if (!reply.ok) app.views.patch({ notice: { tone: 'stop', text: reply.error.message, details: [] } })
    else if (reply.value !== null) await openText.apply(app, reply.value)
  },
})
